/**
 * Fills the scattering tables from data/tables. Each table version is written once, in one transaction, after the files'
 * checksums and row counts have been found as the manifest says; a version that is there already is left alone.
 */
import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import type { Client, InValue, Transaction } from "@libsql/client";
import { ELEMENTS } from "#src/lib/physics/elements.ts";
import { type TableManifest, tableManifestSchema } from "#src/lib/schemas/tables.ts";
import { DatabaseError } from "./errors.ts";
import { hashContent, readTableRows } from "./tables.ts";

const FACTOR_COLUMNS = ["atomicNumber", "energyEv", "side", "f1", "f2"];
const CROSS_SECTION_COLUMNS = ["coherentBarn", "incoherentBarn", "energyAbsorptionBarn"];

/** Per file: its columns, and the statement that takes rows as one JSON array of arrays. */
const FILES: readonly { name: string; columns: readonly string[]; insert: string; tabulation?: string }[] = [
  {
    name: "epdl97.tsv",
    tabulation: "epdl97",
    columns: [...FACTOR_COLUMNS, ...CROSS_SECTION_COLUMNS],
    insert: insertInto("factors", 8),
  },
  { name: "henke93.tsv", tabulation: "henke93", columns: FACTOR_COLUMNS, insert: insertInto("factors", 8) },
  { name: "chantler95.tsv", tabulation: "chantler95", columns: FACTOR_COLUMNS, insert: insertInto("factors", 8) },
  {
    name: "shells.tsv",
    columns: ["atomicNumber", "shell", "edgeEnergyEv", "fluorescenceYield"],
    insert: insertInto("shells", 4),
  },
  {
    name: "lines.tsv",
    columns: ["atomicNumber", "shell", "line", "energyEv", "rate"],
    insert: insertInto("lines", 5),
  },
];
const TEXT_COLUMNS: ReadonlySet<string> = new Set(["side", "shell", "line"]);
/** Few large statements are quick; smaller ones let the process breathe between them. */
const ROWS_PER_STATEMENT = 5000;

export interface SeedResult {
  readonly versionId: number;
  readonly version: string;
  /** Rows written now; 0 where the version was there. */
  readonly rows: number;
}

/**
 * Makes sure that the table version of `folder` is in the database.
 * Throws DatabaseError where a file is missing, differs from its checksum or cannot be read, or where the database holds
 * other tables under the same version.
 */
export async function seedTables(client: Client, folder = "data/tables"): Promise<SeedResult> {
  const text = readTableFile(folder, "manifest.json").toString("utf8");
  const manifest = parseManifest(text);
  const manifestSha256 = sha256(text);
  const { version } = manifest;

  const known = await client.execute({
    sql: "SELECT id, manifest_sha256 FROM table_versions WHERE version = ?",
    args: [version],
  });
  const row = known.rows[0];
  if (row !== undefined) {
    if (row.manifest_sha256 !== manifestSha256) {
      throw new DatabaseError(
        `The database holds other tables under the version ${version} than ${folder}. ` +
          "A version never changes: raise it in data:build, or use another DATABASE_URL.",
      );
    }
    return { versionId: Number(row.id), version, rows: 0 };
  }

  const transaction = await client.transaction("write");
  try {
    const inserted = await transaction.execute({
      sql: "INSERT INTO table_versions (version, manifest_sha256, manifest, content_sha256, seeded_at) VALUES (?, ?, ?, '', ?) RETURNING id",
      args: [version, manifestSha256, text, new Date().toISOString()],
    });
    const versionId = Number(inserted.rows[0]?.id);
    let rows = 0;
    for (const file of FILES) {
      const parsed = parseTable(readChecked(folder, file.name, manifest), file.name, file.columns);
      checkRowCount(manifest, file.name, parsed.length);
      await insertRows(transaction, file.insert, { versionId, tabulation: file.tabulation ?? null }, parsed);
      rows += parsed.length;
    }
    await writeElements(transaction);
    await transaction.execute({
      sql: "UPDATE table_versions SET content_sha256 = ? WHERE id = ?",
      args: [hashContent(await readTableRows(transaction, versionId)), versionId],
    });
    await transaction.commit();
    return { versionId, version, rows };
  } finally {
    transaction.close();
  }
}

