/** Binding energies (Larkins 1977), yields, Coster–Kronig probabilities, lines and their shares (EADL97), by element. */
import type { RelaxationData } from "./energy-absorption.ts";
import { column, readSpecFile, type SpecScan } from "./spec-file.ts";

export interface RelaxationFiles {
  readonly bindingEnergies: string;
  readonly kConstants: string;
  readonly kRates: string;
  readonly lConstants: string;
  readonly lRates: string;
  readonly mConstants: string;
}

export interface ShellRow {
  readonly atomicNumber: number;
  readonly shell: string;
  readonly edgeEnergyEv: number;
  readonly fluorescenceYield: number | null;
}
export interface LineRow {
  readonly atomicNumber: number;
  readonly shell: string;
  readonly line: string;
  readonly energyEv: number;
  readonly rate: number;
}

export class Relaxation {
  private readonly bindings: SpecScan;
  private readonly kYields: SpecScan;
  private readonly kRates: SpecScan;
  private readonly l: readonly SpecScan[];
  private readonly lRates: readonly SpecScan[];
  private readonly m: readonly SpecScan[];

  constructor(files: RelaxationFiles) {
    const scans = (text: string): SpecScan[] => readSpecFile(text);
    this.bindings = scans(files.bindingEnergies)[0]!;
    this.kYields = scans(files.kConstants)[0]!;
    this.kRates = scans(files.kRates)[0]!;
    this.l = scans(files.lConstants);
    this.lRates = scans(files.lRates);
    this.m = scans(files.mConstants);
  }

  /** Measured binding energy, eV; 0 where the compilation has none. The file is in keV with five decimals. */
  bindingEv(atomicNumber: number, shell: string): number {
    return Math.round(valueOf(this.bindings, atomicNumber, shell) * 1e5) / 100;
  }

  shellNames(): string[] {
    return this.bindings.labels.slice(1);
  }

  dataOf(atomicNumber: number): RelaxationData {
    const binding = (shell: string): number => this.bindingEv(atomicNumber, shell);
    const total = valueOf(this.kRates, atomicNumber, "TOTAL");
    const shareOf = (keep: (label: string) => boolean): number =>
      total > 0 ? sumOf(this.kRates, atomicNumber, keep) / total : 0;
    const [l1, l2, l3] = this.l;
    return {
      bindingEv: {
        K: binding("K"),
        L1: binding("L1"),
        L2: binding("L2"),
        L3: binding("L3"),
        M1: binding("M1"),
        M5: binding("M5"),
      },
      yields: {
        K: lastOf(this.kYields, atomicNumber),
        L1: lastOf(l1!, atomicNumber),
        L2: lastOf(l2!, atomicNumber),
        L3: lastOf(l3!, atomicNumber),
      },
      costerKronig: {
        f12: valueOf(l1!, atomicNumber, "f12"),
        f13: valueOf(l1!, atomicNumber, "f13"),
        f23: valueOf(l2!, atomicNumber, "f23"),
      },
      kShares: {
        KL2: shareOf((label) => label === "KL2"),
        KL3: shareOf((label) => label === "KL3"),
        KM: shareOf((label) => /^KM\d$/.test(label)),
        KN: shareOf((label) => /^K[N-Q]\d+$/.test(label)),
      },
    };
  }

  /** Shells with a binding energy, highest first; yields of K, L and M where the source gives one above 0. */
  shellsOf(atomicNumber: number): ShellRow[] {
    const yields: Record<string, number> = { ...this.dataOf(atomicNumber).yields };
    for (const [index, scan] of this.m.entries()) yields[`M${index + 1}`] = lastOf(scan, atomicNumber);
    return this.shellNames()
      .map((shell) => ({
        atomicNumber,
        shell,
        edgeEnergyEv: this.bindingEv(atomicNumber, shell),
        fluorescenceYield: yields[shell] || null,
      }))
      .filter((row) => row.edgeEnergyEv > 0)
      .sort((a, b) => b.edgeEnergyEv - a.edgeEnergyEv);
  }

  /** Emission lines of K and L: energy as the difference of binding energies, rate as share of the shell's emission. */
  linesOf(atomicNumber: number): LineRow[] {
    return [this.kRates, ...this.lRates].flatMap((scan, index) => {
      const shell = ["K", "L1", "L2", "L3"][index]!;
      const total = valueOf(scan, atomicNumber, "TOTAL");
      if (!(total > 0)) return [];
      return scan.labels.slice(2).flatMap((label) => {
        const upper = label.slice(shell.length);
        const rate = valueOf(scan, atomicNumber, label) / total;
        const energyEv = this.bindingEv(atomicNumber, shell) - this.bindingEv(atomicNumber, upper);
        const known =
          this.bindingEv(atomicNumber, shell) > 0 &&
          this.bindings.labels.includes(upper) &&
          this.bindingEv(atomicNumber, upper) > 0;
        return rate > 1e-4 && known && energyEv > 0
          ? [{ atomicNumber, shell, line: `${shell}-${upper}`, energyEv, rate }]
          : [];
      });
    });
  }
}

function rowOf(scan: SpecScan, atomicNumber: number): readonly number[] {
  return scan.rows.find((row) => row[0] === atomicNumber) ?? [];
}

function valueOf(scan: SpecScan, atomicNumber: number, label: string): number {
  const at = scan.labels.indexOf(label);
  return at < 0 ? 0 : (rowOf(scan, atomicNumber)[at] ?? 0);
}

const lastOf = (scan: SpecScan, atomicNumber: number): number => rowOf(scan, atomicNumber).at(-1) ?? 0;

function sumOf(scan: SpecScan, atomicNumber: number, keep: (label: string) => boolean): number {
  return scan.labels.reduce(
    (sum, label, index) => (keep(label) ? sum + (rowOf(scan, atomicNumber)[index] ?? 0) : sum),
    0,
  );
}

/** Raw EPDL97 columns of one scan in the shape that the alignment takes. */
export function rawCrossSections(scan: SpecScan) {
  const of = (label: string): number[] => column(scan, label);
  return {
    energiesEv: of("PhotonEnergy").map((energyKeV) => Number((energyKeV * 1000).toPrecision(9))),
    coherent: of("Rayleigh"),
    incoherent: of("Compton"),
    photoelectric: of("Photoelectric"),
    subshells: {
      K: of("K"),
      L1: of("L1"),
      L2: of("L2"),
      L3: of("L3"),
      M1: of("M1"),
      M2: of("M2"),
      M3: of("M3"),
      M4: of("M4"),
      M5: of("M5"),
    },
  };
}
