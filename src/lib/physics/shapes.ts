/**
 * Shapes of a feature and the transforms of their thickness (PHYSICS 5): sphere in two dimensions, fibre and layer in one,
 * along their visible length.
 */
import { sinc } from "./geometry.ts";
import { besselJ1 } from "./numerics/bessel.ts";
import { gaussLegendre } from "./numerics/gauss.ts";

export type Shape =
  | { readonly kind: "sphere"; readonly sizeM: number }
  | { readonly kind: "fibre"; readonly sizeM: number; readonly lengthM: number }
  /** `sizeM` along the beam, `widthM` across it. */
  | { readonly kind: "layer"; readonly sizeM: number; readonly widthM: number; readonly lengthM: number };

/** Extent across the beam: diameter, or a layer's width. What pixels must resolve, and the neighbourhood of an observer. */
export function acrossM(shape: Shape): number {
  return shape.kind === "layer" ? shape.widthM : shape.sizeM;
}

/** Beyond so many periods of its own the transform's ripple is taken as its mean: it then adds less than 0.1 %. */
const RIPPLES = 100;

/** t̂(u) of the thickness: m³ for a sphere, in two dimensions; m² for a fibre or layer, in one. u ≥ 0 in 1/m. */
export function transform(shape: Shape, frequencyPerM: number): number {
  if (shape.kind === "layer") return shape.sizeM * shape.widthM * sinc(shape.widthM * frequencyPerM);
  const radius = shape.sizeM / 2;
  const q = 2 * Math.PI * radius * frequencyPerM;
  if (shape.kind === "sphere") {
    // Below 0.05 the difference loses digits: (sin q − q cos q)/q³ = 1/3 − q²/30 + q⁴/840.
    const ratio = q < 0.05 ? 1 / 3 - (q * q) / 30 + q ** 4 / 840 : (Math.sin(q) - q * Math.cos(q)) / (q * q * q);
    return 4 * Math.PI * radius * radius * radius * ratio;
  }
  // a J₁(q)/u = 2πa² J₁(q)/q, and J₁(q)/q → 1/2.
  return 2 * Math.PI * radius * radius * (q < 1e-4 ? 0.5 - (q * q) / 16 : besselJ1(q) / q);
}

/** |t̂(u)|² in m⁶ (sphere) or m⁴ (fibre, layer); its mean over a ripple where the shape spans more than 100 of them. */
export function transformSquared(shape: Shape, frequencyPerM: number): number {
  if (acrossM(shape) * frequencyPerM <= RIPPLES) {
    const value = transform(shape, frequencyPerM);
    return value * value;
  }
  if (shape.kind === "layer")
    return (shape.sizeM * shape.widthM) ** 2 / (2 * (Math.PI * shape.widthM * frequencyPerM) ** 2);
  const radius = shape.sizeM / 2;
  const q = 2 * Math.PI * radius * frequencyPerM;
  if (shape.kind === "fibre") return (radius * radius) / (Math.PI * q * frequencyPerM ** 2);
  return ((4 * Math.PI * radius * radius * radius) ** 2 * (1 + q * q)) / (2 * q ** 6);
}

/**
 * Θ(u) = ∮ |t̂(u cos θ, u sin θ)|² dθ of a layer's cross-section, d × w, in m⁴: what its tomography sums over directions in the
 * slice. From a table of even steps in u, interpolated by cubics; the table grows as higher frequencies are asked for.
 */
export function layerRingPower(depthM: number, widthM: number): (frequencyPerM: number) => number {
  const longest = Math.max(depthM, widthM);
  const step = 1 / (TABLE_STEPS * longest);
  const table: number[] = [];
  const at = (index: number): number => {
    while (table.length <= index) table.push(ringIntegral(table.length * step, depthM, widthM));
    return table[index] as number;
  };
  return (frequencyPerM) => {
    if (frequencyPerM * longest > RIPPLES) return ringTail(frequencyPerM, depthM, widthM);
    const place = frequencyPerM / step;
    const left = Math.floor(place);
    const x = place - left;
    // Θ is even in u: the neighbour of 0 at left is the one at right.
    const [a, b, c, d] = [at(Math.abs(left - 1)), at(left), at(left + 1), at(left + 2)];
    return (
      (-x * (x - 1) * (x - 2) * a) / 6 +
      ((x + 1) * (x - 1) * (x - 2) * b) / 2 -
      ((x + 1) * x * (x - 2) * c) / 2 +
      ((x + 1) * x * (x - 1) * d) / 6
    );
  };
}

/** Steps of the table for each period of the longer side: cubics then stay within 4e-5 of the ripple. */
const TABLE_STEPS = 32;

function ringIntegral(frequencyPerM: number, depthM: number, widthM: number): number {
  const area = depthM * widthM;
  const periods = frequencyPerM * Math.max(depthM, widthM);
  // Sixteen nodes resolve four periods of either factor with room to spare.
  const panels = 1 + Math.ceil(periods / 3);
  const { nodes, weights } = gaussLegendre(16);
  let sum = 0;
  for (let panel = 0; panel < panels; panel++) {
    for (let node = 0; node < nodes.length; node++) {
      const angle = (0.5 * Math.PI * (panel + nodes[node]!)) / panels;
      const value = sinc(depthM * frequencyPerM * Math.cos(angle)) * sinc(widthM * frequencyPerM * Math.sin(angle));
      sum += (weights[node]! / panels) * value * value;
    }
  }
  return 2 * Math.PI * area * area * sum;
}

/** Both pairs of ends of the ring, where one factor is near 1 and the other's ripple is its mean. */
function ringTail(frequencyPerM: number, depthM: number, widthM: number): number {
  const area = depthM * widthM;
  const ends = (near: number, far: number): number =>
    (1 / (near * frequencyPerM)) * (2 / (2 * (Math.PI * far * frequencyPerM) ** 2));
  return area * area * (ends(widthM, depthM) + ends(depthM, widthM));
}
