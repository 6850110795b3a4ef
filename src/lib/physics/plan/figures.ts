/** Every figure of one point of a plan, for phase contrast or for absorption alone (PHYSICS 4–6, 8). SI units. */
import { frequencyBand } from "../band.ts";
import { type Edge } from "../edges.ts";
import { FWHM_PER_SIGMA, type Geometry } from "../geometry.ts";
import { acrossM } from "../shapes.ts";
import { bandSums } from "../transfer.ts";
import type { Beam } from "./beam.ts";
import { retrievalGains } from "./gains.ts";
import {
  absorptionSignalM2,
  type Forbidden,
  forbiddenByLimits,
  forbiddenByPlace,
  forbiddenByUse,
  type Lane,
  nearFieldMeasure,
  needOf,
  objectiveOf,
  rankedSignalM2,
} from "./point.ts";
import type { PlanTask } from "./task.ts";
import { type Check, checksOf } from "./warnings.ts";

export type Technique = "phase" | "absorption";

export interface PointFigures {
  readonly technique: Technique;
  readonly forbiddenBy: Forbidden | null;
  readonly energyEv: number;
  readonly geometry: Geometry;
  readonly beam: Beam;
  readonly nearFieldMeasure: number;
  /** FWHM²/(λR') and d²/(λR'), d across the beam (a layer: its width); null at R' = 0. */
  readonly fresnelResolution: number | null;
  readonly fresnelFeature: number | null;
  /** S with phase (the ideal observer's), what the use ranks, and its absorption form, m². */
  readonly signalM2: number | null;
  readonly rankedSignalM2: number | null;
  readonly absorptionSignalM2: number | null;
  /** Of the whole measurement. */
  readonly fluencePerM2: number | null;
  readonly absorptionFluencePerM2: number | null;
  readonly countsDecide: boolean;
  readonly images: number;
  /** Of one image. */
  readonly countsPerPixel: number | null;
  readonly entranceDoseGy: number | null;
  readonly meanDoseGy: number | null;
  readonly featureDoseGy: number | null;
  readonly absorptionEntranceDoseGy: number | null;
  readonly timeS: number | null;
  readonly objective: number | null;
  /** |Δμ| d √N of one image in contact; gains of retrieval in image and slice. */
  readonly cnrContactPerPixel: number | null;
  readonly gain2d: number;
  readonly gainCt: number;
  readonly checks: readonly Check[];
}

const scratch = { first: 0, second: 0 };

/** @param nearEdge the edge whose band holds the energy, or null */
export function pointFigures(
  task: PlanTask,
  lane: Lane,
  beam: Beam,
  nearEdge: Edge | null,
  technique: Technique,
): PointFigures {
  const { geometry } = lane;
  const { shape } = task.sample;
  const absorption = absorptionSignalM2(lane, beam);
  const ranked = technique === "absorption" ? absorption : rankedSignalM2(task, lane, beam);
  const need = needOf(task, lane, beam, ranked);
  const absorptionNeed = needOf(task, lane, beam, absorption);
  const fluencePerM2 = need?.fluencePerM2 ?? null;
  const band = frequencyBand("signal", shape, geometry);
  const signal = band && bandSums(band, beam, geometry.effectiveDistanceM, 0, scratch).first;
  const spread = beam.wavelengthM * geometry.effectiveDistanceM;
  const countsPerPixel =
    fluencePerM2 === null
      ? null
      : (beam.efficiency * beam.transmission * lane.pixelAreaM2 * fluencePerM2) / lane.images;
  const gains = retrievalGains(Math.PI * spread * beam.filterGamma * geometry.nyquistPerM * geometry.nyquistPerM);
  const measure = nearFieldMeasure(geometry, beam);
  const asAbsorption: PlanTask = technique === "absorption" ? { ...task, use: "absorption" } : task;
  const forbiddenBy =
    forbiddenByPlace(lane, beam, nearEdge !== null) ??
    forbiddenByUse(asAbsorption, lane, beam) ??
    forbiddenByLimits(task, beam, need);
  const times = (perFluence: number | null, fluence: number | null): number | null =>
    perFluence === null || fluence === null ? null : perFluence * fluence;
  const entranceDoseGy = times(beam.hostDosePerFluence, fluencePerM2);
  return {
    technique,
    forbiddenBy,
    energyEv: beam.energyEv,
    geometry,
    beam,
    nearFieldMeasure: measure,
    fresnelResolution: spread > 0 ? (FWHM_PER_SIGMA * geometry.sigmaM) ** 2 / spread : null,
    fresnelFeature: spread > 0 ? acrossM(shape) ** 2 / spread : null,
    signalM2: signal !== null && signal > 0 ? signal : null,
    rankedSignalM2: ranked,
    absorptionSignalM2: absorption,
    fluencePerM2,
    absorptionFluencePerM2: absorptionNeed?.fluencePerM2 ?? null,
    countsDecide: need?.byCounts ?? false,
    images: lane.images,
    countsPerPixel,
    entranceDoseGy,
    meanDoseGy: times(beam.meanDoseShare, entranceDoseGy),
    featureDoseGy: times(beam.featureDosePerFluence, fluencePerM2),
    absorptionEntranceDoseGy: times(beam.hostDosePerFluence, absorptionNeed?.fluencePerM2 ?? null),
    timeS: fluencePerM2 === null || beam.fluxPerSM2 === null ? null : fluencePerM2 / beam.fluxPerSM2,
    objective: objectiveOf(task, beam, need),
    cnrContactPerPixel:
      countsPerPixel === null ? null : Math.abs(beam.absorptionPerM) * shape.sizeM * Math.sqrt(countsPerPixel),
    gain2d: gains.image,
    gainCt: gains.tomography,
    checks: checksOf({
      task: asAbsorption,
      lane,
      beam,
      nearEdge,
      measure,
      countsPerPixel,
      countsDecide: need?.byCounts ?? false,
    }),
  };
}
