/**
 * Edge alignment of EPDL97 (PHYSICS 2.1): every sub-shell's onset moves from its calculated to its measured binding energy
 * (Larkins 1977). Above both onsets nothing changes; between them the sub-shell follows its own power law or is zero.
 */
import { GridFunction, interpolate, type Side } from "./grid-function.ts";

export const SUBSHELLS = ["K", "L1", "L2", "L3", "M1", "M2", "M3", "M4", "M5"] as const;
export type Subshell = (typeof SUBSHELLS)[number];

/** Beyond this relative distance, or below this energy, the two onsets are not taken for the same edge. */
const LARGEST_SHIFT = 0.15;
const LOWEST_EDGE_EV = 60;

/** Raw rows of one element: energies in eV ascending with repeats at edges, cross sections in cm²/g. */
export interface RawCrossSections {
  readonly energiesEv: readonly number[];
  readonly coherent: readonly number[];
  readonly incoherent: readonly number[];
  readonly photoelectric: readonly number[];
  readonly subshells: Readonly<Record<Subshell, readonly number[]>>;
}

export interface AlignedShell {
  readonly shell: Subshell;
  /** Where the sub-shell now begins, eV. */
  readonly onsetEv: number;
  readonly moved: boolean;
  readonly at: (energyEv: number, side: Side) => number;
}

export interface AlignedPhotoelectric {
  readonly shells: readonly AlignedShell[];
  /** Ascending, each once. */
  readonly energiesEv: readonly number[];
  /** Energies of jumps, which need both sides. */
  readonly jumpsEv: ReadonlySet<number>;
  readonly at: (energyEv: number, side: Side) => number;
}

/** @param measuredEv binding energies of Larkins 1977 by sub-shell, eV; 0 or missing: none */
export function alignEdges(
  raw: RawCrossSections,
  measuredEv: Readonly<Partial<Record<Subshell, number>>>,
): AlignedPhotoelectric {
  const shells = SUBSHELLS.flatMap((shell) => alignShell(shell, raw, measuredEv[shell] ?? 0));
  const remainder = remainderOf(raw);
  const movedFrom = new Set(shells.filter((shell) => shell.moved).map((shell) => shell.calculatedEv));
  const jumps = new Set<number>();
  for (const [index, energy] of raw.energiesEv.entries()) {
    if (raw.energiesEv[index + 1] === energy && !movedFrom.has(energy)) jumps.add(energy);
  }
  for (const shell of shells) jumps.add(shell.onsetEv);
  const energiesEv = [...new Set([...raw.energiesEv, ...jumps])].sort((a, b) => a - b);
  const at = (energyEv: number, side: Side): number =>
    shells.reduce((sum, shell) => sum + shell.at(energyEv, side), remainder.at(energyEv, side));
  return { shells, energiesEv, jumpsEv: jumps, at };
}

function alignShell(
  shell: Subshell,
  raw: RawCrossSections,
  measured: number,
): (AlignedShell & { calculatedEv: number })[] {
  const values = raw.subshells[shell];
  const first = values.findIndex((value) => value > 0);
  if (first < 0) return [];
  const energies = raw.energiesEv.slice(first);
  const own = new GridFunction(energies, values.slice(first));
  const calculatedEv = energies[0]!;
  const moved =
    measured >= LOWEST_EDGE_EV &&
    calculatedEv >= LOWEST_EDGE_EV &&
    Math.abs(measured / calculatedEv - 1) <= LARGEST_SHIFT;
  const onsetEv = moved ? measured : calculatedEv;
  const second = energies.findIndex((energy) => energy > calculatedEv);
  const at = (energyEv: number, side: Side): number => {
    if (energyEv < onsetEv || (energyEv === onsetEv && side === "below")) return 0;
    if (energyEv < calculatedEv)
      return interpolate(calculatedEv, own.values[0]!, energies[second]!, own.values[second]!, energyEv);
    return own.at(energyEv, "above");
  };
  return [{ shell, onsetEv, moved, calculatedEv, at }];
}

/** What is left of the photoelectric cross section after K to M5: the outer shells, which stay where they are. */
function remainderOf(raw: RawCrossSections): GridFunction {
  const rest = raw.photoelectric.map((total, index) => {
    const inner = SUBSHELLS.reduce((sum, shell) => sum + (raw.subshells[shell][index] ?? 0), 0);
    // Six printed digits: a remainder below their rounding is none.
    const left = total - inner;
    return left > 2e-6 * total ? left : 0;
  });
  return new GridFunction(raw.energiesEv, rest);
}