function insertInto(table: "factors" | "shells" | "lines", columns: number): string {
  const values = Array.from({ length: columns }, (_, index) => `value ->> ${index}`);
  const target =
    table === "factors"
      ? "factors (version_id, tabulation, atomic_number, energy_ev, side, f1, f2, coherent_barn, incoherent_barn, energy_absorption_barn)"
      : table === "shells"
        ? "shells (version_id, atomic_number, shell, edge_energy_ev, fluorescence_yield)"
        : "lines (version_id, atomic_number, shell, line, energy_ev, rate)";
  return `INSERT INTO ${target} SELECT :versionId, ${table === "factors" ? ":tabulation, " : ""}${values.join(", ")} FROM json_each(:rows)`;
}

async function insertRows(
  transaction: Transaction,
  sql: string,
  { versionId, tabulation }: { versionId: number; tabulation: string | null },
  rows: readonly (readonly InValue[])[],
): Promise<void> {
  for (let start = 0; start < rows.length; start += ROWS_PER_STATEMENT) {
    const part = JSON.stringify(rows.slice(start, start + ROWS_PER_STATEMENT));
    await transaction.execute({ sql, args: { versionId, rows: part, ...(tabulation === null ? {} : { tabulation }) } });
    await new Promise((resolve) => setImmediate(resolve));
  }
}

async function writeElements(transaction: Transaction): Promise<void> {
  const rows = ELEMENTS.map((element) => [
    element.atomicNumber,
    element.symbol,
    element.name,
    element.standardAtomicWeight,
    element.weightIsMassNumber ? 1 : 0,
  ]);
  await transaction.execute({
    sql: `INSERT INTO elements (atomic_number, symbol, name, standard_atomic_weight, weight_is_mass_number)
      SELECT value ->> 0, value ->> 1, value ->> 2, value ->> 3, value ->> 4 FROM json_each(:rows) WHERE true
      ON CONFLICT (atomic_number) DO UPDATE SET symbol = excluded.symbol, name = excluded.name,
        standard_atomic_weight = excluded.standard_atomic_weight, weight_is_mass_number = excluded.weight_is_mass_number`,
    args: { rows: JSON.stringify(rows) },
  });
}

function parseManifest(text: string): TableManifest {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    value = null;
  }
  const result = tableManifestSchema.safeParse(value);
  if (!result.success) {
    const where = result.error.issues[0]?.path.join(".") ?? "";
    throw new DatabaseError(
      `data/tables/manifest.json is not as it should be (${where}). Make it anew: npm run data:build`,
    );
  }
  return result.data;
}

function readTableFile(folder: string, name: string): Buffer {
  try {
    return readFileSync(join(folder, name));
  } catch (error) {
    throw new DatabaseError(`The table file ${join(folder, name)} cannot be read. Make it anew: npm run data:build`, {
      cause: error,
    });
  }
}

function readChecked(folder: string, name: string, manifest: TableManifest): string {
  const bytes = readTableFile(folder, name);
  if (sha256(bytes) !== manifest.files[name]?.sha256) {
    throw new DatabaseError(
      `The table file ${join(folder, name)} is not the one that its manifest names. Restore it, or make both anew: npm run data:build`,
    );
  }
  return bytes.toString("utf8");
}

function checkRowCount(manifest: TableManifest, name: string, found: number): void {
  const expected = manifest.files[name]?.rows;
  if (found !== expected) {
    throw new DatabaseError(
      `The table file ${name} has ${found} rows where its manifest says ${expected ?? "nothing"}.`,
    );
  }
}

/** Rows of a tab-separated file after `#` comments and one header line; an empty field is null (text: ""). */
export function parseTable(text: string, name: string, columns: readonly string[]): InValue[][] {
  const lines = text.split("\n");
  let at = 0;
  while (lines[at]?.startsWith("#") === true) at++;
  if (lines[at] !== columns.join("\t")) {
    throw new DatabaseError(`The table file ${name} should have the columns ${columns.join(", ")}.`);
  }
  const isText = columns.map((column) => TEXT_COLUMNS.has(column));
  const rows: InValue[][] = [];
  for (let index = at + 1; index < lines.length; index++) {
    const line = lines[index] ?? "";
    if (line === "") continue;
    const fields = line.split("\t");
    const values = fields.map((field, column) => {
      if (isText[column] === true) return field;
      return field === "" ? null : Number(field);
    });
    if (values.length !== columns.length || values.some((value) => Number.isNaN(value))) {
      throw new DatabaseError(`The table file ${name} cannot be read at line ${index + 1}.`);
    }
    rows.push(values);
  }
  return rows;
}

function sha256(data: string | Buffer): string {
  return createHash("sha256").update(data).digest("hex");
}
