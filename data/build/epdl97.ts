/** One element of the `epdl97` tabulation: aligned edges, f2, f1, scattering and energy absorption, thinned to rows. */
import { AVOGADRO, CLASSICAL_ELECTRON_RADIUS, PLANCK_TIMES_LIGHT } from "#src/lib/physics/constants.ts";
import { type AlignedPhotoelectric, alignEdges, type RawCrossSections, type Subshell } from "./align-edges.ts";
import { dispersionNodes, f1At } from "./dispersion.ts";
import { escapingFluorescenceEv, kleinNishinaEnergyShare, type RelaxationData } from "./energy-absorption.ts";
import { GridFunction, type Side } from "./grid-function.ts";
import { sourceWeight } from "./source-weights.ts";
import { densify, EXEMPT_EV, type Row, thin } from "./thin.ts";

export const RANGE_EV: readonly [number, number] = [100, 450_000];

/** First candidates for the thinned grid stand this close, as a share of the energy … */
const STEP = 10 ** (1 / 100) - 1;
/** … and of the distance to the nearest jump, towards which f1 runs as its logarithm. */
const STEP_NEAR_JUMP = 0.1;
/** Distances from a jump, eV, inside the band where no accuracy is stated. */
const INNERMOST_EV = [0.5, 1, 1.5];
/** Energies this close to a jump are kept to 0.01 eV, as the jumps themselves; others to six digits. */
const FINE_WITHIN_EV = 100;
/** At an edge f1 runs to a logarithmic pole; its two rows carry f1 at this distance from it. */
const AT_EDGE_EV = 0.1;

export interface ElementSource {
  readonly atomicNumber: number;
  readonly raw: RawCrossSections;
  readonly measuredEv: Readonly<Partial<Record<Subshell, number>>>;
  readonly relaxation: RelaxationData;
}

export interface ElementTable {
  readonly rows: readonly Row[];
  readonly aligned: AlignedPhotoelectric;
}

export interface ElementCalculation {
  readonly aligned: AlignedPhotoelectric;
  /** Everything at one energy in eV, not interpolated; `side` says which side of a jump. */
  readonly rowAt: (energyEv: number, side: Row["side"]) => Row;
}

/** The full calculation of one element, from which the rows of its table are chosen. */
export function calculateElement({ atomicNumber, raw, measuredEv, relaxation }: ElementSource): ElementCalculation {
  const aligned = alignEdges(raw, measuredEv);
  const perAtomM2 = (sourceWeight(atomicNumber) / AVOGADRO.value) * 1e-4;
  const f2PerCm2PerGEv = perAtomM2 / (2 * CLASSICAL_ELECTRON_RADIUS.value * PLANCK_TIMES_LIGHT.value);
  const f2At = (energyEv: number, side: Side): number => aligned.at(energyEv, side) * energyEv * f2PerCm2PerGEv;
  const nodes = dispersionNodes(aligned.energiesEv, aligned.jumpsEv, f2At);
  const coherent = new GridFunction(raw.energiesEv, raw.coherent);
  const incoherent = new GridFunction(raw.energiesEv, raw.incoherent);
  const escaping = escapingFluorescenceEv(relaxation);
  const barn = perAtomM2 * 1e28;

  const rowAt = (energyEv: number, side: Row["side"]): Row => {
    const reading: Side = side === "below" ? "below" : "above";
    const scattered = incoherent.at(energyEv, reading);
    let absorbed = aligned.at(energyEv, reading) + scattered * kleinNishinaEnergyShare(energyEv);
    for (const shell of aligned.shells) {
      if (shell.shell in escaping)
        absorbed -= (shell.at(energyEv, reading) * escaping[shell.shell as keyof typeof escaping]) / energyEv;
    }
    const offset = side === "below" ? -AT_EDGE_EV : side === "above" ? AT_EDGE_EV : 0;
    return {
      energyEv,
      side,
      f1: f1At(nodes, atomicNumber, offNode(energyEv + offset)),
      f2: f2At(energyEv, reading),
      coherentBarn: coherent.at(energyEv, reading) * barn,
      incoherentBarn: scattered * barn,
      energyAbsorptionBarn: absorbed * barn,
    };
  };
  return { aligned, rowAt };
}

/** The rows of one element's table: both sides of every jump, and as few others as its accuracy needs. */
export function buildElement(source: ElementSource): ElementTable {
  const { aligned, rowAt } = calculateElement(source);
  const jumps = [...aligned.jumpsEv].sort((a, b) => a - b);
  const borders = [RANGE_EV[0], ...jumps.filter((energy) => energy > RANGE_EV[0] && energy < RANGE_EV[1]), RANGE_EV[1]];
  const rows: Row[] = [];
  for (let index = 0; index + 1 < borders.length; index++) {
    const [from, to] = [borders[index]!, borders[index + 1]!];
    const first = [
      rowAt(from, index === 0 ? "" : "above"),
      ...candidatesBetween(from, to, aligned.energiesEv, jumps).map((energy) => rowAt(energy, "")),
      rowAt(to, index + 2 === borders.length ? "" : "below"),
    ];
    // Where f2 has a kink f1 has a cusp, and near jumps it bends: candidates close in there.
    const candidates = densify(first, jumps, (a, b) => {
      const energy = printedEnergy(Math.sqrt(a.energyEv * b.energyEv), distanceToJump(a.energyEv, jumps));
      return energy > a.energyEv && energy < b.energyEv ? rowAt(energy, "") : null;
    });
    rows.push(...thin(candidates, jumps));
  }
  return { rows, aligned };
}

const distanceToJump = (energyEv: number, jumps: readonly number[]): number =>
  jumps.reduce((least, jump) => Math.min(least, Math.abs(jump - energyEv)), Infinity);

const printedEnergy = (energyEv: number, distanceEv: number): number =>
  distanceEv <= FINE_WITHIN_EV ? Math.round(energyEv * 100) / 100 : Number(energyEv.toPrecision(6));

/** Energies between two borders: the source's own and a walk that slows towards jumps, also those outside the range. */
export function candidatesBetween(
  from: number,
  to: number,
  tabulated: readonly number[],
  jumps: readonly number[],
): number[] {
  const lower = jumps.findLast((jump) => jump <= from) ?? -Infinity;
  const upper = jumps.find((jump) => jump >= to) ?? Infinity;
  const distanceOf = (energy: number): number => Math.min(energy - lower, upper - energy);
  const found = tabulated.filter((energy) => energy > from && energy < to);
  for (const distance of INNERMOST_EV) found.push(lower + distance, upper - distance);
  let energy = Math.max(from, lower + EXEMPT_EV);
  while (energy < Math.min(to, upper - EXEMPT_EV)) {
    found.push(energy);
    energy += Math.min(STEP * energy, STEP_NEAR_JUMP * distanceOf(energy));
  }
  found.push(upper - EXEMPT_EV);
  const printed = found.map((value) => printedEnergy(value, distanceOf(value)));
  return [...new Set(printed)].filter((value) => value > from && value < to).sort((a, b) => a - b);
}

/** The integral must not be taken exactly on a node; f1 is smooth there, so a shift of 1e-9 is of no account. */
function offNode(energyEv: number): number {
  return energyEv * (1 + 1e-9);
}
