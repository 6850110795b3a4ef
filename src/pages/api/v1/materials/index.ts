/** `GET /api/v1/materials`: the handbook, searched by name, formula, other names and tags; best first. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { listQuerySchema } from "#src/lib/schemas/queries.ts";
import { listMaterials } from "#src/lib/services/materials.ts";

export const GET = apiRoute({
  query: listQuerySchema,
  cache: () => "revalidate",
  answer: ({ query: { query, limit = 50, cursor } }) => listMaterials({ query, limit, cursor }),
});

export const ALL = otherMethods({ GET });
