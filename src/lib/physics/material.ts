/**
 * Materials: what the beam meets, as mass fractions and a density. Compounds, mixtures by mass, volume or mole, solutions by
 * concentration, porous and packed matter. PHYSICS 3.
 */
import { AVOGADRO } from "./constants.ts";
import { elementByNumber } from "./elements.ts";
import { MaterialError } from "./errors.ts";
import type { Formula } from "./formula.ts";
import { gCm3FromKgPerM3 } from "./units.ts";

/** What something is made of, without how tightly it is packed. */
export interface Composition {
  /** By atomic number; they sum to 1. Empty only for vacuum. */
  readonly massFractions: ReadonlyMap<number, number>;
  /** g/mol of formula units (the mean, for mixtures of known molecules), or null where molecules are not known. */
  readonly molarMassGPerMol: number | null;
}

export interface Material extends Composition {
  readonly densityKgPerM3: number;
  /** True where the density was computed from additive volumes instead of given. */
  readonly densityEstimated: boolean;
}

/** One part of a mixture. The density is needed only by volume, or to estimate the mixture's density. */
export interface Part extends Composition {
  readonly densityKgPerM3: number | null;
}

export type MixtureBasis = "mass" | "volume" | "mole";

/** Largest density accepted, kg/m³ (50 g/cm³; osmium has 22.6). */
export const MAX_DENSITY_KG_PER_M3 = 50_000;

/** Fractions must sum to 1 within this; they are then normalised. */
export const FRACTION_SUM_TOLERANCE = 0.001;

/** No matter: every optical constant is 0. The only material of density 0. */
export const VACUUM: Material = {
  massFractions: new Map(),
  molarMassGPerMol: null,
  densityKgPerM3: 0,
  densityEstimated: false,
};

/** w_i = n_i M_i / Σ n M, from the atom counts of a formula. */
export function compositionOfFormula(formula: Formula): Composition {
  const massFractions = new Map<number, number>();
  for (const [atomicNumber, count] of formula.atoms) {
    massFractions.set(
      atomicNumber,
      (count * elementByNumber(atomicNumber).standardAtomicWeight) / formula.molarMassGPerMol,
    );
  }
  return { massFractions, molarMassGPerMol: formula.molarMassGPerMol };
}

/** A composition from element mass fractions that sum to 1 within 0.001, normalised. @throws MaterialError */
export function compositionOfMassFractions(fractions: ReadonlyMap<number, number>): Composition {
  const shares = normaliseFractions([...fractions.values()]);
  const massFractions = new Map(
    [...fractions.keys()].map((atomicNumber, index) => [atomicNumber, shares[index] as number]),
  );
  return { massFractions, molarMassGPerMol: null };
}

/** The density given back, where 0 < density ≤ 50 g/cm³. @throws MaterialError densityOutOfRange */
export function checkedDensity(densityKgPerM3: number): number {
  if (!(densityKgPerM3 > 0) || densityKgPerM3 > MAX_DENSITY_KG_PER_M3) {
    throw new MaterialError({
      code: "densityOutOfRange",
      message: `The density ${Number(gCm3FromKgPerM3(densityKgPerM3).toPrecision(6))} g/cm³ is not accepted. Give one above 0 and up to 50 g/cm³; the material vacuum stands for no matter.`,
    });
  }
  return densityKgPerM3;
}

/** Adds a density to a composition. @throws MaterialError densityOutOfRange */
export function withDensity(composition: Composition, densityKgPerM3: number, densityEstimated = false): Material {
  return { ...composition, densityKgPerM3: checkedDensity(densityKgPerM3), densityEstimated };
}

/**
 * Porous or packed matter: the density times the share of the volume that is solid (0 < share ≤ 1). The pores count as empty,
 * so that the result is low by the gas in them, about 0.001 g/cm³ for air.
 * @throws MaterialError solidFractionOutOfRange
 */
export function withSolidFraction(material: Material, solidFraction: number): Material {
  if (!(solidFraction > 0) || solidFraction > 1) {
    throw new MaterialError({
      code: "solidFractionOutOfRange",
      message: `The solid fraction ${solidFraction} is not accepted. Give a share of the volume above 0 and up to 1.`,
    });
  }
  return { ...material, densityKgPerM3: material.densityKgPerM3 * solidFraction };
}

/**
 * Fractions, each ≥ 0, that sum to 1 within 0.001, scaled to sum to exactly 1.
 * @throws MaterialError naming the sum found
 */
export function normaliseFractions(fractions: readonly number[]): number[] {
  if (fractions.length === 0)
    throw new MaterialError({ code: "noComponents", message: "The mixture has no parts. Give at least one." });
  let sum = 0;
  for (const [component, fraction] of fractions.entries()) {
    if (!(fraction >= 0)) {
      throw new MaterialError({
        code: "fractionNegative",
        component,
        message: `The fraction ${fraction} is negative. Fractions are 0 or more.`,
      });
    }
    sum += fraction;
  }
  if (sum === 0)
    throw new MaterialError({
      code: "fractionsAllZero",
      message: "All fractions are 0. Give each part its share; they sum to 1.",
    });
  if (Math.abs(sum - 1) > FRACTION_SUM_TOLERANCE) {
    throw new MaterialError({
      code: "fractionsDoNotSum",
      message: `The fractions sum to ${Number(sum.toPrecision(6))}, not to 1. They are accepted within 0.001 of 1.`,
    });
  }
  return fractions.map((fraction) => fraction / sum);
}

/** A mixture's composition and its density by additive volumes, 1/ρ = Σ w_i/ρ_i, or null where a part has no density. */
export interface Mixture {
  readonly composition: Composition;
  readonly additiveDensityKgPerM3: number | null;
}

