/** `GET` and `POST /api/v1/constants`. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { constantsRequestSchema } from "#src/lib/schemas/constants.ts";
import { materialSchema } from "#src/lib/schemas/material.ts";
import { constantsQuerySchema } from "#src/lib/schemas/queries.ts";
import { validate } from "#src/lib/http/validate.ts";
import { computeConstants } from "#src/lib/services/constants.ts";
import { materialLookup } from "#src/lib/services/lookup.ts";
import { getTables } from "#src/lib/services/tables.ts";

export const GET = apiRoute({
  query: constantsQuerySchema,
  cache: () => "revalidate",
  answer: async ({ query: { formula, densityGCm3, materialId, ...rest } }) => {
    const material = validate(
      materialSchema,
      materialId === undefined ? { formula, densityGCm3 } : { materialId },
      "The material is not valid.",
    );
    // In a query the material's fields are keys of their own.
    return computeConstants({ material, ...rest }, await getTables(), materialLookup, "");
  },
});

export const POST = apiRoute({
  body: constantsRequestSchema,
  answer: async ({ body }) => computeConstants(body, await getTables(), materialLookup),
});

export const ALL = otherMethods({ GET, POST });
