/**
 * Atomic weights by which the cross sections' source turned barn per atom into cm²/g. Multiplying by them gives back what
 * the evaluation states per atom; the standard weight would not, where the source took another one.
 */
import { elementByNumber } from "#src/lib/physics/elements.ts";

/**
 * g/mol, where the source's weight is not the standard one by more than 0.1 %. Found from its incoherent columns: at 300 and
 * 480 keV incoherent scattering per electron is a smooth function of Z to 1e-4 (Klein–Nishina less a little binding), and
 * only these elements stand off it, by −2.1, −0.6, −0.8, +2.0 and +0.4 %. Elsewhere the two weights agree to 0.08 %.
 */
const SOURCE_WEIGHTS: ReadonlyMap<number, number> = new Map([
  [43, 99],
  [44, 101.7],
  [91, 233],
  [94, 239.05],
  [95, 242],
]);

/** Weight in g/mol that takes the source's cm²/g back to an atom's cross section. */
export function sourceWeight(atomicNumber: number): number {
  return SOURCE_WEIGHTS.get(atomicNumber) ?? elementByNumber(atomicNumber).standardAtomicWeight;
}
