/** Dose per fluence (PHYSICS 5): D/n = E μ_en/ρ, before any build-up of scatter, in electron equilibrium. */
import { ELEMENTARY_CHARGE } from "./constants.ts";
import type { OpticalConstants } from "./optical-constants.ts";

/**
 * Absorbed dose per photon fluence in Gy m², at the surface of a material of `densityKgPerM3` > 0; null for vacuum.
 * A planning estimate for objects, not dosimetry.
 */
export function dosePerFluenceGyM2(constants: OpticalConstants, densityKgPerM3: number): number | null {
  if (!(densityKgPerM3 > 0)) return null;
  return (constants.energyEv * ELEMENTARY_CHARGE.value * constants.muEnergyAbsorptionPerM) / densityKgPerM3;
}
