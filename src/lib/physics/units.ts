/**
 * The only place where units are converted. Inside the core: SI units and eV. At the edges (pages, API): keV, Å, µm, mm,
 * g/cm³, 1/cm. Every name states its unit, so that nothing crosses a boundary without one.
 */
import { PLANCK_TIMES_LIGHT } from "./constants.ts";

/** Wavelength λ = h c / E, in metres, of a photon energy in eV (> 0). */
export function wavelengthM(energyEv: number): number {
  return PLANCK_TIMES_LIGHT.value / energyEv;
}

/** Photon energy E = h c / λ, in eV, of a wavelength in metres (> 0). */
export function energyEvFromWavelength(lengthM: number): number {
  return PLANCK_TIMES_LIGHT.value / lengthM;
}

export const EV_PER_KEV = 1000;
export const M_PER_ANGSTROM = 1e-10;
export const M2_PER_BARN = 1e-28;
export const KG_PER_M3_PER_G_PER_CM3 = 1000;

export const evFromKev = (energyKeV: number): number => energyKeV * EV_PER_KEV;
export const kevFromEv = (energyEv: number): number => energyEv / EV_PER_KEV;
export const angstromFromM = (lengthM: number): number => lengthM / M_PER_ANGSTROM;
export const kgPerM3FromGCm3 = (densityGCm3: number): number => densityGCm3 * KG_PER_M3_PER_G_PER_CM3;
export const gCm3FromKgPerM3 = (densityKgPerM3: number): number => densityKgPerM3 / KG_PER_M3_PER_G_PER_CM3;
/** 1/m to 1/cm. */
export const perCmFromPerM = (perM: number): number => perM / 100;
/** 1/cm to 1/m. */
export const perMFromPerCm = (perCm: number): number => perCm * 100;
/** m² per atom to cm² per gram, for an atomic weight in g/mol. */
export const cm2PerGFromM2PerAtom = (crossSectionM2: number, avogadroPerMol: number, weightGPerMol: number): number =>
  (crossSectionM2 * 1e4 * avogadroPerMol) / weightGPerMol;
