/** Values at the question's list of energies as CSV, with the citation in its head. */
import type { APIRoute } from "astro";
import { valuesCsv } from "#src/lib/lookup/csv.ts";
import { exportRoute } from "./_export-route.ts";

export const GET: APIRoute = exportRoute("csv", ({ view, question }) => valuesCsv(view, question));
