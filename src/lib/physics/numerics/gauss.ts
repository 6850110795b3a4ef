/** Gauss–Legendre quadrature on [0, 1]: exact for polynomials up to degree 2n − 1 (Abramowitz and Stegun 25.4.30). */

export interface Quadrature {
  readonly nodes: Float64Array;
  /** They sum to 1. */
  readonly weights: Float64Array;
}

const known = new Map<number, Quadrature>();

/** Nodes and weights of order `count` ≥ 1, by Newton's method on the Legendre polynomial, to full precision. */
export function gaussLegendre(count: number): Quadrature {
  const cached = known.get(count);
  if (cached) return cached;
  const nodes = new Float64Array(count);
  const weights = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let round = 0; round < 100; round++) {
      let value = 1;
      let before = 0;
      for (let degree = 0; degree < count; degree++) {
        const next = ((2 * degree + 1) * x * value - degree * before) / (degree + 1);
        before = value;
        value = next;
      }
      slope = (count * (x * value - before)) / (x * x - 1);
      const step = value / slope;
      x -= step;
      if (Math.abs(step) < 1e-15) break;
    }
    nodes[count - 1 - i] = 0.5 * (1 + x);
    weights[count - 1 - i] = 1 / ((1 - x * x) * slope * slope);
  }
  const made = { nodes, weights };
  known.set(count, made);
  return made;
}
