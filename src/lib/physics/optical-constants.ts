/**
 * Optical constants of a material, n = 1 − δ + iβ (PHYSICS 3).
 *
 * δ = r_e λ²/(2π) Σ n_i f1_i, β = r_e λ²/(2π) Σ n_i f2_i, n_i = ρ N_A w_i / M_i.
 * What attenuates an image is μ_total = μ_photo + μ_coherent + μ_incoherent, not 4πβ/λ alone; β_eff = μ_total λ/(4π).
 */
import { AVOGADRO, CLASSICAL_ELECTRON_RADIUS, PLANCK_TIMES_LIGHT } from "./constants.ts";
import { elementByNumber } from "./elements.ts";
import { factorsAt, type FactorsAt, logsOf } from "./interpolate.ts";
import type { Composition, Material } from "./material.ts";
import { DEFAULT_TABULATION, type ElementFactors, type ScatteringTables, type TabulationKey } from "./scattering.ts";
import { wavelengthM } from "./units.ts";

export interface OpticalConstants {
  readonly energyEv: number;
  readonly wavelengthM: number;
  readonly delta: number;
  /** From photoelectric absorption alone: μ_photo λ/(4π). */
  readonly beta: number;
  /** μ_total λ/(4π): what an image sees. */
  readonly betaEffective: number;
  readonly muPhotoPerM: number;
  readonly muCoherentPerM: number;
  readonly muIncoherentPerM: number;
  readonly muTotalPerM: number;
  /** For dose; fluorescence that a thick sample reabsorbs is not counted. */
  readonly muEnergyAbsorptionPerM: number;
  /** 1/μ_total; null for vacuum. */
  readonly attenuationLengthM: number | null;
  /** δ/β; null for vacuum. */
  readonly deltaOverBeta: number | null;
  /** 2πδ/λ, a retardation. */
  readonly phasePerM: number;
  /** √(2δ); null where δ is negative, close above strong edges at low energy. */
  readonly criticalAngleRad: number | null;
}

/** Columns over energy, one entry per energy asked for; NaN where an element is missing from the table. */
export interface ConstantsOverEnergy {
  readonly energiesEv: Float64Array;
  readonly delta: Float64Array;
  readonly beta: Float64Array;
  readonly muPhotoPerM: Float64Array;
  readonly muCoherentPerM: Float64Array;
  readonly muIncoherentPerM: Float64Array;
  readonly muEnergyAbsorptionPerM: Float64Array;
}

/**
 * The data files of `henke93` and `chantler95` hold no f2 below 1e-6 electrons. Where EPDL97 says that f2 is that small (twice it,
 * since the tables differ), its value stands in: hydrogen above some 8 keV gives 0.02 % of a polymer's β, at most 0.3 % of any
 * compound's (LiH). A larger missing f2 stays missing.
 */
const NEGLIGIBLE_F2 = 2e-6;

const TWO_PI = 2 * Math.PI;

/** r_e λ²/(2π) in m², for a photon energy in eV. */
function prefactorM2(energyEv: number): number {
  const wavelength = wavelengthM(energyEv);
  return (CLASSICAL_ELECTRON_RADIUS.value * wavelength * wavelength) / TWO_PI;
}

/** μ_photo = 4πβ/λ with β = r_e λ²/(2π) n f2, so σ_photo = 2 r_e λ f2 per atom, m². */
export function photoelectricM2(f2: number, energyEv: number): number {
  return (2 * CLASSICAL_ELECTRON_RADIUS.value * PLANCK_TIMES_LIGHT.value * f2) / energyEv;
}

interface ElementInMaterial {
  readonly atomsPerM3: number;
  readonly factors: ElementFactors | undefined;
  /** EPDL97 carries the scattering part for every tabulation. */
  readonly scattering: ElementFactors | undefined;
}

