/** The plan as JSON: the request that POST /api/v1/plans/rank takes, and its answer. */
import { fileRoute } from "./_file-route.ts";

export const GET = fileRoute("plan", "json", (file) => `${JSON.stringify(file, null, 2)}\n`);
