/** The only door of the physics core. Pure TypeScript: no dependency, no clock, no files; tables are arguments. */

// Constants, units, elements
export * from "./constants.ts";
export * from "./units.ts";
export * from "./elements.ts";

// Errors
export * from "./errors.ts";

// Formulas and materials
export * from "./formula.ts";
export * from "./material.ts";

// Tables and their interpolation
export * from "./scattering.ts";
export { factorsAt, rowBelow, type FactorsAt } from "./interpolate.ts";

// One material
export * from "./optical-constants.ts";
export * from "./edges.ts";
export * from "./spread.ts";
export * from "./attenuation.ts";
export * from "./dose.ts";

// Two materials
export * from "./pair.ts";

// Geometry, shapes and transfer
export * from "./geometry.ts";
export * from "./shapes.ts";
export { type Band, type BandKind, frequencyBand } from "./band.ts";
export { absorptionSums, bandSums, type BandSums, type BeamContrast, type BeamTerm } from "./transfer.ts";
export * from "./detector.ts";
export * from "./retrieval.ts";

// Plans: one point, the plane, the ranking
export * from "./plan/task.ts";
export { type Beam, beamsOf } from "./plan/beam.ts";
export * from "./plan/gains.ts";
export {
  countedDosePerFluence,
  defaultProjections,
  doseGy,
  EARLY_ZERO_BELOW,
  firstReversal,
  type Forbidden,
  leastDetailM,
  type Lane,
  laneMaker,
  leastSourceDistanceM,
  nearFieldMeasure,
} from "./plan/point.ts";
export * from "./plan/grid.ts";
export { type PointFigures, type Technique } from "./plan/figures.ts";
export { computePlane, type Grid, isAllowed, type Plane } from "./plan/plane.ts";
export { type Plateau, type Why } from "./plan/select.ts";
export { contrastProfile, largestContrast } from "./plan/profile.ts";
export { type Check, contrastUncertainty, type PlanWarningCode, WARNING_LIMITS } from "./plan/warnings.ts";
export * from "./plan/rank.ts";
export * from "./plan/working.ts";
