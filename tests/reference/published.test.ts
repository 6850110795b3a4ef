/**
 * Every published value, compared at the tolerance its entry states. Facts of practice are listed below; the test fails if any
 * other entry was not compared.
 */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  AVOGADRO,
  CLASSICAL_ELECTRON_RADIUS,
  dosePerFluenceGyM2,
  ELECTRON_REST_ENERGY,
  electronDensityPerM3,
  elementBySymbol,
  elementByNumber,
  ELEMENTARY_CHARGE,
  factorsAt,
  type FactorsAt,
  gCm3FromKgPerM3,
  opticalConstants,
  perCmFromPerM,
  PLANCK_TIMES_LIGHT,
  wavelengthM,
} from "#src/lib/physics/index.ts";
import { committedTables } from "#data/build/committed-tables.ts";
import { relativisticLimit } from "#data/build/dispersion.ts";
import { publishedMaterial } from "./materials.ts";
import { PLAN_QUANTITIES } from "./published-plans.ts";

export interface Entry {
  id: string;
  quantity: string;
  material: string;
  energy_eV: number | null;
  value: number;
  unit: string;
  tolerance: number;
  tolerance_type: "relative" | "absolute";
  source: string;
  confidence: string;
}

const { values } = JSON.parse(readFileSync(new URL("./fixtures/published.json", import.meta.url), "utf8")) as {
  values: Entry[];
};
const tables = committedTables();
const epdl97 = tables.tabulations.epdl97;

/** Facts of practice: ranges seen in experiments, not values to compute. */
const FACTS_OF_PRACTICE = ["L0787", "L0788", "L0789", "L0790", "L0791", "L0792", "L0793", "L0794"];

const constantsOf = ({ material, energy_eV }: Entry) => {
  const constants = opticalConstants(publishedMaterial(material), energy_eV as number, tables);
  if (!constants) throw new Error(`no value of ${material} at ${energy_eV} eV`);
  return constants;
};
const densityOf = (entry: Entry): number => gCm3FromKgPerM3(publishedMaterial(entry.material).densityKgPerM3);
const factorsOf = ({ material, energy_eV }: Entry): FactorsAt & { atomicNumber: number } => {
  const atomicNumber = elementBySymbol(material)?.atomicNumber ?? 0;
  const out = { f1: NaN, f2: NaN, coherentM2: NaN, incoherentM2: NaN, energyAbsorptionM2: NaN };
  factorsAt(epdl97.elements.get(atomicNumber)!, energy_eV as number, out);
  return { ...out, atomicNumber };
};
const shellOf = (symbol: string, shell: string) =>
  tables.shells.get(elementBySymbol(symbol)!.atomicNumber)!.find((entry) => entry.shell === shell)!;
const edge = (shell: string) => (entry: Entry) => shellOf(entry.material, shell).edgeEnergyEv;
const degrees = (radians: number): number => (radians * 180) / Math.PI;
const electronsPerA3 = (entry: Entry): number => electronDensityPerM3(publishedMaterial(entry.material)) * 1e-30;
/** δ with f1 = Z: r_e λ² n_e / 2π. */
const deltaOfElectrons = (entry: Entry): number =>
  (CLASSICAL_ELECTRON_RADIUS.value *
    wavelengthM(entry.energy_eV as number) ** 2 *
    electronDensityPerM3(publishedMaterial(entry.material))) /
  (2 * Math.PI);
/** Gy m² to pGy cm²: 1 Gy m² is 1e12 pGy times 1e4 cm². */
const doseOf = (entry: Entry): number =>
  (dosePerFluenceGyM2(constantsOf(entry), publishedMaterial(entry.material).densityKgPerM3) ?? NaN) * 1e16;
const line = (entry: Entry): number => {
  const [symbol = "", name = ""] = entry.material.split("_");
  const upper = name === "Ka1" ? "L3" : "L2";
  return shellOf(symbol, "K").lines.find((candidate) => candidate.line.endsWith(upper))!.energyEv;
};

