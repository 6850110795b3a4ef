/**
 * f1 from f2 by the dispersion integral (PHYSICS 2.2):
 * f1(E) = Z* + (2/π) P∫ ε f2(ε)/(E² − ε²) dε, Z* = Z − (Z/82.5)^2.37 (relativistic term as in Henke et al. 1993).
 *
 * With g(ε) = ε f2(ε) taken linear between close nodes, the principal value of each piece is exact:
 * ∫ (c + mε)/(E² − ε²) dε = c/(2E) ln|(E+ε)/(E−ε)| − (m/2) ln|E² − ε²|.
 */
import type { Side } from "./grid-function.ts";

/** Parts of every log-log segment. */
const SUBDIVISIONS = 12;
/** Distances from an edge at which nodes stand grow by this factor from 1 meV. */
const EDGE_GROWTH = 1.6;
const NEAREST_TO_EDGE_EV = 1e-3;
/** The photoelectric tail is continued to here by its power law. */
const TAIL_END_EV = 1e8;

/** High-energy limit of f1, electrons. Henke, Gullikson, Davis, At. Data Nucl. Data Tables 54, 181 (1993). */
export function relativisticLimit(atomicNumber: number): number {
  return atomicNumber - (atomicNumber / 82.5) ** 2.37;
}

export interface DispersionNodes {
  /** eV, ascending; jumps stand twice. */
  readonly energies: Float64Array;
  /** ε f2(ε), eV × electrons. */
  readonly g: Float64Array;
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
    for (let part = 1; part < SUBDIVISIONS; part++) inner.add(from * (to / from) ** (part / SUBDIVISIONS));
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
  return { energies: Float64Array.from(energies), g: Float64Array.from(g) };
}

/** The integral at `energyEv`, which must not be a node. Electrons. */
export function f1At(nodes: DispersionNodes, atomicNumber: number, energyEv: number): number {
  const { energies, g } = nodes;
  let sum = 0;
  let logMinus = Math.log(Math.abs(energyEv - energies[0]!));
  let logPlus = Math.log(energyEv + energies[0]!);
  for (let index = 0; index + 1 < energies.length; index++) {
    const start = energies[index]!;
    const end = energies[index + 1]!;
    if (end === start) continue;
    const nextMinus = Math.log(Math.abs(energyEv - end));
    const nextPlus = Math.log(energyEv + end);
    const m = (g[index + 1]! - g[index]!) / (end - start);
    const c = g[index]! - m * start;
    sum +=
      (c / (2 * energyEv)) * (nextPlus - nextMinus - logPlus + logMinus) -
      (m / 2) * (nextMinus + nextPlus - logMinus - logPlus);
    logMinus = nextMinus;
    logPlus = nextPlus;
  }
  return relativisticLimit(atomicNumber) + (2 / Math.PI) * sum;
}
