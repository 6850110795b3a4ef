/** `GET /api/v1/elements/{symbol}/factors`: one element's table; immutable where the address names its version. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { ProblemError, quoteInput } from "#src/lib/http/problems.ts";
import { factorsQuerySchema } from "#src/lib/schemas/queries.ts";
import { elementFactors } from "#src/lib/services/constants.ts";
import { getTables } from "#src/lib/services/tables.ts";

export const GET = apiRoute({
  query: factorsQuerySchema,
  cache: ({ version }) => (version === undefined ? "revalidate" : "immutable"),
  answer: async ({ query: { tabulation, version }, params }) => {
    const tables = await getTables();
    if (version !== undefined && version !== tables.version) {
      throw new ProblemError(
        "notFound",
        `Tables ${quoteInput(version, 32)} are not served here; the version in use is ${tables.version}.`,
      );
    }
    return elementFactors(params["symbol"] ?? "", tabulation, tables);
  },
});

export const ALL = otherMethods({ GET });
