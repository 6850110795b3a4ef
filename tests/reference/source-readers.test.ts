/** Readers of the source files, on verbatim excerpts of them, and the stored tables against the committed rows. */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { alignEdges } from "#data/build/align-edges.ts";
import { committedTables, tableRows } from "#data/build/committed-tables.ts";
import { rawCrossSections, Relaxation } from "#data/build/relaxation.ts";
import type { StoredElement } from "#data/build/sources.ts";
import { readSpecFile } from "#data/build/spec-file.ts";
import { atomicNumberOf, factorsRows, storedValue } from "#data/build/stored-factors.ts";

const excerpt = (name: string): string =>
  readFileSync(new URL(`./fixtures/source-text/${name}.txt`, import.meta.url), "utf8");

const relaxation = new Relaxation({
  bindingEnergies: excerpt("bindingEnergies"),
  kConstants: excerpt("kConstants"),
  kRates: excerpt("kRates"),
  lConstants: excerpt("lConstants"),
  lRates: excerpt("lRates"),
  mConstants: excerpt("mConstants"),
});

describe("cross sections near aluminium's K edge", () => {
  const raw = rawCrossSections(readSpecFile(excerpt("crossSections"))[0]!);

  it("are read in eV, the calculated edge twice, the K shell from there on", () => {
    const edge = raw.energiesEv.indexOf(1549.9);
    expect(raw.energiesEv[edge + 1]).toBe(1549.9);
    expect([raw.subshells.K[edge], raw.subshells.K[edge + 1]! > 3000]).toEqual([0, true]);
    expect(raw.photoelectric[edge + 1]! - raw.photoelectric[edge]!).toAgreeWithin(raw.subshells.K[edge + 1]!, 1e-5);
  });

  it("jump at the measured 1559.6 eV once the edge has moved, and are as before above both", () => {
    const moved = alignEdges(raw, { K: relaxation.bindingEv(13, "K") });
    const still = alignEdges(raw, {});
    expect([...moved.jumpsEv].sort((a, b) => a - b).at(-1)).toBe(1559.6);
    expect(moved.jumpsEv.has(1549.9)).toBe(false);
    expect(still.jumpsEv.has(1549.9)).toBe(true);
    expect(moved.at(1555, "above")).toBeLessThan(still.at(1555, "above") / 8);
    expect(moved.at(1559.6, "above") / moved.at(1559.6, "below")).toBeGreaterThan(8);
    expect(moved.at(1580, "above")).toBe(still.at(1580, "above"));
  });

  it("go on below their calculated onset by their power law where the measured one is lower", () => {
    const lowered = alignEdges(raw, { K: 1540 });
    const shell = lowered.shells.find(({ shell }) => shell === "K")!;
    const slope = (a: number, b: number) => Math.log(shell.at(b, "above") / shell.at(a, "above")) / Math.log(b / a);
    expect(slope(1540, 1549)).toAgreeWithin(slope(1549.95, 1550.5), 1e-6);
    expect(shell.at(1539.9, "above")).toBe(0);
  });

  it("keep an edge where the two energies differ by more than 15 % or lie below 60 eV", () => {
    for (const measured of [1549.9 * 1.16, 1549.9 / 1.18, 0, 59]) {
      expect(alignEdges(raw, { K: measured }).jumpsEv.has(1549.9), String(measured)).toBe(true);
    }
  });
});

