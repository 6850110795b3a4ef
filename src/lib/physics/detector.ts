/** Detector efficiency η(E) = 1 − exp(−μ_abs t), μ_abs = μ_photo + μ_incoherent of the scintillator or sensor (PHYSICS 8b). */
import type { Projection } from "./geometry.ts";
import { compositionOfFormula, withDensity, type Material } from "./material.ts";
import { parseFormula } from "./formula.ts";
import type { ConstantsOverEnergy } from "./optical-constants.ts";

/** Lutetium aluminium garnet, 6.73 g/cm³: the screen of setups that state none. */
export const DEFAULT_SCREEN: Material = withDensity(compositionOfFormula(parseFormula("Lu3Al5O12")), 6730);

/** Ten times the larger of blur and pixel: thick enough to be bright, thin enough for its resolution. */
export const defaultScreenThicknessM = ({ detectorFwhmM, pixelM }: Projection): number =>
  10 * Math.max(detectorFwhmM, pixelM);

/** Share of photons that interact in `thicknessM` of the screen, at row `index` of its constants. NaN where they are missing. */
export function screenEfficiency(constants: ConstantsOverEnergy, index: number, thicknessM: number): number {
  return -Math.expm1(-(constants.muPhotoPerM[index]! + constants.muIncoherentPerM[index]!) * thicknessM);
}
