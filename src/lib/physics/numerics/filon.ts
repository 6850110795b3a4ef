/**
 * Filon's rule for ∫ f(v) cos κv dv and ∫ f(v) sin κv dv on even steps h, exact for quadratic f whatever the frequency
 * (Filon, Proc. R. Soc. Edinburgh 49, 38 (1928); Abramowitz and Stegun 25.4.47). With θ = κh:
 * ∫ f cos = h [α (f sin)|ends + β ΣC_even + γ ΣC_odd], with the even sum's ends halved; for sines the end term is −α (f cos)|ends.
 */
export interface FilonFactors {
  alpha: number;
  beta: number;
  gamma: number;
}

/** Below: series, since the closed forms lose digits. */
const SERIES_BELOW = 0.1;

/** Writes the factors for θ ≥ 0 into `out`; Simpson's rule at θ = 0. */
export function filonFactors(theta: number, out: FilonFactors): void {
  const square = theta * theta;
  if (theta < SERIES_BELOW) {
    out.alpha = theta * square * (2 / 45 - square * (2 / 315 - square * (2 / 4725)));
    out.beta = 2 / 3 + square * (2 / 15 - square * (4 / 105 - square * (2 / 567)));
    out.gamma = 4 / 3 - square * (2 / 15 - square * (1 / 210 - square * (1 / 11340)));
    return;
  }
  const sine = Math.sin(theta);
  const cosine = Math.cos(theta);
  const cube = theta * square;
  out.alpha = (square + theta * sine * cosine - 2 * sine * sine) / cube;
  out.beta = (2 * (theta * (1 + cosine * cosine) - 2 * sine * cosine)) / cube;
  out.gamma = (4 * (sine - theta * cosine)) / cube;
}
