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
const EXEMPT_EV = 2;

/** Rows of one stretch between jumps, first and last always kept. `edgesEv` exempts candidates within 2 eV. */
export function thin(candidates: readonly Row[], edgesEv: readonly number[]): Row[] {
  const kept: Row[] = [candidates[0]!];
  let from = 0;
  const last = candidates.length - 1;
  const exempt = candidates.map((row) => edgesEv.some((edge) => Math.abs(edge - row.energyEv) <= EXEMPT_EV));
  while (from < last) {
    let to = from + 1;
    // Grow by doubling, then halve back: a stretch that fails rarely holds again further on.
    let step = 1;
    while (step >= 1) {
      const next = Math.min(last, to + step);
      if (next > to && holds(candidates, exempt, from, next)) {
        to = next;
        step *= 2;
      } else {
        step = Math.floor(step / 2);
      }
      if (to === last) break;
    }
    kept.push(candidates[to]!);
    from = to;
  }
  return kept;
}

function holds(rows: readonly Row[], exempt: readonly boolean[], from: number, to: number): boolean {
  const a = rows[from]!;
  const b = rows[to]!;
  const span = Math.log(b.energyEv / a.energyEv);
  for (let index = from + 1; index < to; index++) {
    if (exempt[index]) continue;
    const row = rows[index]!;
    const share = Math.log(row.energyEv / a.energyEv) / span;
    const f1 = a.f1 + share * (b.f1 - a.f1);
    if (Math.abs(f1 - row.f1) > Math.max(F1_ABSOLUTE, F1_RELATIVE * Math.abs(row.f1))) return false;
    for (const column of LOG_COLUMNS) {
      const value = a[column] * (b[column] / a[column]) ** share;
      if (Math.abs(value - row[column]) > RELATIVE * row[column]) return false;
    }
  }
  return true;
}
