/**
 * One point of a plan, an energy at a distance: signals, fluence, dose, and whether the use allows it (PHYSICS 5, 6, 8).
 * A lane is all that belongs to one distance; a plane walks its lanes, a single point makes one.
 */
import { type Band, frequencyBand } from "../band.ts";
import { type Geometry, geometryAt } from "../geometry.ts";
import { acrossM, layerRingPower } from "../shapes.ts";
import { absorptionSums, type BandSums, bandSums } from "../transfer.ts";
import type { Beam } from "./beam.ts";
import { closestDistanceM, countsFeatureDose, layersM, type PlanTask, type Use } from "./task.ts";

export interface Lane {
  readonly geometry: Geometry;
  /** Images of the whole measurement: projections of a tomography, 1 otherwise. */
  readonly images: number;
  /** What the use ranks; null where its band is empty. */
  readonly ranked: Band | null;
  /** Signal of absorption alone over Δμ²: S for absorption and direct, S_eff for retrieval, S_CT for tomography. */
  readonly absorptionPerContrast: number | null;
  readonly undersampled: boolean;
  readonly insideSample: boolean;
  /** p² in the plane of the sample. */
  readonly pixelAreaM2: number;
}

/** What lanes of one task share. */
export interface LaneMaker {
  (distanceM: number): Lane;
}

export function laneMaker(task: PlanTask): LaneMaker {
  const { sample, setup, use } = task;
  const { shape } = sample;
  const ring = shape.kind === "layer" && use === "tomography" ? layerRingPower(shape.sizeM, shape.widthM) : undefined;
  return (distanceM) => {
    const geometry = geometryAt(setup, distanceM);
    const ranked = frequencyBand(bandKind(use), shape, geometry, ring);
    return {
      geometry,
      images:
        use === "tomography" ? (task.projections ?? defaultProjections(sample.hostThicknessM, geometry.pixelM)) : 1,
      ranked,
      absorptionPerContrast: ranked && signalOf(use, lengthOf(task), absorptionSums(ranked)),
      undersampled: geometry.pixelM > (leastDetailM(task) / 3) * (1 + 1e-12),
      insideSample: distanceM < closestDistanceM(sample) * (1 - 1e-12),
      pixelAreaM2: geometry.pixelM * geometry.pixelM,
    };
  };
}

const bandKind = (use: Use) => (use === "retrieval" ? "neighbourhood" : use === "tomography" ? "volume" : "signal");

/** ⌈π/2 · host thickness / p⌉. */
export const defaultProjections = (hostThicknessM: number, pixelM: number): number =>
  Math.max(1, Math.ceil(((Math.PI / 2) * hostThicknessM) / pixelM - 1e-9));

/** What three pixels must span: the width across the beam; in a tomography also a layer's depth. */
export function leastDetailM({ sample: { shape }, use }: PlanTask): number {
  return shape.kind === "layer" && use === "tomography" ? Math.min(shape.sizeM, shape.widthM) : acrossM(shape);
}

/** Visible length that tomography sums over; 1 for a sphere. */
function lengthOf({ sample: { shape } }: PlanTask): number {
  return shape.kind === "sphere" ? 1 : shape.lengthM;
}

/** Signal in m² from the sums: S itself, or the non-prewhitening observer's first²/second (PHYSICS 8). */
function signalOf(use: Use, lengthM: number, { first, second }: BandSums): number | null {
  if (use === "absorption" || use === "direct") return first > 0 ? first : null;
  if (!(first > 0 && second > 0)) return null;
  return ((use === "tomography" ? lengthM : 1) * first * first) / second;
}

const sums: BandSums = { first: 0, second: 0 };

/** What the use ranks at the point, m²; null where there is none (no contrast, or too few pixels). */
export function rankedSignalM2(task: PlanTask, lane: Lane, beam: Beam): number | null {
  const { ranked, geometry } = lane;
  if (!ranked) return null;
  if (task.use === "absorption") return absorptionSignalM2(lane, beam);
  const filter = task.use === "direct" ? 0 : beam.filterGamma;
  bandSums(ranked, beam, geometry.effectiveDistanceM, filter, sums);
  return signalOf(task.use, lengthOf(task), sums);
}

/** The same without phase (Δδ = 0, χ = 0, H = 1). */
export function absorptionSignalM2(lane: Lane, beam: Beam): number | null {
  if (lane.absorptionPerContrast === null) return null;
  const signal = beam.absorptionPerM * beam.absorptionPerM * lane.absorptionPerContrast;
  return signal > 0 ? signal : null;
}

/** Photons per m² that enter the first layer in the whole measurement. */
export interface Need {
  readonly fluencePerM2: number;
  /** True where the count floor decides, not detectability. */
  readonly byCounts: boolean;
}

