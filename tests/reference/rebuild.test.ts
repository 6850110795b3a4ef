/** The committed rows come out of the build's pure steps again, from raw rows kept as fixtures. */
import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { tableRows } from "#data/build/committed-tables.ts";
import { buildElement, type ElementSource } from "#data/build/epdl97.ts";

const FOLDER = new URL("./fixtures/raw/", import.meta.url);
const { rows } = tableRows("epdl97.tsv");

describe("a rebuild from raw rows", () => {
  const files = readdirSync(FOLDER);
  it.each(files)("of %s gives the committed rows", (file) => {
    const source = JSON.parse(readFileSync(new URL(file, FOLDER), "utf8")) as ElementSource;
    const committed = rows.filter((row) => row[0] === String(source.atomicNumber));
    const built = buildElement(source).rows;
    expect(built).toHaveLength(committed.length);
    for (const [index, row] of built.entries()) {
      const [, energyEv, side, ...values] = committed[index]!;
      expect(row.energyEv).toAgreeWithin(Number(energyEv), 1e-8);
      expect(row.side).toBe(side);
      // Six digits are printed.
      for (const [at, value] of [
        row.f1,
        row.f2,
        row.coherentBarn,
        row.incoherentBarn,
        row.energyAbsorptionBarn,
      ].entries()) {
        expect(value, `row ${index} column ${at}`).toAgreeWithin(Number(values[at]), 6e-6);
      }
    }
  });

  it("moves aluminium's K edge from 1549.9 to 1559.6 eV, and keeps both sides of it", () => {
    const source = JSON.parse(readFileSync(new URL("aluminium.json", FOLDER), "utf8")) as ElementSource;
    const edge = buildElement(source).rows.filter((row) => row.energyEv === 1559.6);
    expect(edge.map((row) => row.side)).toEqual(["below", "above"]);
    expect(edge[1]!.f2 / edge[0]!.f2).toBeGreaterThan(8);
    expect(source.raw.energiesEv).toContain(1549.9);
    expect(files.length).toBeGreaterThanOrEqual(3);
  });
});
