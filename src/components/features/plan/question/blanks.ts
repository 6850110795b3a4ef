/** Which blank of the sentence a field belongs to, and the order in which Enter goes on. */
import type { PlanFault } from "#src/lib/plans/faults.ts";
import type { PlanField } from "#src/lib/plans/question.ts";
import type { PlanBlank } from "./props.ts";

const BLANK_OF: Readonly<Record<PlanField, PlanBlank>> = {
  shape: "shape",
  size: "size",
  length: "size",
  width: "size",
  feature: "feature",
  featureDensity: "feature",
  featureParts: "feature",
  featureBy: "feature",
  host: "host",
  hostDensity: "host",
  hostParts: "host",
  hostBy: "host",
  thickness: "thickness",
  layers: "layers",
  setup: "setup",
  source: "setup",
  sourceSize: "setup",
  blur: "setup",
  pixel: "setup",
  screen: "setup",
  bandwidth: "setup",
  flux: "setup",
  energies: "energies",
  distances: "distances",
  use: "use",
  projections: "use",
  nearField: "use",
  dose: "dose",
  time: "time",
  pass: "time",
  threshold: "time",
  counts: "time",
  objective: "time",
  table: "time",
};

export const blankOf = (field: PlanField): PlanBlank => BLANK_OF[field];

/** What opens after a blank was taken; a panel that serves two blanks is not opened twice in a row. */
export const NEXT_BLANK: Readonly<Record<PlanBlank, PlanBlank | null>> = {
  size: "feature",
  shape: "feature",
  feature: "thickness",
  thickness: "host",
  host: "setup",
  layers: "setup",
  setup: "energies",
  energies: "distances",
  distances: "use",
  use: "dose",
  dose: null,
  time: null,
};

/** The blanks of the second clause, which folds on a phone. */
export const SECOND_CLAUSE = ["setup", "energies", "distances", "use", "dose", "time"] as const;

export const LABELS: Readonly<Record<PlanBlank, string>> = {
  size: "size",
  shape: "shape",
  feature: "feature material",
  thickness: "host thickness",
  host: "host material",
  layers: "layers",
  setup: "setup",
  energies: "photon energies",
  distances: "distances",
  use: "use of the images",
  dose: "dose limit",
  time: "time limit",
};

export const faultIdOf = (fault: PlanFault, index: number): string => `plan-fault-${fault.field}-${index}`;