/** n = k²/(η T S), not below the count floor N_min/(η T p²), of the sum over projections; null where no photon arrives. */
export function needOf(task: PlanTask, lane: Lane, beam: Beam, signalM2: number | null): Need | null {
  const through = beam.efficiency * beam.transmission;
  if (signalM2 === null || !(through > 0)) return null;
  const detect = (task.threshold * task.threshold) / (through * signalM2);
  const count = task.minimumCounts / (through * lane.pixelAreaM2);
  const fluencePerM2 = Math.max(detect, count);
  return Number.isFinite(fluencePerM2) && fluencePerM2 > 0 ? { fluencePerM2, byCounts: count > detect } : null;
}

/** Gy m² of the dose that limits and objective speak of: the host's at its entrance, the feature's own in gas or vacuum. */
export const countedDosePerFluence = ({ sample }: Pick<PlanTask, "sample">, beam: Beam): number | null =>
  countsFeatureDose(sample) ? beam.featureDosePerFluence : beam.hostDosePerFluence;

/** That dose for a fluence, Gy; null where there is no matter to take it. */
export function doseGy(task: PlanTask, beam: Beam, fluencePerM2: number): number | null {
  const perFluence = countedDosePerFluence(task, beam);
  return perFluence === null ? null : perFluence * fluencePerM2;
}

/** The request's objective in its own unit: Gy, s or 1/m². */
export function objectiveOf(task: PlanTask, beam: Beam, need: Need | null): number | null {
  if (need === null) return null;
  if (task.objective === "fluence") return need.fluencePerM2;
  if (task.objective === "dose") return doseGy(task, beam, need.fluencePerM2);
  return beam.fluxPerSM2 === null ? null : need.fluencePerM2 / beam.fluxPerSM2;
}

/** π λ R' u_res². */
export function nearFieldMeasure(geometry: Geometry, beam: Beam): number {
  return Math.PI * beam.wavelengthM * geometry.effectiveDistanceM * geometry.resolutionPerM ** 2;
}

/** For γ below this in absolute value an opposed pair's first zero counts. */
export const EARLY_ZERO_BELOW = 20;

/**
 * χ of the first zero of cos χ + γ sin χ that counts as a reversal of contrast (PHYSICS 6): π − arctan(1/γ) for γ > 0; for γ < 0
 * arctan(1/|γ|) where |γ| < 20, else the zero after it; π without absorption contrast (γ null).
 */
export function firstReversal(gamma: number | null): number {
  if (gamma === null) return Math.PI;
  if (gamma === 0) return Math.PI / 2;
  const early = Math.atan(1 / Math.abs(gamma));
  if (gamma > 0) return Math.PI - early;
  return -gamma < EARLY_ZERO_BELOW ? early : Math.PI + early;
}

export type Forbidden =
  | "insideSample"
  | "notInTable"
  | "nearEdge"
  | "undersampled"
  | "contrastReversal"
  | "nearFieldLeft"
  | "transmissionLow"
  | "transmissionHigh"
  | "overDose"
  | "overTime";

/** Rounding must not forbid what stands exactly at a limit. */
const SLACK = 1 + 1e-9;

/** What geometry, pixels and edges forbid, whatever the technique; the first that holds. */
export function forbiddenByPlace(lane: Lane, beam: Beam | null, nearEdge: boolean): Forbidden | null {
  if (lane.insideSample) return "insideSample";
  if (beam === null) return "notInTable";
  if (nearEdge) return "nearEdge";
  return lane.undersampled || lane.ranked === null ? "undersampled" : null;
}

/** What the regime of the use forbids. */
export function forbiddenByUse(task: PlanTask, lane: Lane, beam: Beam): Forbidden | null {
  if (task.use === "absorption") return null;
  const measure = nearFieldMeasure(lane.geometry, beam);
  if (task.use === "direct") return measure > 0 && measure >= firstReversal(beam.gamma) ? "contrastReversal" : null;
  return measure > task.nearFieldLimit * SLACK ? "nearFieldLeft" : null;
}

/** Which of the stated limits the point breaks. Doses and times without a value break none. */
export function forbiddenByLimits(task: PlanTask, beam: Beam, need: Need | null): Forbidden | null {
  const { transmission, doseGy: mostGy, timeS } = task.limits;
  if (transmission && beam.transmission < transmission[0] / SLACK) return "transmissionLow";
  if (transmission && beam.transmission > transmission[1] * SLACK) return "transmissionHigh";
  if (need === null) return null;
  const dose = doseGy(task, beam, need.fluencePerM2);
  if (mostGy !== null && dose !== null && dose > mostGy * SLACK) return "overDose";
  const time = beam.fluxPerSM2 === null ? null : need.fluencePerM2 / beam.fluxPerSM2;
  if (timeS !== null && time !== null && time > timeS * SLACK) return "overTime";
  return null;
}

/** R1 at least: the source must stand before the sample, L/2 and the layers before its middle. */
export const leastSourceDistanceM = (task: Pick<PlanTask, "sample">): number =>
  task.sample.hostThicknessM / 2 + layersM(task.sample, "before");
