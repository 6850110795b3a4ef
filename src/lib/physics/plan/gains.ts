/**
 * Gains of single-material retrieval in signal to noise (PHYSICS 8; Nesterets, Gureyev, J. Phys. D 47, 105402 (2014)), for white
 * noise per pixel, over the square band of the pixels: G₂D² = (2u_N)²/∬H², G_CT² = ∬u_x²/∬u_x²H², H = 1/(1 + πλR'γu²).
 */
import { gaussLegendre } from "../numerics/gauss.ts";

export interface Gains {
  readonly image: number;
  readonly tomography: number;
}

/**
 * Both gains for c = πλR'γu_N² = πγ/(4 N_F) ≥ 0, N_F = p²/(λR'). Both are 1 at c = 0; for c ≫ 1: G₂D ≈ √(γ/N_F),
 * G_CT ≈ (γ/N_F) √{(π/6)/[ln(πγ/(4N_F)) − 1]}. To 1e-6. For an ideal detector with white noise.
 */
export function retrievalGains(c: number): Gains {
  if (!(c > 0)) return { image: 1, tomography: 1 };
  // x and y from 0 to 1 in units of u_N. The inner integral ∫₀¹ dy/(A + c y²)², A = 1 + c x², is known; the outer one is cut at
  // 1, 1/2, 1/4 … down to where H is flat.
  const { nodes, weights } = gaussLegendre(12);
  let image = 0;
  let tomography = 0;
  const add = (low: number, high: number): void => {
    for (let k = 0; k < nodes.length; k++) {
      const x = low + nodes[k]! * (high - low);
      const inner = weights[k]! * (high - low) * innerIntegral(1 + c * x * x, c);
      image += inner;
      tomography += inner * x * x;
    }
  };
  let top = 1;
  while (c * top * top > 0.25) {
    add(top / 2, top);
    top /= 2;
  }
  add(0, top);
  return { image: 1 / Math.sqrt(image), tomography: Math.sqrt(1 / 3 / tomography) };
}

function innerIntegral(a: number, c: number): number {
  return 1 / (2 * a * (a + c)) + Math.atan(Math.sqrt(c / a)) / (2 * a * Math.sqrt(a * c));
}
