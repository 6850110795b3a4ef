/** `POST /api/v1/plans/evaluate`: every figure of one energy at one distance. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { evaluateRequestSchema } from "#src/lib/schemas/plan.ts";
import { materialLookup } from "#src/lib/services/lookup.ts";
import { evaluatePlan } from "#src/lib/services/plans.ts";
import { getTables } from "#src/lib/services/tables.ts";

export const POST = apiRoute({
  body: evaluateRequestSchema,
  answer: async ({ body }) => evaluatePlan(body, await getTables(), materialLookup),
});

export const ALL = otherMethods({ POST });
