/** The look-up as JSON: the same answer as `POST /api/v1/constants` at the question's list of energies. */
import type { APIRoute } from "astro";
import { computeConstants } from "#src/lib/services/constants.ts";
import { materialLookup } from "#src/lib/services/lookup.ts";
import { getTables } from "#src/lib/services/tables.ts";
import { exportRoute } from "./_export-route.ts";

export const GET: APIRoute = exportRoute("json", async ({ answer, view, question }) => {
  const listed = view.list.map((row) => row.energyKeV);
  const energiesKeV = listed.length > 0 ? listed : view.energyKeV === null ? [] : [view.energyKeV];
  const material = answer.main?.stated.statement;
  if (!material || energiesKeV.length === 0) return "null\n";
  const constants = computeConstants(
    { material, energiesKeV, tabulation: question.table },
    await getTables(),
    materialLookup,
  );
  return `${JSON.stringify(constants, null, 2)}\n`;
});
