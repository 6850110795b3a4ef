/**
 * Physical constants as records: symbol, value, unit, uncertainty, source.
 * Source of all: CODATA 2022 (Mohr et al., Rev. Mod. Phys. 97, 025002 (2025)).
 */
export interface PhysicalConstant {
  readonly symbol: string;
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  /** Standard uncertainty in `unit`; 0 where the SI fixes the value. */
  readonly uncertainty: number;
  readonly source: string;
}

const CODATA = "CODATA 2022";

export const CLASSICAL_ELECTRON_RADIUS: PhysicalConstant = {
  symbol: "r_e",
  name: "classical electron radius",
  value: 2.8179403205e-15,
  unit: "m",
  uncertainty: 1.3e-24,
  source: CODATA,
};

export const AVOGADRO: PhysicalConstant = {
  symbol: "N_A",
  name: "Avogadro constant",
  value: 6.02214076e23,
  unit: "1/mol",
  uncertainty: 0,
  source: CODATA,
};

/** h c in eV m: 12.398419843320026 keV Å, exact in the SI. */
export const PLANCK_TIMES_LIGHT: PhysicalConstant = {
  symbol: "h c",
  name: "Planck constant times speed of light",
  value: 1.2398419843320026e-6,
  unit: "eV m",
  uncertainty: 0,
  source: CODATA,
};

export const ELECTRON_REST_ENERGY: PhysicalConstant = {
  symbol: "m_e c²",
  name: "electron rest energy",
  value: 510998.95069,
  unit: "eV",
  uncertainty: 1.6e-4,
  source: CODATA,
};

export const ELEMENTARY_CHARGE: PhysicalConstant = {
  symbol: "e",
  name: "elementary charge",
  value: 1.602176634e-19,
  unit: "C",
  uncertainty: 0,
  source: CODATA,
};

export const CONSTANTS: readonly PhysicalConstant[] = [
  CLASSICAL_ELECTRON_RADIUS,
  AVOGADRO,
  PLANCK_TIMES_LIGHT,
  ELECTRON_REST_ENERGY,
  ELEMENTARY_CHARGE,
];
