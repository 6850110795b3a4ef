/** Where no point is allowed: the one that misses by least, and single changes that would let a point in. */
import { doseGy, leastDetailM, type Lane, type RankedPlan } from "#src/lib/physics/index.ts";
import {
  distanceText,
  doseText,
  energyText,
  lengthText,
  percentText,
  rounded,
  timeText,
} from "#src/lib/format/plan-quantities.ts";
import { OBJECTIVE_WORDS, objectiveText } from "./verdict-words.ts";

export interface Miss {
  readonly words: string;
  /** Each alone is enough. */
  readonly changes: readonly string[];
}

const BY_LIMIT = new Set(["overDose", "overTime", "transmissionLow", "transmissionHigh"]);

/** Null where a point is allowed, or where nothing can be said (no contrast at all). */
export function missOf(ranked: RankedPlan): Miss | null {
  if (ranked.candidates.length > 0) return null;
  return limitMiss(ranked) ?? pixelMiss(ranked) ?? regimeMiss(ranked);
}

function limitMiss({ plane, task }: RankedPlan): Miss | null {
  const width = plane.grid.distancesM.length;
  let best = -1;
  for (const [place, code] of plane.forbidden.entries()) {
    if (code === null || !BY_LIMIT.has(code) || Number.isNaN(plane.objective[place]!)) continue;
    if (best < 0 || plane.objective[place]! < plane.objective[best]!) best = place;
  }
  if (best < 0) return null;
  const beam = plane.beams[Math.floor(best / width)]!;
  const lane = plane.lanes[best % width]!;
  const fluence = plane.fluencePerM2[best]!;
  const { limits } = task;
  const words = [
    `The nearest miss, ${energyText(beam.energyEv / 1000)} and ${distanceText(lane.geometry.distanceM)}, needs ${objectiveText(task.objective, plane.objective[best]!)}`,
  ];
  const changes: string[] = [];
  const dose = doseGy(task, beam, fluence);
  const time = beam.fluxPerSM2 === null ? null : fluence / beam.fluxPerSM2;
  const over: number[] = [];
  if (limits.doseGy !== null && dose !== null && dose > limits.doseGy) {
    if (task.objective !== "dose") words.push(`a dose of ${doseText(dose)}`);
    over.push(dose / limits.doseGy);
    changes.push(`Allow ${doseText(roundedUp(dose))}.`);
  }
  if (limits.timeS !== null && time !== null && time > limits.timeS) {
    if (task.objective !== "time") words.push(timeText(time));
    over.push(time / limits.timeS);
    changes.push(`Allow ${timeText(roundedUp(time))}.`);
  }
  if (changes.length === 2) changes.splice(0, 2, changes.join(" ").replace(". Allow", " and"));
  if (
    limits.transmission &&
    (beam.transmission < limits.transmission[0] || beam.transmission > limits.transmission[1])
  ) {
    words.push(`lets ${percentText(beam.transmission)} through`);
    if (over.length === 0) changes.push(`Allow ${percentText(beam.transmission)} to pass the sample.`);
  }
  const excess = Math.max(1, ...over);
  const detects =
    plane.fluencePerM2[best]! * beam.efficiency * beam.transmission * lane.pixelAreaM2 > task.minimumCounts * 1.001;
  if (excess > 1 && detects) {
    const threshold = task.threshold / Math.sqrt(excess);
    if (threshold >= 1)
      changes.push(
        `Be content with ${rounded(Math.floor(threshold * 10) / 10)} times the noise instead of ${task.threshold}.`,
      );
  }
  return { words: `${words.join(", ")}: by ${OBJECTIVE_WORDS[task.objective]} the best of the plane.`, changes };
}

/** Two digits, towards the side on which the value named is enough. */
function twoDigits(value: number, towards: typeof Math.ceil): number {
  const unit = 10 ** (Math.floor(Math.log10(value)) - 1);
  return Number((towards(Number((value / unit).toPrecision(12))) * unit).toPrecision(2));
}
const roundedUp = (value: number): number => twoDigits(value, Math.ceil);
const roundedDown = (value: number): number => twoDigits(value, Math.floor);

function pixelMiss({ plane, task }: RankedPlan): Miss | null {
  const outside = plane.lanes.filter((lane) => !lane.insideSample);
  if (outside.length === 0 || outside.some((lane) => !lane.undersampled)) return null;
  const best = outside.reduce((finest: Lane, lane) => (lane.geometry.pixelM < finest.geometry.pixelM ? lane : finest));
  const largestM = leastDetailM(task) / 3;
  const { magnification } = best.geometry;
  const changes = [`Take detector pixels of ${lengthText(roundedDown(largestM * magnification))} or less.`];
  if (task.setup.sourceDistanceM !== null)
    changes.push(
      `Magnify ${rounded(roundedUp(task.setup.pixelM / largestM), 2)} × or more: source closer, or detector further away.`,
    );
  changes.push(`Look for features of ${lengthText(roundedUp(3 * best.geometry.pixelM))} or more.`);
  return {
    words: `Pixels are ${lengthText(best.geometry.pixelM)} in the sample at best; three must fit across the feature, so ${lengthText(largestM)} is the most.`,
    changes,
  };
}

function regimeMiss({ plane, task }: RankedPlan): Miss | null {
  const codes = new Set(plane.forbidden);
  if (codes.has("nearFieldLeft"))
    return {
      words: `The near-field measure is above ${task.nearFieldLimit} at every distance that is long enough for the detector.`,
      changes: [
        "Allow shorter distances or harder energies.",
        "Take larger pixels.",
        "Look at the images directly instead of retrieving.",
      ],
    };
  if (codes.has("contrastReversal"))
    return {
      words: "Contrast turns over within the resolved band at every distance.",
      changes: [
        "Allow shorter distances or harder energies.",
        "Take larger pixels, which resolve less.",
        "Retrieve the images instead of looking at them.",
      ],
    };
  if (codes.has("insideSample"))
    return {
      words: "The detector would stand inside the sample at every distance.",
      changes: [`Allow distances beyond ${distanceText(roundedUp(task.sample.hostThicknessM / 2))} from its middle.`],
    };
  return null;
}
