/** How far the tabulations part (PHYSICS 3.1): least and greatest over those that cover the energy, never an average. */
import type { Material } from "./material.ts";
import { constantsAtRow, constantsOfAllTabulations, type OpticalConstants } from "./optical-constants.ts";
import { TABULATION_KEYS, type ScatteringTables, type TabulationKey } from "./scattering.ts";

export type Interval = readonly [number, number];

export interface Spread {
  readonly delta: Interval;
  readonly beta: Interval;
  readonly muTotalPerM: Interval;
  /** The tabulations that cover the energy, in the order of TABULATION_KEYS. */
  readonly tabulations: readonly TabulationKey[];
}

function interval(values: readonly number[]): Interval {
  return [Math.min(...values), Math.max(...values)];
}

/** The spread of values from several tabulations, or null where fewer than two cover the energy. */
export function spreadOf(byTabulation: ReadonlyMap<TabulationKey, OpticalConstants | null>): Spread | null {
  const covered = TABULATION_KEYS.flatMap((key) => {
    const constants = byTabulation.get(key);
    return constants ? [{ key, constants }] : [];
  });
  if (covered.length < 2) return null;
  return {
    delta: interval(covered.map(({ constants }) => constants.delta)),
    beta: interval(covered.map(({ constants }) => constants.beta)),
    muTotalPerM: interval(covered.map(({ constants }) => constants.muTotalPerM)),
    tabulations: covered.map(({ key }) => key),
  };
}

export interface ComparedRow {
  readonly constants: OpticalConstants | null;
  readonly byTabulation: ReadonlyMap<TabulationKey, OpticalConstants | null>;
  readonly spread: Spread | null;
}

/** Constants of one tabulation at many energies (eV), each with what the others say. */
export function compareTabulations(
  material: Material,
  energiesEv: ArrayLike<number>,
  tables: ScatteringTables,
  tabulation: TabulationKey,
): ComparedRow[] {
  const columns = constantsOfAllTabulations(material, energiesEv, tables);
  return Array.from({ length: energiesEv.length }, (_, index) => {
    const byTabulation = new Map<TabulationKey, OpticalConstants | null>();
    for (const key of TABULATION_KEYS) byTabulation.set(key, constantsAtRow(columns[key], index));
    return { constants: byTabulation.get(tabulation) ?? null, byTabulation, spread: spreadOf(byTabulation) };
  });
}
