/** The plane as CSV, a row a point. */
import { planeCsv } from "#src/lib/plans/csv.ts";
import { fileRoute } from "./_file-route.ts";

export const GET = fileRoute("plan-plane", "csv", ({ answer }) => planeCsv(answer));
