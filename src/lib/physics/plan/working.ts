/**
 * Why one technique needs less dose than the other: the ratio of two doses as factors that multiply to it. With n = k²/(ηT S) and
 * dose = n × dose per photon, the factors are those of S (how strong the contrast is, how much of the image carries it, how the use
 * reads it), of ηT, of the dose each photon leaves, and of a count floor where one decides.
 */
import { frequencyBand } from "../band.ts";
import { absorptionSums } from "../transfer.ts";
import type { PointFigures } from "./figures.ts";
import { contrastProfile, largestContrast } from "./profile.ts";
import { acrossM } from "../shapes.ts";
import { countedDosePerFluence } from "./point.ts";
import type { PlanTask } from "./task.ts";

export interface WorkingSide {
  /** kΔδ d in rad and Δμ d of the feature's middle. */
  readonly phaseShiftRad: number;
  readonly opticalDepth: number;
  /** Largest |C| in the image. */
  readonly contrast: number;
  /** S/C²: the area of image that carries it, m². */
  readonly carriedByM2: number;
  /** Ranked signal over S. */
  readonly readShare: number;
  readonly transmission: number;
  readonly efficiency: number;
  /** Gy m². */
  readonly dosePerFluence: number;
  /** Fluence needed over what detectability alone needs. */
  readonly countsFactor: number;
  readonly doseGy: number;
}

export interface Working {
  readonly phase: WorkingSide;
  readonly absorption: WorkingSide;
  /** Each times less dose with phase; they multiply to `ratio`. */
  readonly factors: {
    readonly contrast: number;
    readonly area: number;
    readonly reading: number;
    readonly through: number;
    readonly dosePerPhoton: number;
    readonly counts: number;
  };
  /** Absorption's dose over phase's. */
  readonly ratio: number;
}

/** The working of a phase point against an absorption point; null where either has no dose. */
export function workingOf(task: PlanTask, phase: PointFigures, absorption: PointFigures): Working | null {
  const [first, second] = [sideOf(task, phase, true), sideOf(task, absorption, false)];
  if (!first || !second) return null;
  return {
    phase: first,
    absorption: second,
    factors: {
      contrast: (first.contrast / second.contrast) ** 2,
      area: first.carriedByM2 / second.carriedByM2,
      reading: first.readShare / second.readShare,
      through: (first.transmission * first.efficiency) / (second.transmission * second.efficiency),
      dosePerPhoton: second.dosePerFluence / first.dosePerFluence,
      counts: second.countsFactor / first.countsFactor,
    },
    ratio: second.doseGy / first.doseGy,
  };
}

function sideOf(task: PlanTask, figures: PointFigures, phase: boolean): WorkingSide | null {
  const { beam, geometry, rankedSignalM2, fluencePerM2 } = figures;
  const { shape } = task.sample;
  const dosePerFluence = countedDosePerFluence(task, beam);
  const band = frequencyBand("signal", shape, geometry);
  const signal = phase ? figures.signalM2 : band && absorptionSums(band).first * beam.absorptionPerM ** 2;
  if (!signal || rankedSignalM2 === null || fluencePerM2 === null || !dosePerFluence) return null;
  const contrast = phase
    ? largestContrast(shape, geometry, beam)
    : Math.max(
        ...contrastProfile(shape, geometry, beam, [0, acrossM(shape) / 4], { phase: false }).map((value) =>
          Math.abs(value),
        ),
      );
  const detectability = task.threshold ** 2 / (beam.efficiency * beam.transmission * rankedSignalM2);
  return {
    phaseShiftRad: ((2 * Math.PI) / beam.wavelengthM) * beam.deltaDelta * shape.sizeM,
    opticalDepth: beam.absorptionPerM * shape.sizeM,
    contrast,
    carriedByM2: signal / contrast ** 2,
    readShare: rankedSignalM2 / signal,
    transmission: beam.transmission,
    efficiency: beam.efficiency,
    dosePerFluence,
    countsFactor: fluencePerM2 / detectability,
    doseGy: dosePerFluence * fluencePerM2,
  };
}
