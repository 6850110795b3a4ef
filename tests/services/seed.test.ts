import { readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { type Database, openDatabase } from "#src/db/client.ts";
import { startDatabase } from "#src/db/database.ts";
import { DatabaseError } from "#src/db/errors.ts";
import { seedTables } from "#src/db/seed.ts";
import { hashContent, readTableRows, readTableVersion } from "#src/db/tables.ts";
import { getTableManifest, getTables } from "#src/lib/services/tables.ts";
import { tablesFromRows } from "#src/lib/tables/load.server.ts";
import { folder } from "#tests/support/server.ts";
import { writeTables } from "#tests/support/tables.ts";

let place: string;
let database: Database;

beforeEach(async () => {
  place = folder();
  database = await openDatabase(`file:${join(place, "rimelight.db")}`);
});
afterEach(async () => {
  await database.close();
  rmSync(place, { recursive: true, force: true });
});

const rowCount = async (table: string): Promise<unknown> =>
  (await database.client.execute(`SELECT count(*) FROM ${table}`)).rows[0]?.[0];

describe("seeding", () => {
  it("writes a table version once and leaves it alone from then on", async () => {
    const tables = writeTables(join(place, "a"));
    expect(await seedTables(database.client, tables)).toMatchObject({ version: "9.0.0", rows: 14 });
    expect(await seedTables(database.client, tables)).toMatchObject({ version: "9.0.0", rows: 0 });
    expect(await rowCount("factors")).toBe(10);
    expect(await rowCount("elements")).toBe(98);
  });

  it("adds a newer version beside the older one, which stays as it was", async () => {
    const first = await seedTables(database.client, writeTables(join(place, "a")));
    const before = hashContent(await readTableRows(database.client, first.versionId));
    const second = await seedTables(database.client, writeTables(join(place, "b"), { version: "9.1.0" }));
    expect(second.versionId).not.toBe(first.versionId);
    expect(await rowCount("factors")).toBe(20);
    expect(hashContent(await readTableRows(database.client, first.versionId))).toBe(before);
  });

  it("refuses other tables under a version that is there", async () => {
    await seedTables(database.client, writeTables(join(place, "a")));
    const other = writeTables(join(place, "b"));
    const manifest = readFileSync(join(other, "manifest.json"), "utf8");
    writeFileSync(join(other, "manifest.json"), manifest.replace('"made up"', '"made up otherwise"'));
    await expect(seedTables(database.client, other)).rejects.toThrow(/A version never changes/);
  });

  it.each([
    [
      "a file that is not the one of the manifest",
      { "henke93.tsv": "atomicNumber\tenergyEv\tside\tf1\tf2\n" },
      /not the one that its manifest names/,
    ],
    ["a manifest that is no JSON", { "manifest.json": "{" }, /manifest\.json is not as it should be/],
    [
      "a manifest without ranges",
      { "manifest.json": '{"version":"9.0.0","files":{}}' },
      /manifest\.json is not as it should be \(tabulations\)/,
    ],
  ])("refuses %s and writes nothing", async (_what, changed, sentence) => {
    const tables = writeTables(join(place, "a"), { changed: changed as Record<string, string> });
    const failed = seedTables(database.client, tables);
    await expect(failed).rejects.toThrow(DatabaseError);
    await expect(failed).rejects.toThrow(sentence);
    expect(await rowCount("table_versions")).toBe(0);
    expect(await rowCount("factors")).toBe(0);
  });

  it("refuses a missing file", async () => {
    const tables = writeTables(join(place, "a"));
    rmSync(join(tables, "lines.tsv"));
    await expect(seedTables(database.client, tables)).rejects.toThrow(/lines\.tsv cannot be read/);
    expect(await rowCount("factors")).toBe(0);
  });
});

describe("the tables", () => {
  it("come out as typed arrays: an edge below then above, barn as m², missing as NaN", async () => {
    const { versionId } = await seedTables(database.client, writeTables(join(place, "a")));
    const tables = tablesFromRows({
      version: "9.0.0",
      rangeEv: { epdl97: [100, 450000], henke93: [30, 30000], chantler95: [10, 433000] },
      ...(await readTableRows(database.client, versionId)),
    });
    const helium = tables.tabulations.epdl97.elements.get(2)!;
    expect([...helium.energiesEv]).toEqual([100, 500, 500, 450000]);
    expect([...helium.f2]).toEqual([0.2, 0.05, 0.4, 2e-8]);
    expect(helium.energyAbsorptionM2![2]).toAgreeWithin(4e-28, 1e-12);
    expect(helium.coherentM2![0]).toAgreeWithin(2.5e-28, 1e-12);
    const henke = tables.tabulations.henke93;
    expect(henke.rangeEv).toEqual([30, 30000]);
    expect(henke.elements.get(1)!.f1[0]).toBeNaN();
    expect(henke.elements.get(1)!.coherentM2).toBeNull();
    expect(henke.elements.has(2)).toBe(false);
    expect(tables.shells.get(2)).toEqual([
      {
        shell: "K",
        edgeEnergyEv: 500,
        fluorescenceYield: 0.01,
        lines: [
          { line: "K-L3", energyEv: 470, rate: 0.75 },
          { line: "K-L2", energyEv: 460, rate: 0.25 },
        ],
      },
      { shell: "L1", edgeEnergyEv: 40, fluorescenceYield: null, lines: [] },
    ]);
  });

  it("that this release ships are seeded in under 5 s, read once, and stand as the manifest says", async () => {
    const start = performance.now();
    const shipped = await startDatabase(`file:${join(place, "shipped.db")}`);
    const seeded = performance.now();
    const tables = await getTables();
    const read = performance.now();
    console.info(
      `Seeded ${shipped.tables.rows} rows in ${Math.round(seeded - start)} ms, read in ${Math.round(read - seeded)} ms.`,
    );
    expect(seeded - start).toBeLessThan(5000);
    expect(await getTables()).toBe(tables);

    const manifest = await getTableManifest();
    expect(manifest.version).toBe(tables.version);
    expect(shipped.tables.rows).toBe(Object.values(manifest.files).reduce((sum, file) => sum + file.rows, 0));
    for (const tabulation of Object.values(tables.tabulations)) {
      const { elements } = manifest.tabulations[tabulation.key];
      expect(Math.max(...tabulation.elements.keys())).toBe(elements[1]);
      for (const factors of tabulation.elements.values()) {
        expect(
          factors.energiesEv.every((energy, index) => index === 0 || energy >= factors.energiesEv[index - 1]!),
        ).toBe(true);
      }
    }

    const { versionId } = shipped.tables;
    const version = await readTableVersion(shipped.client, versionId);
    expect(hashContent(await readTableRows(shipped.client, versionId))).toBe(version!.contentSha256);
    await shipped.client.execute({
      sql: "UPDATE factors SET f1 = f1 + 0.0001 WHERE version_id = ? AND tabulation = 'epdl97' AND atomic_number = 6 AND energy_ev = (SELECT max(energy_ev) FROM factors)",
      args: [versionId],
    });
    expect(hashContent(await readTableRows(shipped.client, versionId))).not.toBe(version!.contentSha256);
    await shipped.close();
  });
});
