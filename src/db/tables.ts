/** Reads of the scattering tables. A version's 130,000 rows come as one JSON text per element and column: four times quicker. */
import { createHash } from "node:crypto";
import type { Client, Row } from "@libsql/client";

/** One element in one tabulation, columns as JSON arrays in order of energy, below an edge before above it. */
export interface FactorGroup {
  readonly tabulation: string;
  readonly atomicNumber: number;
  readonly energiesEv: string;
  readonly f1: string;
  readonly f2: string;
  readonly coherentBarn: string;
  readonly incoherentBarn: string;
  readonly energyAbsorptionBarn: string;
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

export interface TableRows {
  readonly factors: readonly FactorGroup[];
  /** Highest edge first within an element. */
  readonly shells: readonly ShellRow[];
  readonly lines: readonly LineRow[];
}

export interface TableVersionRow {
  readonly id: number;
  readonly version: string;
  readonly manifest: string;
  readonly contentSha256: string;
  readonly seededAt: string;
}

type Reader = Pick<Client, "execute">;

const FACTORS = `
SELECT tabulation, atomic_number AS "atomicNumber", json_group_array(energy_ev) AS "energiesEv",
  json_group_array(f1) AS f1, json_group_array(f2) AS f2, json_group_array(coherent_barn) AS "coherentBarn",
  json_group_array(incoherent_barn) AS "incoherentBarn", json_group_array(energy_absorption_barn) AS "energyAbsorptionBarn"
FROM (SELECT * FROM factors WHERE version_id = ? ORDER BY tabulation, atomic_number, energy_ev, side DESC)
GROUP BY tabulation, atomic_number ORDER BY tabulation, atomic_number`;

const SHELLS = `
SELECT atomic_number AS "atomicNumber", shell, edge_energy_ev AS "edgeEnergyEv", fluorescence_yield AS "fluorescenceYield"
FROM shells WHERE version_id = ? ORDER BY atomic_number, edge_energy_ev DESC, shell`;

const LINES = `
SELECT atomic_number AS "atomicNumber", shell, line, energy_ev AS "energyEv", rate
FROM lines WHERE version_id = ? ORDER BY atomic_number, shell, energy_ev DESC, line`;

/** Everything that one table version holds. */
export async function readTableRows(reader: Reader, versionId: number): Promise<TableRows> {
  const read = async <T>(sql: string): Promise<T[]> =>
    (await reader.execute({ sql, args: [versionId] })).rows.map(plainRow<T>);
  return {
    factors: await read<FactorGroup>(FACTORS),
    shells: await read<ShellRow>(SHELLS),
    lines: await read<LineRow>(LINES),
  };
}

export async function readTableVersion(reader: Reader, versionId: number): Promise<TableVersionRow | null> {
  const result = await reader.execute({
    sql: `SELECT id, version, manifest, content_sha256 AS "contentSha256", seeded_at AS "seededAt" FROM table_versions WHERE id = ?`,
    args: [versionId],
  });
  const row = result.rows[0];
  return row === undefined ? null : plainRow<TableVersionRow>(row);
}

/** SHA-256 over the rows as read. A bit flipped inside a number passes SQLite's own check, but not this one. */
export function hashContent(rows: TableRows): string {
  const hash = createHash("sha256");
  for (const group of rows.factors) {
    const { tabulation, atomicNumber, energiesEv, f1, f2, coherentBarn, incoherentBarn, energyAbsorptionBarn } = group;
    hash.update(`${tabulation} ${atomicNumber}\n`);
    for (const column of [energiesEv, f1, f2, coherentBarn, incoherentBarn, energyAbsorptionBarn]) hash.update(column);
  }
  for (const row of rows.shells) {
    hash.update(JSON.stringify([row.atomicNumber, row.shell, row.edgeEnergyEv, row.fluorescenceYield]));
  }
  for (const row of rows.lines) {
    hash.update(JSON.stringify([row.atomicNumber, row.shell, row.line, row.energyEv, row.rate]));
  }
  return hash.digest("hex");
}

/** The driver's rows carry hidden index properties; only the named columns are ours. */
function plainRow<T>(row: Row): T {
  return { ...row } as T;
}
