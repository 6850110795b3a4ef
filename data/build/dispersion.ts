/**
 * f1 from f2 by the dispersion integral (PHYSICS 2.2):
 * f1(E) = Z* + (2/π) P∫ ε f2(ε)/(E² − ε²) dε, Z* = Z − (Z/82.5)^2.37 (relativistic term as in Henke et al. 1993).
 *
 * With g(ε) = ε f2(ε) taken linear between close nodes, the principal value of each piece is exact:
 * ∫ (c + mε)/(E² − ε²) dε = c/(2E) ln|(E+ε)/(E−ε)| − (m/2) ln|E² − ε²|.
 * Pieces far from E are taken by Gauss's two points instead: the same to eight digits, without logarithms.
 */
import type { Side } from "./grid-function.ts";

/** Least parts of every log-log segment; a bent one has as many as keep its chords within this share of g. */
const SUBDIVISIONS = 12;
const CHORD_ERROR = 1e-5;
/** Distances from an edge at which nodes stand grow by this factor from 1 meV. */
const EDGE_GROWTH = 1.6;
const NEAREST_TO_EDGE_EV = 1e-3;
/** The photoelectric tail is continued to here by its power law. */
const TAIL_END_EV = 1e8;
/** Pieces narrower than this share of their distance: two Gauss points leave (share)⁴/180 of them, 5e-9. */
const NARROW = 0.03;

/** High-energy limit of f1, electrons. Henke, Gullikson, Davis, At. Data Nucl. Data Tables 54, 181 (1993). */
export function relativisticLimit(atomicNumber: number): number {
  return atomicNumber - (atomicNumber / 82.5) ** 2.37;
}

export interface DispersionNodes {
  /** eV, ascending; jumps stand twice. */
  readonly energies: Float64Array;
  /** ε f2(ε), eV × electrons. */
  readonly g: Float64Array;
  /** Of each piece's two Gauss points: ε², and g times half the piece's width. */
  readonly gaussSquares: Float64Array;
  readonly gaussWeights: Float64Array;
}

/**
 * Nodes for the integral: all rows, subdivided, refined towards every jump, with the tail.
 * @param f2At electrons at an energy in eV, below or above a jump
 */
export function dispersionNodes(
  energiesEv: readonly number[],
  jumpsEv: ReadonlySet<number>,
  f2At: (energyEv: number, side: Side) => number,
): DispersionNodes {
  const inner = new Set<number>();
  for (let index = 0; index + 1 < energiesEv.length; index++) {
    const [from, to] = [energiesEv[index]!, energiesEv[index + 1]!];
    inner.add(from);
    const parts = partsOf(from, to, from * f2At(from, "above"), to * f2At(to, "below"));
    for (let part = 1; part < parts; part++) inner.add(from * (to / from) ** (part / parts));
    if (jumpsEv.has(from)) for (let d = NEAREST_TO_EDGE_EV; d < (to - from) / 2; d *= EDGE_GROWTH) inner.add(from + d);
    if (jumpsEv.has(to)) for (let d = NEAREST_TO_EDGE_EV; d < (to - from) / 2; d *= EDGE_GROWTH) inner.add(to - d);
  }
  const end = energiesEv.at(-1)!;
  for (let energy = end; energy < TAIL_END_EV; energy *= 1.02) inner.add(energy);
  inner.add(TAIL_END_EV);
  const nodes = [...inner].sort((a, b) => a - b);
  const energies: number[] = [];
  const g: number[] = [];
  const before = energiesEv.at(-2)!;
  const slope = Math.log(f2At(end, "below") / f2At(before, "above")) / Math.log(end / before);
  for (const energy of nodes) {
    if (energy > end) {
      energies.push(energy);
      g.push(energy * f2At(end, "below") * (energy / end) ** slope);
      continue;
    }
    if (jumpsEv.has(energy)) {
      energies.push(energy, energy);
      g.push(energy * f2At(energy, "below"), energy * f2At(energy, "above"));
    } else {
      energies.push(energy);
      g.push(energy * f2At(energy, "above"));
    }
  }
  return { energies: Float64Array.from(energies), g: Float64Array.from(g), ...gaussPoints(energies, g) };
}

/** The chord of ε^p between energies whose logarithms differ by w departs from it by p(p−1)/8 w² of its value. */
function partsOf(from: number, to: number, gFrom: number, gTo: number): number {
  if (!(gFrom > 0 && gTo > 0)) return SUBDIVISIONS;
  const width = Math.log(to / from);
  const power = Math.log(gTo / gFrom) / width;
  return Math.max(SUBDIVISIONS, Math.ceil(width * Math.sqrt(Math.abs(power * (power - 1)) / (8 * CHORD_ERROR))));
}

function gaussPoints(
  energies: readonly number[],
  g: readonly number[],
): Pick<DispersionNodes, "gaussSquares" | "gaussWeights"> {
  const gaussSquares = new Float64Array(2 * energies.length);
  const gaussWeights = new Float64Array(2 * energies.length);
  const shares = [0.5 - Math.sqrt(1 / 12), 0.5 + Math.sqrt(1 / 12)];
  for (let index = 0; index + 1 < energies.length; index++) {
    const start = energies[index]!;
    const width = energies[index + 1]! - start;
    for (const [point, share] of shares.entries()) {
      gaussSquares[2 * index + point] = (start + share * width) ** 2;
      gaussWeights[2 * index + point] = (g[index]! + share * (g[index + 1]! - g[index]!)) * (width / 2);
    }
  }
  return { gaussSquares, gaussWeights };
}

/** The integral at `energyEv`, which must not be a node. Electrons. */
export function f1At(nodes: DispersionNodes, atomicNumber: number, energyEv: number): number {
  const { energies, g, gaussSquares, gaussWeights } = nodes;
  const square = energyEv * energyEv;
  let sum = 0;
  for (let index = 0; index + 1 < energies.length; index++) {
    const start = energies[index]!;
    const end = energies[index + 1]!;
    const width = end - start;
    if (width === 0) continue;
    const distance = energyEv < start ? start - energyEv : energyEv - end;
    if (width < NARROW * distance) {
      const point = 2 * index;
      sum +=
        gaussWeights[point]! / (square - gaussSquares[point]!) +
        gaussWeights[point + 1]! / (square - gaussSquares[point + 1]!);
      continue;
    }
    const m = (g[index + 1]! - g[index]!) / width;
    const c = g[index]! - m * start;
    const minus = Math.log(Math.abs((energyEv - end) / (energyEv - start)));
    const plus = Math.log((energyEv + end) / (energyEv + start));
    sum += (c / (2 * energyEv)) * (plus - minus) - (m / 2) * (minus + plus);
  }
  return relativisticLimit(atomicNumber) + (2 / Math.PI) * sum;
}
