/**
 * Interpolation of tabulated factors at run time (PHYSICS 2.3): f1 linear in log E; f2 and cross sections log-log; never
 * across an edge. Between rows the table was thinned so that this stays within 0.1 % of the full calculation outside ±2 eV
 * of an edge (f1: 0.002 electrons or 0.02 %, whichever is larger).
 */
import type { ElementFactors } from "./scattering.ts";

export interface FactorsAt {
  /** Electrons; NaN where the table has no value. */
  f1: number;
  f2: number;
  /** m² per atom; NaN for tabulations that do not carry them. */
  coherentM2: number;
  incoherentM2: number;
  energyAbsorptionM2: number;
}

/** Logarithms of an element's columns. */
export interface LogFactors {
  readonly logE: Float64Array;
  readonly logF2: Float64Array;
  readonly logCoherent: Float64Array | null;
  readonly logIncoherent: Float64Array | null;
  readonly logEnergyAbsorption: Float64Array | null;
}

// Logarithms of a table are the same for every call; keyed by the table itself, so that callers still pass plain values.
const LOGS = new WeakMap<ElementFactors, LogFactors>();

export function logsOf(factors: ElementFactors): LogFactors {
  let logs = LOGS.get(factors);
  if (!logs) {
    logs = {
      logE: factors.energiesEv.map(Math.log),
      logF2: factors.f2.map(Math.log),
      logCoherent: factors.coherentM2?.map(Math.log) ?? null,
      logIncoherent: factors.incoherentM2?.map(Math.log) ?? null,
      logEnergyAbsorption: factors.energyAbsorptionM2?.map(Math.log) ?? null,
    };
    LOGS.set(factors, logs);
  }
  return logs;
}

/**
 * Index i of the last row with energy ≤ `energyEv`, or −1 below the first and n where it lies above the last. An energy
 * exactly at an edge belongs to the row above it.
 */
export function rowBelow(energiesEv: Float64Array, energyEv: number, hint = 0): number {
  const last = energiesEv.length - 1;
  // Ascending look-ups walk on from the last hit, which makes a curve cheaper than as many separate searches.
  if (hint >= 0 && hint < last && (energiesEv[hint] as number) <= energyEv) {
    if (energyEv < (energiesEv[hint + 1] as number)) return hint;
    if (hint + 2 <= last && energyEv < (energiesEv[hint + 2] as number)) return hint + 1;
  }
  if (!(energyEv >= (energiesEv[0] as number))) return -1;
  if (energyEv > (energiesEv[last] as number)) return energiesEv.length;
  let low = 0;
  let high = last + 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((energiesEv[middle] as number) <= energyEv) low = middle;
    else high = middle;
  }
  return low;
}

function between(values: Float64Array, row: number, weight: number): number {
  const left = values[row] as number;
  // Exactly on a row, the neighbour does not matter, even where it is missing.
  return weight === 0 ? left : left + weight * ((values[row + 1] as number) - left);
}

/**
 * Writes the factors of one element at `energyEv` into `out`; every field is NaN outside the element's rows.
 * @returns the row used, to be passed back as `hint` for the next higher energy
 */
export function factorsAt(
  factors: ElementFactors,
  energyEv: number,
  out: FactorsAt,
  hint = 0,
  logEnergy = Math.log(energyEv),
  logs = logsOf(factors),
): number {
  const { energiesEv } = factors;
  const row = rowBelow(energiesEv, energyEv, hint);
  if (row < 0 || row >= energiesEv.length) {
    out.f1 = out.f2 = out.coherentM2 = out.incoherentM2 = out.energyAbsorptionM2 = Number.NaN;
    return 0;
  }
  const start = logs.logE[row] as number;
  const weight = energyEv === energiesEv[row] ? 0 : (logEnergy - start) / ((logs.logE[row + 1] as number) - start);
  out.f1 = between(factors.f1, row, weight);
  out.f2 = Math.exp(between(logs.logF2, row, weight));
  out.coherentM2 = logs.logCoherent ? Math.exp(between(logs.logCoherent, row, weight)) : Number.NaN;
  out.incoherentM2 = logs.logIncoherent ? Math.exp(between(logs.logIncoherent, row, weight)) : Number.NaN;
  out.energyAbsorptionM2 = logs.logEnergyAbsorption
    ? Math.exp(between(logs.logEnergyAbsorption, row, weight))
    : Number.NaN;
  return row;
}
