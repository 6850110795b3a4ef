/** The scattering tables at run time: read from the database once and kept for the life of the process. */
import { getDatabase } from "#src/db/database.ts";
import { hashContent, readTableRows, readTableVersion } from "#src/db/tables.ts";
import type { ScatteringTables, TabulationKey } from "#src/lib/physics/index.ts";
import { type TableManifest, tableManifestSchema } from "#src/lib/schemas/tables.ts";
import { tablesFromRows } from "#src/lib/tables/load.server.ts";

interface LoadedTables {
  readonly tables: ScatteringTables;
  readonly manifest: TableManifest;
}

const HOLDER = globalThis as { [key: symbol]: Promise<LoadedTables> | undefined };
const KEY = Symbol.for("rimelight.tables");

/** The tables that this release ships, as typed arrays. Rejects where the stored rows are not those that were seeded. */
export async function getTables(): Promise<ScatteringTables> {
  return (await loaded()).tables;
}

/** Version, ranges, checksums, row counts and sources of the tables, for pages that say where numbers come from. */
export async function getTableManifest(): Promise<TableManifest> {
  return (await loaded()).manifest;
}

function loaded(): Promise<LoadedTables> {
  const known = HOLDER[KEY];
  if (known !== undefined) return known;
  const loading = load();
  HOLDER[KEY] = loading;
  // A failure is not kept: the next caller tries again.
  loading.catch(() => {
    if (HOLDER[KEY] === loading) HOLDER[KEY] = undefined;
  });
  return loading;
}

async function load(): Promise<LoadedTables> {
  const { client, tables: current } = await getDatabase();
  const version = await readTableVersion(client, current.versionId);
  if (version === null) throw new Error(`Table version ${current.version} is not in the database.`);
  const rows = await readTableRows(client, version.id);
  if (hashContent(rows) !== version.contentSha256) {
    throw new Error(
      `The tables of version ${version.version} in the database are damaged: put a back-up in its place.`,
    );
  }
  const manifest = tableManifestSchema.parse(JSON.parse(version.manifest));
  const rangeOf = (key: TabulationKey): readonly [number, number] => manifest.tabulations[key].rangeEv;
  return {
    manifest,
    tables: tablesFromRows({
      version: version.version,
      rangeEv: { epdl97: rangeOf("epdl97"), henke93: rangeOf("henke93"), chantler95: rangeOf("chantler95") },
      ...rows,
    }),
  };
}
