/** Thinning: the fewest rows from which interpolation gives every candidate back within its tolerance (PHYSICS 2.3). */

export interface Row {
  readonly energyEv: number;
  readonly side: "" | "below" | "above";
  readonly f1: number;
  readonly f2: number;
  readonly coherentBarn: number;
  readonly incoherentBarn: number;
  readonly energyAbsorptionBarn: number;
}

const LOG_COLUMNS = ["f2", "coherentBarn", "incoherentBarn", "energyAbsorptionBarn"] as const;
/** Stated accuracy is 0.1 %; printing to six digits and the grid of candidates take their part. */
const RELATIVE = 0.0009;
const F1_ABSOLUTE = 0.0018;
const F1_RELATIVE = 0.00018;
/** So close to an edge the free-atom tables mean little, and f1 runs to its logarithmic pole. */
export const EXEMPT_EV = 2;
/** Half the last printed place of an energy near an edge: what stands at 2 eV is not exempt. */
const ROUNDING_EV = 0.005;

/** So near an edge that no accuracy is stated. */
export const isExempt = (energyEv: number, edgesEv: readonly number[]): boolean =>
  edgesEv.some((edge) => Math.abs(edge - energyEv) < EXEMPT_EV - ROUNDING_EV);

/** Worst departure of `row` from the interpolation between `a` and `b`, in units of the tolerance. */
export function misfit(a: Row, b: Row, row: Row): number {
  const share = Math.log(row.energyEv / a.energyEv) / Math.log(b.energyEv / a.energyEv);
  const f1 = a.f1 + share * (b.f1 - a.f1);
  let worst = Math.abs(f1 - row.f1) / Math.max(F1_ABSOLUTE, F1_RELATIVE * Math.abs(row.f1));
  for (const column of LOG_COLUMNS) {
    const value = a[column] * (b[column] / a[column]) ** share;
    worst = Math.max(worst, Math.abs(value - row[column]) / (RELATIVE * row[column]));
  }
  return worst;
}

/** Candidates are close enough when each lies this near, in units of the tolerance, to what its neighbours give. */
const CLOSE_ENOUGH = 0.1;

/** Halves the spaces of `rows` until every new row is close to what its neighbours give, or falls on one when rounded. */
export function densify(
  rows: readonly Row[],
  edgesEv: readonly number[],
  rowBetween: (a: Row, b: Row) => Row | null,
): Row[] {
  const between = (a: Row, b: Row): Row[] => {
    const row = rowBetween(a, b);
    if (!row) return [];
    if (isExempt(row.energyEv, edgesEv) || misfit(a, b, row) <= CLOSE_ENOUGH) return [row];
    return [...between(a, row), row, ...between(row, b)];
  };
  return rows.flatMap((row, index) => (index === 0 ? [row] : [...between(rows[index - 1]!, row), row]));
}

/** Rows of one stretch between jumps, first and last always kept. `edgesEv` exempts candidates less than 2 eV from one. */
export function thin(candidates: readonly Row[], edgesEv: readonly number[]): Row[] {
  const kept: Row[] = [candidates[0]!];
  let from = 0;
  const last = candidates.length - 1;
  const exempt = candidates.map((row) => isExempt(row.energyEv, edgesEv));
  const holds = (to: number): boolean => {
    for (let index = from + 1; index < to; index++) {
      if (!exempt[index] && misfit(candidates[from]!, candidates[to]!, candidates[index]!) > 1) return false;
    }
    return true;
  };
  while (from < last) {
    let to = from + 1;
    // Grow by doubling, then halve back: a stretch that fails rarely holds again further on.
    let step = 1;
    while (step >= 1 && to < last) {
      const next = Math.min(last, to + step);
      if (holds(next)) {
        to = next;
        step *= 2;
      } else {
        step = Math.floor(step / 2);
      }
    }
    kept.push(candidates[to]!);
    from = to;
  }
  return kept;
}
