/** A field of a plan's question read as it is typed: the value in words, or what is wrong with the text. */
import {
  distanceText,
  doseText,
  energyText,
  lengthText,
  percentText,
  rounded,
  timeText,
} from "#src/lib/format/plan-quantities.ts";
import { QuantityError } from "#src/lib/quantities/index.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import type { StatedSetup } from "#src/lib/schemas/plan.ts";
import { exampleSetup } from "./examples.ts";
import type { PlanQuestion } from "./question.ts";
import {
  FieldError,
  isParallel,
  layerWidth,
  OWN_RANGES,
  readFlux,
  readLength,
  readNumber,
  readPass,
  readPlanDistances,
  readPlanEnergies,
  readPositive,
  readShare,
} from "./read-fields.ts";

export interface LiveReading {
  readonly ok: boolean;
  /** The value as understood, or the fault. */
  readonly words: string;
}

/** Runs `read`; a text that cannot be read gives its fault. */
export function readLive(read: () => string): LiveReading {
  try {
    return { ok: true, words: read() };
  } catch (error) {
    if (error instanceof FieldError || error instanceof QuantityError) return { ok: false, words: error.message };
    throw error;
  }
}

/** Energies and distances that the question's setup offers by itself. */
export function offeredRanges(setup: string): Pick<StatedSetup, "energiesKeV" | "distancesM"> {
  return exampleSetup(setup)?.setup ?? OWN_RANGES;
}

/** Where "up to" begins: the middle of the host to its exit, and never in contact. */
export function closestM(question: PlanQuestion): number {
  try {
    return Math.max(readLength(question, "thickness", "mm") / 2, 0.001);
  } catch {
    return 0.001;
  }
}

const SPACE = "\u00a0";

/** "8 to 40 keV", "12, 18 and 24 keV", "7 energies from 8 to 40 keV". */
export function energiesText(energies: StatedSetup["energiesKeV"]): string {
  const ends = (from: number, to: number): string => `${rounded(from, 5)} to ${rounded(to, 5)}${SPACE}keV`;
  if (!Array.isArray(energies))
    return energies.from === energies.to ? energyText(energies.from, 5) : ends(energies.from, energies.to);
  if (energies.length > 3)
    return `${energies.length} energies from ${ends(Math.min(...energies), Math.max(...energies))}`;
  return `${joined(energies.map((energyKeV) => rounded(energyKeV, 5)))}${SPACE}keV`;
}

/** A range that begins a hundred times nearer than it ends is spoken of by its end. */
const NEAR = 0.01;

/** "up to 3 m", "50 mm to 1 m", "0.1 m, 0.3 m and 0.9 m". */
export function distancesText(distances: StatedSetup["distancesM"]): string {
  const ends = (from: number, to: number): string =>
    from <= to * NEAR ? `up to ${distanceText(to)}` : `${distanceText(from)} to ${distanceText(to)}`;
  if (!Array.isArray(distances))
    return distances.from === distances.to ? distanceText(distances.from) : ends(distances.from, distances.to);
  if (distances.length > 3)
    return `${distances.length} distances from ${distanceText(Math.min(...distances))} to ${distanceText(Math.max(...distances))}`;
  return joined(distances.map((distanceM) => distanceText(distanceM)));
}

/** "a, b and c". */
export const joined = (words: readonly string[]): string =>
  words.length < 2 ? words.join("") : `${words.slice(0, -1).join(", ")} and ${words.at(-1) as string}`;

const LENGTHS = {
  size: "um",
  length: "um",
  width: "um",
  thickness: "mm",
  source: "m",
  sourceSize: "um",
  blur: "um",
  pixel: "um",
} as const;
const NUMBERS = {
  threshold: [0.1, 1000],
  counts: [0, 1e9],
  nearField: [0.01, PLAN_LIMITS.nearField],
  projections: [1, 1_000_000],
} as const;
const MAY_BE_EMPTY: ReadonlySet<string> = new Set([
  "length",
  "energies",
  "distances",
  "bandwidth",
  "flux",
  "dose",
  "time",
  "pass",
  ...Object.keys(NUMBERS),
]);

export type LiveField =
  | keyof typeof LENGTHS
  | keyof typeof NUMBERS
  | "energies"
  | "distances"
  | "bandwidth"
  | "flux"
  | "dose"
  | "time"
  | "pass";

/** Null for a field that is empty and may be. */
export function liveReading(question: PlanQuestion, field: LiveField): LiveReading | null {
  if (question[field].trim() === "" && MAY_BE_EMPTY.has(field)) return null;
  return readLive(() => valueWords(question, field));
}

function valueWords(question: PlanQuestion, field: LiveField): string {
  switch (field) {
    case "energies":
      return energiesText(readPlanEnergies(question.energies));
    case "distances":
      return distancesText(readPlanDistances(question.distances, closestM(question)));
    case "bandwidth":
      return percentText(readShare(question, "bandwidth", 0, 0.6));
    case "flux":
      return fluxText(readFlux(question));
    case "dose":
      return doseText(readPositive(question, "dose") ?? 0);
    case "time":
      return timeText(readPositive(question, "time") ?? 0);
    case "pass":
      return `${readPass(question)
        .map((share) => rounded(share * 100))
        .join(" to ")}${SPACE}%`;
    case "threshold":
    case "counts":
    case "nearField":
    case "projections": {
      const [low, high] = NUMBERS[field];
      return rounded(readNumber(question, field, low, high) ?? 0, 7);
    }
    case "width":
      return lengthText(layerWidth(question));
    case "source":
      return isParallel(question.source) ? "a parallel beam" : distanceText(readLength(question, "source", "m"), 4);
    case "sourceSize":
    case "blur": {
      const lengthM = readLength(question, field, LENGTHS[field]);
      return lengthM === 0 ? `0${SPACE}µm` : lengthText(lengthM);
    }
    default:
      return lengthText(readLength(question, field, LENGTHS[field]));
  }
}

function fluxText(flux: ReturnType<typeof readFlux>): string {
  if (Array.isArray(flux)) return `a curve of ${flux.length} rows`;
  return `${rounded(flux ?? 0)}${SPACE}photons per s and mm²`;
}
