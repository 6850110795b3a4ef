/** What each displayed quantity is called, its symbol, its unit and the paragraph of the method page that explains it. */

export type Technique = "phase" | "absorption";

export interface QuantityLabel {
  /** Full words, sentence case. */
  readonly name: string;
  /** Symbol of the field, or an empty string where words do. Split at `_`: what follows is a subscript. */
  readonly symbol: string;
  /** Unit in plain spelling for `unitParts`; empty for a pure number. */
  readonly unit: string;
  /** The technique whose mark stands beside it. */
  readonly technique: Technique | null;
  /** Id on the method page. */
  readonly anchor: string;
}

/** Keys are the field names of the API. */
export const QUANTITIES = {
  delta: { name: "Refractive-index decrement", symbol: "δ", unit: "", technique: "phase", anchor: "delta" },
  phasePerMicrometreRad: {
    name: "Phase shift",
    symbol: "2πδ/λ",
    unit: "rad/µm",
    technique: "phase",
    anchor: "phase-shift",
  },
  twoPiMicrometre: {
    name: "Thickness for 2π",
    symbol: "λ/δ",
    unit: "µm",
    technique: "phase",
    anchor: "phase-shift",
  },
  criticalAngleMrad: {
    name: "Critical angle",
    symbol: "θ_c",
    unit: "mrad",
    technique: "phase",
    anchor: "critical-angle",
  },
  deltaOverBeta: {
    name: "Ratio to the absorption index",
    symbol: "δ/β",
    unit: "",
    technique: "phase",
    anchor: "delta",
  },
  deltaOverBetaEffective: {
    name: "Ratio with scattering",
    symbol: "δ/β_eff",
    unit: "",
    technique: "phase",
    anchor: "beta-effective",
  },
  electronDensityPerA3: {
    name: "Electron density",
    symbol: "n_e",
    unit: "1/Å3",
    technique: "phase",
    anchor: "electron-density",
  },
  beta: { name: "Absorption index", symbol: "β", unit: "", technique: "absorption", anchor: "beta" },
  betaEffective: {
    name: "Effective absorption index",
    symbol: "β_eff",
    unit: "",
    technique: "absorption",
    anchor: "beta-effective",
  },
  muTotalPerCm: { name: "Attenuation, total", symbol: "μ", unit: "1/cm", technique: "absorption", anchor: "mu" },
  muPhotoPerCm: { name: "of it photoelectric", symbol: "μ_photo", unit: "1/cm", technique: "absorption", anchor: "mu" },
  muCoherentPerCm: {
    name: "of it coherent scattering",
    symbol: "μ_coh",
    unit: "1/cm",
    technique: "absorption",
    anchor: "mu",
  },
  muIncoherentPerCm: {
    name: "of it incoherent scattering",
    symbol: "μ_inc",
    unit: "1/cm",
    technique: "absorption",
    anchor: "mu",
  },
  muEnergyAbsorptionPerCm: {
    name: "Energy absorption",
    symbol: "μ_en",
    unit: "1/cm",
    technique: "absorption",
    anchor: "energy-absorption",
  },
  attenuationLengthMm: {
    name: "Attenuation length",
    symbol: "1/μ",
    unit: "mm",
    technique: "absorption",
    anchor: "attenuation-length",
  },
  halfValueThicknessMm: {
    name: "Half-value thickness",
    symbol: "ln 2/μ",
    unit: "mm",
    technique: "absorption",
    anchor: "half-value",
  },
  transmission: { name: "Transmission", symbol: "T", unit: "", technique: "absorption", anchor: "transmission" },
  gamma: { name: "Contrast ratio of a pair", symbol: "γ", unit: "", technique: null, anchor: "gamma" },
  deltaDelta: { name: "Difference in δ", symbol: "Δδ", unit: "", technique: "phase", anchor: "gamma" },
  deltaMuPerCm: { name: "Difference in μ", symbol: "Δμ", unit: "1/cm", technique: "absorption", anchor: "gamma" },
  wavelengthAngstrom: { name: "Wavelength", symbol: "λ", unit: "Å", technique: null, anchor: "wavelength" },
  densityGCm3: { name: "Density", symbol: "ρ", unit: "g/cm3", technique: null, anchor: "density" },
  molarMassGPerMol: { name: "Molar mass", symbol: "M", unit: "g/mol", technique: null, anchor: "weights" },
  massFractions: { name: "Composition by mass", symbol: "w", unit: "", technique: null, anchor: "mixtures" },
  edges: { name: "Absorption edges", symbol: "", unit: "keV", technique: null, anchor: "edges" },
  spread: { name: "Spread between tables", symbol: "", unit: "", technique: null, anchor: "spread" },
} as const satisfies Record<string, QuantityLabel>;

export type QuantityKey = keyof typeof QUANTITIES;

/** Symbol as parts, its index as a subscript: `β_eff` is β with subscript eff, `δ/β_eff` likewise. */
export function symbolParts(symbol: string): { text: string; script: "base" | "sub" }[] {
  const [base = "", index] = symbol.split("_");
  return [
    { text: base, script: "base" as const },
    ...(index === undefined ? [] : [{ text: index, script: "sub" as const }]),
  ];
}