const COMPUTED: Readonly<Record<string, (entry: Entry) => number>> = {
  ...PLAN_QUANTITIES,
  mass_attenuation_total_with_coherent: (entry) => perCmFromPerM(constantsOf(entry).muTotalPerM) / densityOf(entry),
  mass_energy_absorption: (entry) => perCmFromPerM(constantsOf(entry).muEnergyAbsorptionPerM) / densityOf(entry),
  gamma_delta_over_beta_total_mu: (entry) => constantsOf(entry).delta / constantsOf(entry).betaEffective,
  delta: (entry) => constantsOf(entry).delta,
  beta_photoelectric: (entry) => constantsOf(entry).beta,
  critical_angle_sqrt2delta: (entry) => degrees(constantsOf(entry).criticalAngleRad ?? NaN),
  delta_fprime0: deltaOfElectrons,
  fprime_Cu: (entry) => factorsOf(entry).f1 - factorsOf(entry).atomicNumber,
  fprime_Mo: (entry) => factorsOf(entry).f1 - factorsOf(entry).atomicNumber,
  fdoubleprime_Cu: (entry) => factorsOf(entry).f2,
  fdoubleprime_Mo: (entry) => factorsOf(entry).f2,
  absorption_edge_K: edge("K"),
  absorption_edge_K_measured: edge("K"),
  absorption_edge_L1: edge("L1"),
  absorption_edge_L2: edge("L2"),
  absorption_edge_L3: edge("L3"),
  emission_line_energy: line,
  Zstar_high_energy_limit_of_f1: ({ material }) => relativisticLimit(elementBySymbol(material)!.atomicNumber),
  density: (entry) => densityOf(entry),
  Z_over_A: (entry) =>
    electronDensityPerM3(publishedMaterial(entry.material)) /
    (publishedMaterial(entry.material).densityKgPerM3 * 1e3 * AVOGADRO.value),
  electron_density: electronsPerA3,
  dose_per_fluence: doseOf,
  air_kerma_per_fluence: doseOf,
  constant_N_A: () => AVOGADRO.value,
  constant_e: () => ELEMENTARY_CHARGE.value,
  constant_hc: () => PLANCK_TIMES_LIGHT.value * 1e7,
  "constant_m_e c2": () => ELECTRON_REST_ENERGY.value,
  constant_r_e: () => CLASSICAL_ELECTRON_RADIUS.value,
  beta_prefactor: () => (PLANCK_TIMES_LIGHT.value * 1e-3 * 1e2) / (4 * Math.PI),
  delta_prefactor_low_Z: () =>
    (CLASSICAL_ELECTRON_RADIUS.value * (PLANCK_TIMES_LIGHT.value * 1e-3) ** 2 * AVOGADRO.value * 1e6) / (2 * Math.PI),
  sigma_barn_per_lambdaA_f2: () => 2 * CLASSICAL_ELECTRON_RADIUS.value * 1e-10 * 1e28,
  // Q_c = (4π/λ) √(2δ) with δ = r_e λ² n_e/2π, in which λ cancels: 4 √(π r_e n_e).
  Qc_critical_wavevector: (entry) =>
    4 *
    Math.sqrt(Math.PI * CLASSICAL_ELECTRON_RADIUS.value * electronDensityPerM3(publishedMaterial(entry.material))) *
    1e-10,
};

const compared = values.filter((entry) => !FACTS_OF_PRACTICE.includes(entry.id));

describe("published values", () => {
  for (const quantity of new Set(compared.map((entry) => entry.quantity))) {
    const entries = compared.filter((entry) => entry.quantity === quantity);
    it(`${quantity}: all ${entries.length} agree within their stated tolerances`, () => {
      const compute = COMPUTED[quantity];
      expect(compute, `nothing computes ${quantity}`).toBeDefined();
      const off = entries.flatMap((entry) => {
        const computed = compute!(entry);
        const difference =
          entry.tolerance_type === "absolute" ? Math.abs(computed - entry.value) : Math.abs(computed / entry.value - 1);
        return difference <= entry.tolerance
          ? []
          : [
              `${entry.id} ${entry.material} ${entry.energy_eV} eV: computed ${computed}, published ${entry.value} ${entry.unit}, off by ${difference} of ${entry.tolerance} (${entry.source})`,
            ];
      });
      expect(off).toEqual([]);
    });
  }

  it("leaves out nothing but facts of practice", () => {
    expect(values).toHaveLength(550);
    expect(new Set(values.map((entry) => entry.id)).size).toBe(550);
    const left = values.filter((entry) => !compared.includes(entry));
    expect(left.map((entry) => entry.id)).toEqual(FACTS_OF_PRACTICE);
    expect(compared.every((entry) => COMPUTED[entry.quantity])).toBe(true);
  });

  it("compares edges of at least two shells", () => {
    expect(compared.filter((entry) => entry.quantity.startsWith("absorption_edge")).length).toBeGreaterThan(20);
    expect(elementByNumber(53).symbol).toBe("I");
  });
});
