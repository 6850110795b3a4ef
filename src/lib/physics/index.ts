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
