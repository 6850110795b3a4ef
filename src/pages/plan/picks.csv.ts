/** The shortlist as CSV. */
import { picksCsv } from "#src/lib/plans/csv.ts";
import { fileRoute } from "./_file-route.ts";

export const GET = fileRoute("plan-picks", "csv", ({ answer }) => picksCsv(answer));