describe("shells and lines", () => {
  it("carry the published binding energies, yields and rates", () => {
    expect(relaxation.bindingEv(13, "K")).toBe(1559.6);
    expect(relaxation.bindingEv(79, "L3")).toBe(11_918.7);
    const gold = relaxation.dataOf(79);
    expect(gold.yields).toEqual({ K: 0.96128, L1: 0.082163, L2: 0.36326, L3: 0.31946 });
    expect(gold.costerKronig).toEqual({ f12: 0.069952, f13: 0.70123, f23: 0.12848 });
    expect(relaxation.shellsOf(79).find(({ shell }) => shell === "M5")).toMatchObject({
      edgeEnergyEv: 2205.7,
      fluorescenceYield: 0.026133,
    });
    expect(relaxation.shellsOf(79).find(({ shell }) => shell === "N1")?.fluorescenceYield).toBeNull();
  });

  it("give the K shell's shares of emission, which add up to all of it", () => {
    const { KL2, KL3, KM, KN } = relaxation.dataOf(79).kShares;
    // What is missing is the forbidden K-L1.
    expect(KL2 + KL3 + KM + KN).toAgreeWithin(1, 1e-3);
    expect(KL3).toBeGreaterThan(KL2);
  });

  it("are the committed rows of these elements", () => {
    const written = (value: number | null): string => (value === null ? "" : String(Number(value.toPrecision(9))));
    for (const atomicNumber of [13, 79]) {
      const mine = (name: string) => tableRows(name).rows.filter(([first]) => first === String(atomicNumber));
      expect(mine("shells.tsv").map((row) => row.slice(1))).toEqual(
        relaxation
          .shellsOf(atomicNumber)
          .map((row) => [row.shell, written(row.edgeEnergyEv), written(row.fluorescenceYield)]),
      );
      expect(mine("lines.tsv").map((row) => row.slice(2, 4))).toEqual(
        relaxation.linesOf(atomicNumber).map((row) => [row.line, written(row.energyEv)]),
      );
    }
  });
});

describe("stored tables", () => {
  const stored = JSON.parse(readFileSync(new URL("./fixtures/stored-factors.json", import.meta.url), "utf8")) as Record<
    "henke93" | "chantler95",
    Record<string, StoredElement>
  >;
  const CASES = [
    ["henke93", [30, 30_000], { f1: 1e-4, f2: 1e-6 }],
    ["chantler95", [10, 433_000], { f1: 1e-6, f2: 1e-6 }],
  ] as const;

  it.each(CASES)("of %s give the committed rows again", (key, rangeEv, clippedAt) => {
    const written = (value: number | null): string => (value === null ? "" : String(Number(value.toPrecision(6))));
    for (const [symbol, element] of Object.entries(stored[key])) {
      const atomicNumber = String(atomicNumberOf(symbol));
      const committed = tableRows(`${key}.tsv`).rows.filter(([first]) => first === atomicNumber);
      const rows = factorsRows(element, rangeEv, clippedAt);
      expect(
        rows.map((row) => [atomicNumber, String(row.energyEv), row.side, written(row.f1), written(row.f2)]),
      ).toEqual(committed);
      expect(rows.length).toBeGreaterThan(100);
    }
  });

  it("leave out what was clipped: f1 of silicon is negative at its L edges, which no logarithm can hold", () => {
    for (const [key, rangeEv, clippedAt] of CASES) {
      const silicon = factorsRows(stored[key].si!, rangeEv, clippedAt);
      const missing = silicon.filter((row) => row.f1 === null);
      expect(missing.length, key).toBeGreaterThan(5);
      expect(missing.some((row) => row.energyEv > 95 && row.energyEv < 110 && row.f2 !== null)).toBe(true);
      expect(Math.min(...silicon.flatMap((row) => row.f1 ?? []))).toBeGreaterThan(clippedAt.f1);
    }
    expect(storedValue(Math.log(1e-6), 1e-6)).toBeNull();
    expect(storedValue(Math.log(1.1e-6), 1e-6)).toAgreeWithin(1.1e-6, 1e-12);
  });

  it("repeat no value as often as a clipped one would be", () => {
    for (const key of ["henke93", "chantler95"] as const) {
      for (const { atomicNumber, f1, f2 } of committedTables().tabulations[key].elements.values()) {
        for (const column of [f1, f2]) {
          const least = column.reduce((low, value) => Math.min(low, Number.isNaN(value) ? Infinity : value), Infinity);
          if (least > 0.01) continue;
          const times = column.filter((value) => value === least).length;
          expect(times, `${key} ${atomicNumber}: ${least} stands ${times} times`).toBeLessThan(3);
        }
      }
    }
  });

  it("keep both sides of an edge that stands twice: molybdenum's K edge in henke93", () => {
    const edge = factorsRows(stored.henke93.mo!, [30, 30_000], { f1: 1e-4, f2: 1e-6 }).filter(
      (row) => row.energyEv === 20_000,
    );
    expect(edge.map((row) => row.side)).toEqual(["below", "above"]);
    expect(edge[1]!.f2! / edge[0]!.f2!).toBeGreaterThan(5);
  });
});
