/**
 * Materials that the published values speak of. Compositions: ICRU Report 44 (1989) and ICRU Report 37 (1984); the
 * four-component soft tissue: ICRU Report 33 (1980), from memory; elements and compounds by formula. Densities as the
 * entries' sources state them.
 */
import {
  compositionOfFormula,
  compositionOfMassFractions,
  elementBySymbol,
  kgPerM3FromGCm3,
  type Material,
  parseFormula,
  withDensity,
} from "#src/lib/physics/index.ts";

type Stated = { formula: string; densityGCm3: number } | { fractions: Record<string, number>; densityGCm3: number };

const STATED: Readonly<Record<string, Stated>> = {
  water: { formula: "H2O", densityGCm3: 1 },
  PMMA: { formula: "C5H8O2", densityGCm3: 1.19 },
  polyethylene: { formula: "C2H4", densityGCm3: 0.93 },
  polystyrene: { formula: "C8H8", densityGCm3: 1.06 },
  PTFE: { formula: "C2F4", densityGCm3: 2.25 },
  Mylar: { formula: "C10H8O4", densityGCm3: 1.38 },
  Kapton: { formula: "C22H10N2O5", densityGCm3: 1.42 },
  SiO2: { formula: "SiO2", densityGCm3: 2.2 },
  Pyrex: {
    fractions: { B: 0.040064, O: 0.539562, Na: 0.028191, Al: 0.011644, Si: 0.37722, K: 0.003321 },
    densityGCm3: 2.23,
  },
  air_dry: { fractions: { C: 0.000124, N: 0.755268, O: 0.231781, Ar: 0.012827 }, densityGCm3: 1.205e-3 },
  soft_tissue_ICRU44: {
    fractions: { H: 0.102, C: 0.143, N: 0.034, O: 0.708, Na: 0.002, P: 0.003, S: 0.003, Cl: 0.002, K: 0.003 },
    densityGCm3: 1.06,
  },
  soft_tissue_ICRU_4comp: { fractions: { H: 0.101172, C: 0.111, N: 0.026, O: 0.761828 }, densityGCm3: 1 },
  bone_cortical_ICRU44: {
    fractions: { H: 0.034, C: 0.155, N: 0.042, O: 0.435, Na: 0.001, Mg: 0.002, P: 0.103, S: 0.003, Ca: 0.225 },
    densityGCm3: 1.92,
  },
  adipose_ICRU44: {
    fractions: { H: 0.114, C: 0.598, N: 0.007, O: 0.278, Na: 0.001, S: 0.001, Cl: 0.001 },
    densityGCm3: 0.95,
  },
  muscle_ICRU44: {
    fractions: { H: 0.102, C: 0.143, N: 0.034, O: 0.71, Na: 0.001, P: 0.002, S: 0.003, Cl: 0.001, K: 0.004 },
    densityGCm3: 1.05,
  },
  lung_ICRU44: {
    fractions: { H: 0.103, C: 0.105, N: 0.031, O: 0.749, Na: 0.002, P: 0.002, S: 0.003, Cl: 0.003, K: 0.002 },
    densityGCm3: 1.05,
  },
  breast_ICRU44: {
    fractions: { H: 0.106, C: 0.332, N: 0.03, O: 0.527, Na: 0.001, P: 0.001, S: 0.002, Cl: 0.001 },
    densityGCm3: 1.02,
  },
  brain_ICRU44: {
    fractions: { H: 0.107, C: 0.145, N: 0.022, O: 0.712, Na: 0.002, P: 0.004, S: 0.002, Cl: 0.003, K: 0.003 },
    densityGCm3: 1.04,
  },
  blood_ICRU44: {
    fractions: { H: 0.102, C: 0.11, N: 0.033, O: 0.745, Na: 0.001, P: 0.001, S: 0.002, Cl: 0.003, K: 0.002, Fe: 0.001 },
    densityGCm3: 1.06,
  },
  Al: { formula: "Al", densityGCm3: 2.699 },
  Si: { formula: "Si", densityGCm3: 2.329 },
  Fe: { formula: "Fe", densityGCm3: 7.874 },
  Ni: { formula: "Ni", densityGCm3: 8.902 },
  Cu: { formula: "Cu", densityGCm3: 8.96 },
  Au: { formula: "Au", densityGCm3: 19.32 },
};

/** A named material, or any element at 1 g/cm³ for values per mass. */
export function publishedMaterial(name: string): Material {
  const stated = STATED[name] ?? (elementBySymbol(name) ? { formula: name, densityGCm3: 1 } : null);
  if (!stated) throw new Error(`The published values name a material that is not defined here: ${name}`);
  const composition =
    "formula" in stated
      ? compositionOfFormula(parseFormula(stated.formula))
      : compositionOfMassFractions(
          new Map(
            Object.entries(stated.fractions).map(([symbol, share]) => [
              elementBySymbol(symbol)?.atomicNumber ?? 0,
              share,
            ]),
          ),
        );
  return withDensity(composition, kgPerM3FromGCm3(stated.densityGCm3));
}
