/** `POST /api/v1/plans/rank`: the shortlist of energies and distances, absorption's own best, and the plane. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { rankRequestSchema } from "#src/lib/schemas/plan.ts";
import { rankPlan } from "#src/lib/services/plans.ts";

export const POST = apiRoute({ body: rankRequestSchema, answer: ({ body }) => rankPlan(body) });

export const ALL = otherMethods({ POST });
