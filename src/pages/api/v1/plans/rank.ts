/** `POST /api/v1/plans/rank`: the shortlist of energies and distances, absorption's own best, and the plane. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { rankRequestSchema } from "#src/lib/schemas/plan.ts";
import { materialLookup } from "#src/lib/services/lookup.ts";
import { rankPlanRequest } from "#src/lib/services/plans.ts";
import { getTables } from "#src/lib/services/tables.ts";

export const POST = apiRoute({
  body: rankRequestSchema,
  answer: async ({ body }) => rankPlanRequest(body, await getTables(), materialLookup),
});

export const ALL = otherMethods({ POST });