function elementsIn(material: Material, tables: ScatteringTables, tabulation: TabulationKey): ElementInMaterial[] {
  const own = tables.tabulations[tabulation].elements;
  const primary = tables.tabulations[DEFAULT_TABULATION].elements;
  return [...material.massFractions].map(([atomicNumber, fraction]) => ({
    atomsPerM3:
      (material.densityKgPerM3 * AVOGADRO.value * fraction) /
      (elementByNumber(atomicNumber).standardAtomicWeight * 1e-3),
    factors: own.get(atomicNumber),
    scattering: primary.get(atomicNumber),
  }));
}

function blankFactors(): FactorsAt {
  return {
    f1: Number.NaN,
    f2: Number.NaN,
    coherentM2: Number.NaN,
    incoherentM2: Number.NaN,
    energyAbsorptionM2: Number.NaN,
  };
}

/**
 * Constants of a material at many energies (eV, any order, repeats allowed).
 *
 * Rows are NaN outside the tabulation or where it lacks an element. Exactly at an edge the side above is taken. Vacuum gives
 * zeros. The scattering part and μ_en come from EPDL97 for every tabulation.
 *
 * @param primary columns of EPDL97 for the same material and energies, where they are known already: what the other
 * tabulations take from there is then not computed again
 */
export function constantsOverEnergy(
  material: Material,
  energiesEv: ArrayLike<number>,
  tables: ScatteringTables,
  tabulation: TabulationKey = DEFAULT_TABULATION,
  primary?: ConstantsOverEnergy,
): ConstantsOverEnergy {
  const count = energiesEv.length;
  const columns: ConstantsOverEnergy = {
    energiesEv: Float64Array.from(energiesEv),
    delta: new Float64Array(count),
    beta: new Float64Array(count),
    muPhotoPerM: new Float64Array(count),
    muCoherentPerM: primary ? primary.muCoherentPerM.slice() : new Float64Array(count),
    muIncoherentPerM: primary ? primary.muIncoherentPerM.slice() : new Float64Array(count),
    muEnergyAbsorptionPerM: primary ? primary.muEnergyAbsorptionPerM.slice() : new Float64Array(count),
  };
  const own = blankFactors();
  const other = blankFactors();
  const logEnergies = columns.energiesEv.map(Math.log);
  const prefactors = columns.energiesEv.map(prefactorM2);
  const order = ascendingOrder(columns.energiesEv);
  const [lowest, highest] = tables.tabulations[tabulation].rangeEv;
  const twoReHc = 2 * CLASSICAL_ELECTRON_RADIUS.value * PLANCK_TIMES_LIGHT.value;
  for (const { atomsPerM3, factors, scattering } of elementsIn(material, tables, tabulation)) {
    const known = factors && scattering;
    const logs = known && logsOf(factors);
    const scatteringLogs = known && logsOf(scattering);
    let hint = 0;
    let scatteringHint = 0;
    for (let step = 0; step < count; step++) {
      const i = order ? (order[step] as number) : step;
      const energyEv = columns.energiesEv[i] as number;
      if (!known || energyEv < lowest || energyEv > highest) {
        markMissing(columns, i);
        continue;
      }
      const logEnergy = logEnergies[i] as number;
      hint = factorsAt(factors, energyEv, own, hint, logEnergy, logs);
      let carrier = own;
      if (factors !== scattering && (!primary || Number.isNaN(own.f2))) {
        scatteringHint = factorsAt(scattering, energyEv, other, scatteringHint, logEnergy, scatteringLogs);
        carrier = other;
        // Hydrogen and helium at hard energies: too weak for the older tables to hold, and too weak to matter which table it is.
        if (Number.isNaN(own.f2) && carrier.f2 <= NEGLIGIBLE_F2) own.f2 = carrier.f2;
      }
      const strength = atomsPerM3 * (prefactors[i] as number);
      columns.delta[i]! += strength * own.f1;
      columns.beta[i]! += strength * own.f2;
      columns.muPhotoPerM[i]! += (atomsPerM3 * twoReHc * own.f2) / energyEv;
      if (primary) continue;
      columns.muCoherentPerM[i]! += atomsPerM3 * carrier.coherentM2;
      columns.muIncoherentPerM[i]! += atomsPerM3 * carrier.incoherentM2;
      columns.muEnergyAbsorptionPerM[i]! += atomsPerM3 * carrier.energyAbsorptionM2;
    }
  }
  return columns;
}

