/** A ranked plan as CSV: comment lines with the verdict and its citation, one header, numbers at full precision. */
import Papa from "papaparse";
import { csvComment } from "#src/lib/lookup/csv.ts";
import type { Candidate, RankAnswer } from "#src/lib/schemas/plan-answer.ts";

/** Columns of the list, in the API's names, which carry the units. */
const COLUMNS = [
  "technique",
  "energyKeV",
  "distanceM",
  "magnification",
  "effectiveDistanceM",
  "blurFwhmUm",
  "nearFieldMeasure",
  "fresnelResolution",
  "fresnelFeature",
  "efficiency",
  "transmission",
  "deltaMuPerCm",
  "deltaDelta",
  "gamma",
  "signalUm2",
  "absorptionSignalUm2",
  "rankedSignalUm2",
  "fluencePerUm2",
  "countsPerPixel",
  "entranceDoseGy",
  "meanDoseGy",
  "featureDoseGy",
  "timeS",
  "gain2d",
  "gainCt",
  "densitySensitivity",
  "agreesInAllTables",
] as const satisfies readonly (keyof Candidate)[];

const withHead = ({ verdict, citation }: RankAnswer, table: string): string =>
  [csvComment(verdict.summary), csvComment(citation), table, ""].join("\r\n");

/** One row a candidate, then absorption's best; `role` tells them apart. */
export function picksCsv(answer: RankAnswer): string {
  const row = (candidate: Candidate, role: string): (string | number | boolean | null)[] => [
    role,
    ...COLUMNS.map((column) => candidate[column]),
    candidate.why.join(" "),
    candidate.warnings.map(({ code }) => code).join(" "),
  ];
  const data = [
    ...answer.candidates.map((candidate, index) => row(candidate, `pick ${index + 1}`)),
    ...(answer.absorptionBest ? [row(answer.absorptionBest, "absorption's best")] : []),
  ];
  return withHead(answer, Papa.unparse({ fields: ["role", ...COLUMNS, "why", "warnings"], data }));
}

/** One row a point of the plane; `objective` is in the unit of the plan's objective (Gy, s or photons per µm²). */
export function planeCsv(answer: RankAnswer): string {
  const { energiesKeV, distancesM, objective, allowed, forbiddenBy } = answer.plane;
  const data = energiesKeV.flatMap((energyKeV, i) =>
    distancesM.map((distanceM, j) => [
      energyKeV,
      distanceM,
      objective[i]![j] ?? null,
      allowed[i]![j]! ? 1 : 0,
      forbiddenBy[i]![j] ?? null,
    ]),
  );
  return withHead(
    answer,
    Papa.unparse({ fields: ["energyKeV", "distanceM", "objective", "allowed", "forbiddenBy"], data }),
  );
}
