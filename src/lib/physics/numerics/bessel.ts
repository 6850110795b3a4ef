/** Bessel functions J₀ and J₁, for transforms of round shapes. */

/** Below: the power series (DLMF 10.2.2); cancellation there costs at most five digits of sixteen. */
const SERIES_BELOW = 12;

/** J₀(x) for x ≥ 0, to 1e-10 of its envelope √(2/(πx)). */
export const besselJ0 = (x: number): number => bessel(0, x);

/** J₁(x) for x ≥ 0, to 1e-10 of its envelope √(2/(πx)). */
export const besselJ1 = (x: number): number => bessel(1, x);

/** Power series below 12 (DLMF 10.2.2), Hankel's expansion from there (DLMF 10.17.3). */
function bessel(order: 0 | 1, x: number): number {
  if (x < SERIES_BELOW) {
    const quarter = -0.25 * x * x;
    let term = order === 0 ? 1 : 0.5 * x;
    let sum = term;
    for (let k = 1; Math.abs(term) > 1e-17 * Math.abs(sum); k++) {
      term *= quarter / (k * (k + order));
      sum += term;
    }
    return sum;
  }
  // a_k = ∏ (4 order² − (2j − 1)²) / (8 j): P takes the even terms, Q the odd ones, with alternating signs.
  let even = 1;
  let odd = 0;
  let term = 1;
  for (let k = 1; k <= 14; k++) {
    const next = (term * (4 * order - (2 * k - 1) ** 2)) / (8 * k * x);
    // The expansion is asymptotic: it stops being useful once terms grow.
    if (Math.abs(next) > Math.abs(term)) break;
    term = next;
    const sign = (k >> 1) % 2 === 0 ? 1 : -1;
    if (k % 2 === 1) odd += sign * term;
    else even += sign * term;
  }
  const angle = x - (0.5 * order + 0.25) * Math.PI;
  return Math.sqrt(2 / (Math.PI * x)) * (Math.cos(angle) * even - Math.sin(angle) * odd);
}
