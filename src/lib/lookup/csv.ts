/** Look-ups as CSV: comment lines with the question and its citation, then one header and numbers at full precision. */
import Papa from "papaparse";
import { curvesOf } from "./curves.ts";
import { citation } from "./citation.ts";
import type { Question } from "./question.ts";
import type { ConstantsValues, View } from "./view.ts";

const VALUE_COLUMNS = [
  "wavelengthAngstrom",
  "delta",
  "beta",
  "betaEffective",
  "muPhotoPerCm",
  "muCoherentPerCm",
  "muIncoherentPerCm",
  "muTotalPerCm",
  "muEnergyAbsorptionPerCm",
  "attenuationLengthMm",
  "halfValueMm",
  "deltaOverBeta",
  "phasePerMicrometreRad",
  "criticalAngleMrad",
] as const satisfies readonly (keyof ConstantsValues)[];

/** A comment line: line breaks and what a spreadsheet would run are taken out, `#` comes first. */
export const csvComment = (words: string): string => `# ${words.replace(/[\r\n\t\0]+/g, " ")}`;

function withHead(view: View, question: Question, table: string): string {
  const main = view.main;
  const named = main
    ? `${main.label}, ${main.densityGCm3} g/cm3${main.densityEstimated ? " (estimate from additive volumes)" : ""}`
    : "no material";
  return [csvComment(named), csvComment(citation(view.tableVersion, question.table)), table, ""].join("\r\n");
}

/** One row an energy of the list, or the question's one energy where the list is empty. */
export function valuesCsv(view: View, question: Question): string {
  const rows = view.list.length > 0 ? view.list : view.main?.row ? [view.main.row] : [];
  const fields = [
    "energyKeV",
    ...VALUE_COLUMNS,
    "deltaMin",
    "deltaMax",
    "betaMin",
    "betaMax",
    "muTotalPerCmMin",
    "muTotalPerCmMax",
    "notes",
  ];
  const data = rows.map((row) => [
    row.energyKeV,
    ...VALUE_COLUMNS.map((column) => row.values?.[column] ?? null),
    ...(row.spread ? [...row.spread.delta, ...row.spread.beta, ...row.spread.muTotalPerCm] : Array<null>(6).fill(null)),
    row.notes.join(" "),
  ]);
  return withHead(view, question, Papa.unparse({ fields, data }));
}

/** The points of the drawn curves, each curve with its own energies: both sides of every edge stand there. */
export function curvesCsv(view: View, question: Question): string {
  const data = curvesOf(view, question.curve).flatMap((curve) =>
    curve.energiesKeV.map((energyKeV, index) => [
      curve.quantity,
      curve.material,
      energyKeV,
      curve.values[index] ?? null,
    ]),
  );
  return withHead(
    view,
    question,
    Papa.unparse({ fields: ["quantity", "material", "energyKeV", "value"], data }, { escapeFormulae: true }),
  );
}
