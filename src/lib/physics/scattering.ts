/**
 * Scattering-factor tables as plain values, and their interpolation.
 *
 * A tabulation gives, for each element, f1 and f2 (electrons) on an ascending grid of photon energies. An absorption edge
 * is an energy that stands twice: the row just below, then the row just above. EPDL97 rows also carry the coherent,
 * incoherent and energy-absorption cross sections per atom.
 */
export const TABULATION_KEYS = ["epdl97", "henke93", "chantler95"] as const;
export type TabulationKey = (typeof TABULATION_KEYS)[number];
export const DEFAULT_TABULATION: TabulationKey = "epdl97";

export interface ElementFactors {
  readonly atomicNumber: number;
  /** Ascending, eV; an edge is a repeated energy, below then above. */
  readonly energiesEv: Float64Array;
  /** Electrons; NaN where the source has no value. */
  readonly f1: Float64Array;
  readonly f2: Float64Array;
  /** m² per atom; null for tabulations that do not carry them. */
  readonly coherentM2: Float64Array | null;
  readonly incoherentM2: Float64Array | null;
  readonly energyAbsorptionM2: Float64Array | null;
}

export interface Tabulation {
  readonly key: TabulationKey;
  /** By atomic number; an element that is missing has no entry. */
  readonly elements: ReadonlyMap<number, ElementFactors>;
  /** Energies the tabulation covers as a whole, eV. */
  readonly rangeEv: readonly [number, number];
}

export interface EmissionLine {
  /** IUPAC notation, such as "K-L3". */
  readonly line: string;
  readonly energyEv: number;
  /** Share of the shell's radiative vacancies, 0 to 1. */
  readonly rate: number;
}

export interface Shell {
  readonly shell: string;
  readonly edgeEnergyEv: number;
  /** Photons per vacancy, or null where the source gives none. */
  readonly fluorescenceYield: number | null;
  readonly lines: readonly EmissionLine[];
}

export interface ScatteringTables {
  readonly version: string;
  readonly tabulations: Readonly<Record<TabulationKey, Tabulation>>;
  /** Edges, yields and lines by atomic number, highest edge first. */
  readonly shells: ReadonlyMap<number, readonly Shell[]>;
}
