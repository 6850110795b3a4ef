/** Why a point of a plan may not be taken, in words. */
import type { ForbiddenCode } from "#src/lib/schemas/plan-answer.ts";

export interface Reason {
  /** A sentence without its full stop. */
  readonly note: string;
  /** For a row or a cell. */
  readonly short: string;
}

export const FORBIDDEN_REASONS: Readonly<Record<ForbiddenCode, Reason>> = {
  insideSample: { note: "The detector would stand inside the sample", short: "inside the sample" },
  notInTable: { note: "A material has no values in the table", short: "not in the table" },
  nearEdge: { note: "Too close to an absorption edge", short: "near an edge" },
  undersampled: { note: "The feature spans fewer than three pixels", short: "too few pixels" },
  contrastReversal: { note: "Contrast reverses within the resolved band", short: "contrast reverses" },
  nearFieldLeft: { note: "The near field is left", short: "near field left" },
  transmissionLow: { note: "Less passes the sample than allowed", short: "too little passes" },
  transmissionHigh: { note: "More passes the sample than allowed", short: "too much passes" },
  overDose: { note: "Over the dose limit", short: "over the dose limit" },
  overTime: { note: "Over the time limit", short: "over the time limit" },
};