/** Columns of every tabulation for the same material and energies. */
export function constantsOfAllTabulations(
  material: Material,
  energiesEv: ArrayLike<number>,
  tables: ScatteringTables,
): Record<TabulationKey, ConstantsOverEnergy> {
  const epdl97 = constantsOverEnergy(material, energiesEv, tables, "epdl97");
  return {
    epdl97,
    henke93: constantsOverEnergy(material, energiesEv, tables, "henke93", epdl97),
    chantler95: constantsOverEnergy(material, energiesEv, tables, "chantler95", epdl97),
  };
}

/** Places of the energies in ascending order, which is quickest to look up; null where they ascend already. */
function ascendingOrder(energiesEv: Float64Array): Uint32Array | null {
  if (energiesEv.every((energyEv, index) => index === 0 || energyEv >= (energiesEv[index - 1] as number))) return null;
  return Uint32Array.from(energiesEv.keys()).sort((a, b) => (energiesEv[a] as number) - (energiesEv[b] as number));
}

function markMissing(columns: ConstantsOverEnergy, index: number): void {
  for (const column of [
    columns.delta,
    columns.beta,
    columns.muPhotoPerM,
    columns.muCoherentPerM,
    columns.muIncoherentPerM,
    columns.muEnergyAbsorptionPerM,
  ]) {
    column[index] = Number.NaN;
  }
}

/** Row `index` of the columns with everything that follows from it, or null where δ and β are missing there. */
export function constantsAtRow(columns: ConstantsOverEnergy, index: number): OpticalConstants | null {
  const energyEv = columns.energiesEv[index] as number;
  const delta = columns.delta[index] as number;
  const beta = columns.beta[index] as number;
  const muPhotoPerM = columns.muPhotoPerM[index] as number;
  const muCoherentPerM = columns.muCoherentPerM[index] as number;
  const muIncoherentPerM = columns.muIncoherentPerM[index] as number;
  const muTotalPerM = muPhotoPerM + muCoherentPerM + muIncoherentPerM;
  const muEnergyAbsorptionPerM = columns.muEnergyAbsorptionPerM[index] as number;
  if (!Number.isFinite(delta + beta + muTotalPerM + muEnergyAbsorptionPerM)) return null;
  const wavelength = wavelengthM(energyEv);
  return {
    energyEv,
    wavelengthM: wavelength,
    delta,
    beta,
    betaEffective: (muTotalPerM * wavelength) / (2 * TWO_PI),
    muPhotoPerM,
    muCoherentPerM,
    muIncoherentPerM,
    muTotalPerM,
    muEnergyAbsorptionPerM,
    attenuationLengthM: muTotalPerM > 0 ? 1 / muTotalPerM : null,
    deltaOverBeta: beta > 0 ? delta / beta : null,
    phasePerM: (TWO_PI * delta) / wavelength,
    criticalAngleRad: delta >= 0 ? Math.sqrt(2 * delta) : null,
  };
}

/** Constants of a material at one energy, or null outside the tabulation or where it lacks an element. */
export function opticalConstants(
  material: Material,
  energyEv: number,
  tables: ScatteringTables,
  tabulation: TabulationKey = DEFAULT_TABULATION,
): OpticalConstants | null {
  return constantsAtRow(constantsOverEnergy(material, [energyEv], tables, tabulation), 0);
}

/** Elements of a composition that a tabulation does not hold, by atomic number. */
export function missingElements(
  composition: Composition,
  tables: ScatteringTables,
  tabulation: TabulationKey,
): number[] {
  return [...composition.massFractions.keys()].filter(
    (atomicNumber) => !tables.tabulations[tabulation].elements.has(atomicNumber),
  );
}
