/** Every point of the drawn curves as CSV. */
import type { APIRoute } from "astro";
import { curvesCsv } from "#src/lib/lookup/csv.ts";
import { exportRoute } from "./_export-route.ts";

export const GET: APIRoute = exportRoute("csv", ({ view, question }) => curvesCsv(view, question));
