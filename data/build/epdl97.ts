/** One element of the `epdl97` tabulation: aligned edges, f2, f1, scattering and energy absorption, thinned to rows. */
import { AVOGADRO, CLASSICAL_ELECTRON_RADIUS, PLANCK_TIMES_LIGHT } from "#src/lib/physics/constants.ts";
import { elementByNumber } from "#src/lib/physics/elements.ts";
import { type AlignedPhotoelectric, alignEdges, type RawCrossSections, type Subshell } from "./align-edges.ts";
import { dispersionNodes, f1At } from "./dispersion.ts";
import { escapingFluorescenceEv, kleinNishinaEnergyShare, type RelaxationData } from "./energy-absorption.ts";
import { GridFunction, type Side } from "./grid-function.ts";
import { type Row, thin } from "./thin.ts";

export const RANGE_EV: readonly [number, number] = [100, 450_000];

/** Candidates for the thinned grid: this many a decade, and these distances from every jump in eV. */
const CANDIDATES_PER_DECADE = 400;
const EDGE_DISTANCES_EV = [0.5, 1, 1.5, 2.001, 2.5, 3, 4, 5, 6.5, 8, 10, 13, 16, 20, 26, 34, 44, 58, 76, 100];
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

export function buildElement({ atomicNumber, raw, measuredEv, relaxation }: ElementSource): ElementTable {
  const aligned = alignEdges(raw, measuredEv);
  const perAtomM2 = (elementByNumber(atomicNumber).standardAtomicWeight / AVOGADRO.value) * 1e-4;
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

  const jumps = [...aligned.jumpsEv]
    .filter((energy) => energy > RANGE_EV[0] && energy < RANGE_EV[1])
    .sort((a, b) => a - b);
  const borders = [RANGE_EV[0], ...jumps, RANGE_EV[1]];
  const rows: Row[] = [];
  for (let index = 0; index + 1 < borders.length; index++) {
    const [from, to] = [borders[index]!, borders[index + 1]!];
    const inner = candidatesBetween(from, to, aligned.energiesEv, jumps);
    const stretch = [
      rowAt(from, index === 0 ? "" : "above"),
      ...inner.map((energy) => rowAt(energy, "")),
      rowAt(to, index + 2 === borders.length ? "" : "below"),
    ];
    rows.push(...thin(stretch, jumps));
  }
  return { rows, aligned };
}

function candidatesBetween(from: number, to: number, tabulated: readonly number[], jumps: readonly number[]): number[] {
  const found = new Set<number>(tabulated.filter((energy) => energy > from && energy < to));
  const count = Math.ceil(Math.log10(to / from) * CANDIDATES_PER_DECADE);
  for (let step = 1; step < count; step++) found.add(from * (to / from) ** (step / count));
  for (const distance of EDGE_DISTANCES_EV) {
    if (jumps.includes(from) && from + distance < to) found.add(from + distance);
    if (jumps.includes(to) && to - distance > from) found.add(to - distance);
  }
  // Rows are printed to six digits: two candidates must not fall on one printed energy, nor on a border's.
  const printed = new Set<number>([Number(from.toPrecision(6)), Number(to.toPrecision(6))]);
  return [...found]
    .sort((a, b) => a - b)
    .map((energy) => Number(energy.toPrecision(6)))
    .filter((energy) => energy > from && energy < to && !printed.has(energy) && printed.add(energy));
}

/** The integral must not be taken exactly on a node; f1 is smooth there, so a shift of 1e-9 is of no account. */
function offNode(energyEv: number): number {
  return energyEv * (1 + 1e-9);
}
