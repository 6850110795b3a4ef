/** What a plan computes with, in SI units and eV: sample, setup, use of the images, limits. */
import type { Projection } from "../geometry.ts";
import type { Material } from "../material.ts";
import type { TabulationKey } from "../scattering.ts";
import type { Shape } from "../shapes.ts";

export type Use = "absorption" | "direct" | "retrieval" | "tomography";
export type Objective = "dose" | "time" | "fluence";

/** Defaults of PHYSICS 5 and 6. */
export const ROSE_THRESHOLD = 5;
export const DEFAULT_MINIMUM_COUNTS = 100;
export const DEFAULT_NEAR_FIELD_LIMIT = 0.8;

export interface Layer {
  readonly material: Material;
  readonly thicknessM: number;
  readonly position: "before" | "after";
}

/** A material with the relative uncertainty of its density (0.01: 1 %). */
export interface StatedDensity {
  readonly material: Material;
  readonly densityUncertainty: number;
}

export interface Sample {
  readonly feature: StatedDensity;
  readonly shape: Shape;
  readonly host: StatedDensity;
  readonly hostThicknessM: number;
  readonly layers: readonly Layer[];
}

/** Share of photons detected: a number; a screen or sensor; or null for the default screen (detector.ts). */
export type DetectorEfficiency =
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "screen"; readonly material: Material; readonly thicknessM: number };

export interface Setup extends Projection {
  readonly efficiency: DetectorEfficiency | null;
  /** FWHM of the photon spectrum over its energy, 0 to 0.6. */
  readonly bandwidth: number;
  /** Photons per second and m² at the first layer: one number, or rows of [eV, flux], ascending; null: not known. */
  readonly fluxPerSM2: number | readonly (readonly [number, number])[] | null;
}

export interface PlanLimits {
  readonly doseGy: number | null;
  readonly timeS: number | null;
  readonly transmission: readonly [number, number] | null;
}

export interface PlanTask {
  readonly sample: Sample;
  readonly setup: Setup;
  readonly use: Use;
  readonly threshold: number;
  readonly minimumCounts: number;
  readonly nearFieldLimit: number;
  /** Of a tomography; null for ⌈π/2 · host thickness / p⌉. */
  readonly projections: number | null;
  readonly objective: Objective;
  readonly limits: PlanLimits;
  readonly tabulation: TabulationKey;
}

/** Host thinner than this in mass cannot carry a dose that anyone asks for: the feature's counts (gas or vacuum). */
export const THIN_HOST_KG_PER_M3 = 10;

/** True where objective, limit and advantage speak of the feature's own dose: a host below 0.01 g/cm³. */
export const countsFeatureDose = (sample: Sample): boolean => sample.host.material.densityKgPerM3 < THIN_HOST_KG_PER_M3;

/** Thickness of the layers on one side of the host, m. */
export function layersM(sample: Sample, position: "before" | "after"): number {
  return sample.layers.reduce((sum, layer) => sum + (layer.position === position ? layer.thicknessM : 0), 0);
}

/** Shortest distance from the middle of the sample at which a detector stands outside it, L/2 and the layers behind. */
export const closestDistanceM = (sample: Sample): number => sample.hostThicknessM / 2 + layersM(sample, "after");