/**
 * Mixes parts by mass (w), volume (w ∝ φρ) or mole (w ∝ xM). Fractions sum to 1 within 0.001.
 * @throws MaterialError where fractions do not sum, or a part lacks the density (volume) or molar mass (mole) it needs
 */
export function mix(parts: readonly Part[], fractions: readonly number[], basis: MixtureBasis): Mixture {
  const shares = normaliseFractions(fractions);
  refuseVacuum(parts);
  const weights = parts.map(
    (part, component) => (shares[component] as number) * weightPerShare(part, component, basis),
  );
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const massShares = weights.map((weight) => weight / total);
  return { composition: blend(parts, massShares), additiveDensityKgPerM3: additiveDensity(parts, massShares) };
}

/** One dissolved substance: mg/mL is kg/m³ of solution. */
export interface Solute {
  readonly part: Part;
  readonly concentrationKgPerM3: number;
}

/**
 * A solution from concentrations. With the solution's density the solvent fills up to it, ρ_solvent,part = ρ − Σ c; without,
 * volumes are added, ρ = Σ c + ρ_s (1 − Σ c/ρ_i), for which every part needs a density.
 * @throws MaterialError densityMissing, or concentrationTooHigh where no room is left for the solvent; component 0 is the solvent
 */
export function dissolve(solvent: Part, solutes: readonly Solute[], densityKgPerM3: number | null): Material {
  refuseVacuum([solvent, ...solutes.map(({ part }) => part)]);
  const dissolved = solutes.reduce((sum, solute) => sum + solute.concentrationKgPerM3, 0);
  let density = densityKgPerM3;
  if (density === null) {
    const volume = solutes.reduce(
      (sum, { part, concentrationKgPerM3 }, index) =>
        sum + concentrationKgPerM3 / partDensity(part, index + 1, "estimate"),
      0,
    );
    if (volume >= 1) throw tooConcentrated(dissolved);
    density = dissolved + partDensity(solvent, 0, "estimate") * (1 - volume);
  }
  const solventMass = density - dissolved;
  if (!(solventMass > 0)) throw tooConcentrated(dissolved);
  const parts = [solvent, ...solutes.map((solute) => solute.part)];
  const shares = [solventMass / density, ...solutes.map((solute) => solute.concentrationKgPerM3 / (density as number))];
  return withDensity(blend(parts, shares), density, densityKgPerM3 === null);
}

/** Electrons per m³: ρ N_A Σ w_i Z_i / M_i. */
export function electronDensityPerM3(material: Material): number {
  let molesPerKg = 0;
  for (const [atomicNumber, fraction] of material.massFractions) {
    molesPerKg += (fraction * atomicNumber) / (elementByNumber(atomicNumber).standardAtomicWeight * 1e-3);
  }
  return material.densityKgPerM3 * AVOGADRO.value * molesPerKg;
}

function refuseVacuum(parts: readonly Composition[]): void {
  const component = parts.findIndex((part) => part.massFractions.size === 0);
  if (component < 0) return;
  throw new MaterialError({
    code: "vacuumInMixture",
    component,
    message: "Vacuum cannot be a part of a mixture. Use a solid fraction below 1 for pores.",
  });
}

function tooConcentrated(dissolvedKgPerM3: number): MaterialError {
  return new MaterialError({
    code: "concentrationTooHigh",
    message: `${Number(dissolvedKgPerM3.toPrecision(6))} mg/mL of solutes leave no room for the solvent. Lower them or give the solution's density.`,
  });
}

function partDensity(part: Part, component: number, purpose: "volume" | "estimate"): number {
  if (part.densityKgPerM3 !== null) return part.densityKgPerM3;
  const reason =
    purpose === "volume" ? "Shares by volume need it" : "The density of the whole is to be estimated from it";
  throw new MaterialError({
    code: "densityMissing",
    component,
    message: `Part ${component + 1} has no density. ${reason}: give it, or give the density of the whole.`,
  });
}

function weightPerShare(part: Part, component: number, basis: MixtureBasis): number {
  if (basis === "mass") return 1;
  if (basis === "volume") return partDensity(part, component, "volume");
  if (part.molarMassGPerMol === null) {
    throw new MaterialError({
      code: "molarMassMissing",
      component,
      message: `Part ${component + 1} is known by mass only, so it has no molar mass. Count it by mass or volume, or give its formula.`,
    });
  }
  return part.molarMassGPerMol;
}

function blend(parts: readonly Composition[], massShares: readonly number[]): Composition {
  const massFractions = new Map<number, number>();
  let molesPerGram: number | null = 0;
  for (const [index, part] of parts.entries()) {
    const share = massShares[index] as number;
    for (const [atomicNumber, fraction] of part.massFractions) {
      massFractions.set(atomicNumber, (massFractions.get(atomicNumber) ?? 0) + share * fraction);
    }
    if (molesPerGram !== null)
      molesPerGram = part.molarMassGPerMol === null ? null : molesPerGram + share / part.molarMassGPerMol;
  }
  for (const [atomicNumber, fraction] of massFractions) if (fraction === 0) massFractions.delete(atomicNumber);
  return { massFractions, molarMassGPerMol: molesPerGram === null ? null : 1 / molesPerGram };
}

function additiveDensity(parts: readonly Part[], massShares: readonly number[]): number | null {
  let volumePerKg = 0;
  for (const [index, part] of parts.entries()) {
    if (part.densityKgPerM3 === null) return null;
    volumePerKg += (massShares[index] as number) / part.densityKgPerM3;
  }
  return 1 / volumePerKg;
}
