/** The committed tables are whole: checksums, row counts, size, order, both sides of every edge. */
import { createHash } from "node:crypto";
import { readdirSync, readFileSync, statSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { committedTables, tableRows } from "#data/build/committed-tables.ts";
import { TABULATION_KEYS } from "#src/lib/physics/index.ts";
import { tableManifestSchema } from "#src/lib/schemas/tables.ts";

const manifest = tableManifestSchema.parse(JSON.parse(readFileSync("data/tables/manifest.json", "utf8")));

describe("data/tables", () => {
  it("agrees with its manifest, and stays under 6 MB", () => {
    let bytes = 0;
    for (const file of readdirSync("data/tables")) {
      bytes += statSync(`data/tables/${file}`).size;
      if (!file.endsWith(".tsv")) continue;
      const text = readFileSync(`data/tables/${file}`);
      expect(createHash("sha256").update(text).digest("hex"), file).toBe(manifest.files[file]?.sha256);
      expect(tableRows(file).rows.length, file).toBe(manifest.files[file]?.rows);
    }
    expect(Object.keys(manifest.files)).toHaveLength(5);
    expect(bytes).toBeLessThan(6_000_000);
  });

  it("covers the stated elements and energies, ascending, an edge as one energy twice", () => {
    const tables = committedTables();
    for (const key of TABULATION_KEYS) {
      const {
        elements: [first, last],
        rangeEv,
      } = manifest.tabulations[key];
      const { elements } = tables.tabulations[key];
      expect([...elements.keys()], key).toEqual(Array.from({ length: last - first + 1 }, (_, index) => first + index));
      for (const { atomicNumber, energiesEv } of elements.values()) {
        expect(energiesEv[0]!, `${key} ${atomicNumber}`).toBeGreaterThanOrEqual(rangeEv[0]);
        expect(energiesEv.at(-1)!, `${key} ${atomicNumber}`).toBeLessThanOrEqual(rangeEv[1]);
        for (let index = 1; index < energiesEv.length; index++) {
          const step = energiesEv[index]! - energiesEv[index - 1]!;
          if (!(step >= 0) || (step === 0 && energiesEv[index + 1] === energiesEv[index]))
            expect.unreachable(`${key} ${atomicNumber} at ${energiesEv[index]} eV`);
        }
      }
    }
  });

  it("has no missing or negative cross section in epdl97", () => {
    for (const {
      atomicNumber,
      f1,
      f2,
      coherentM2,
      incoherentM2,
      energyAbsorptionM2,
    } of committedTables().tabulations.epdl97.elements.values()) {
      expect(f1.every(Number.isFinite), String(atomicNumber)).toBe(true);
      for (const column of [f2, coherentM2!, incoherentM2!, energyAbsorptionM2!])
        expect(
          column.every((value) => value > 0),
          String(atomicNumber),
        ).toBe(true);
    }
  });
});
