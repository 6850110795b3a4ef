/** Plans that checks speak of: materials, tasks and grids in SI units. */
import { committedTables } from "#data/build/committed-tables.ts";
import {
  compositionOfFormula,
  compositionOfMassFractions,
  elementBySymbol,
  type Grid,
  type Material,
  parseFormula,
  planEdges,
  type PlanTask,
  type Setup,
  type Shape,
  sorted,
  steps,
  withDensity,
  withEdgeEnergies,
} from "#src/lib/physics/index.ts";

export const tables = committedTables();

export const compound = (formula: string, densityGCm3: number): Material =>
  withDensity(compositionOfFormula(parseFormula(formula)), densityGCm3 * 1000);
export const byMass = (shares: Record<string, number>, densityGCm3: number): Material => {
  const sum = Object.values(shares).reduce((total, share) => total + share, 0);
  return withDensity(
    compositionOfMassFractions(
      new Map(Object.entries(shares).map(([symbol, share]) => [elementBySymbol(symbol)!.atomicNumber, share / sum])),
    ),
    densityGCm3 * 1000,
  );
};

export const water = compound("H2O", 1);
export const pmma = compound("C5H8O2", 1.19);
export const hydroxyapatite = compound("Ca5P3O13H", 3.16);
/** ICRU Report 44 (1989); air at the density of the sanity cases. */
export const air = byMass({ C: 0.000124, N: 0.755268, O: 0.231781, Ar: 0.012827 }, 0.0012);
export const SOFT_TISSUE = {
  H: 0.102,
  C: 0.143,
  N: 0.034,
  O: 0.708,
  Na: 0.002,
  P: 0.003,
  S: 0.003,
  Cl: 0.002,
  K: 0.003,
};
export const ADIPOSE = { H: 0.114, C: 0.598, N: 0.007, O: 0.278, Na: 0.001, S: 0.001, Cl: 0.001 };

export const um = (value: number): number => value * 1e-6;
export const fibre = (diameterUm: number, lengthUm = 5 * diameterUm): Shape => ({
  kind: "fibre",
  sizeM: um(diameterUm),
  lengthM: um(lengthUm),
});
export const sphere = (diameterUm: number): Shape => ({ kind: "sphere", sizeM: um(diameterUm) });

export const setup = (
  sourceDistanceM: number | null,
  sourceUm: number,
  detectorUm: number,
  pixelUm: number,
  more: Partial<Setup> = {},
): Setup => ({
  sourceDistanceM,
  sourceFwhmM: um(sourceUm),
  detectorFwhmM: um(detectorUm),
  pixelM: um(pixelUm),
  efficiency: null,
  bandwidth: 0,
  fluxPerSM2: null,
  ...more,
});
export const IDEAL = { efficiency: { kind: "number", value: 1 } } as const;

export function task(
  feature: Material,
  shape: Shape,
  host: Material,
  hostThicknessMm: number,
  instrument: Setup,
  more: Partial<PlanTask> = {},
): PlanTask {
  return {
    sample: {
      feature: { material: feature, densityUncertainty: 0.01 },
      shape,
      host: { material: host, densityUncertainty: 0.01 },
      hostThicknessM: hostThicknessMm * 1e-3,
      layers: [],
    },
    setup: instrument,
    use: "direct",
    threshold: 5,
    minimumCounts: 0,
    nearFieldLimit: 0.8,
    projections: null,
    objective: "dose",
    limits: { doseGy: null, timeS: null, transmission: null },
    tabulation: "epdl97",
    ...more,
  };
}

export function grid(
  plan: PlanTask,
  [fromKeV, toKeV, energies]: readonly [number, number, number],
  [fromM, toM, distances]: readonly [number, number, number],
): Grid {
  const energiesEv = steps(fromKeV * 1000, toKeV * 1000, energies, "log");
  const edges = planEdges(plan, tables, [fromKeV * 900, toKeV * 1100]);
  return {
    energiesEv: withEdgeEnergies(energiesEv, edges, plan.setup.bandwidth),
    distancesM: sorted(steps(fromM, toM, distances, fromM > 0 ? "log" : "linear")),
    edges,
  };
}
