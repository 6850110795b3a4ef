/**
 * The scattering tables. Rows belong to a table version and are never changed: results of an older version stay
 * reproducible. Energies in eV, f1 and f2 in electrons per atom, cross sections in barn per atom.
 */
import { sql } from "drizzle-orm";
import { check, integer, primaryKey, real, sqliteTable, text } from "drizzle-orm/sqlite-core";

export const tableVersions = sqliteTable("table_versions", {
  id: integer().primaryKey(),
  version: text().notNull().unique(),
  /** SHA-256 of data/tables/manifest.json, which carries those of the files. */
  manifestSha256: text("manifest_sha256").notNull(),
  /** data/tables/manifest.json as it was seeded. */
  manifest: text().notNull(),
  /** SHA-256 of the rows as they are read back; a flipped bit on the disk shows as a difference. */
  contentSha256: text("content_sha256").notNull(),
  /** UTC, ISO 8601. */
  seededAt: text("seeded_at").notNull(),
});

const versionId = () =>
  integer("version_id")
    .notNull()
    .references(() => tableVersions.id);

// The migration adds WITHOUT ROWID by hand: the key is most of a row, and so it is stored once (8 MB instead of 12).
export const factors = sqliteTable(
  "factors",
  {
    versionId: versionId(),
    tabulation: text().notNull(),
    atomicNumber: integer("atomic_number").notNull(),
    energyEv: real("energy_ev").notNull(),
    /** "" or, where an edge repeats an energy, "below" and "above". */
    side: text().notNull(),
    f1: real(),
    f2: real(),
    /** The three cross sections are given by epdl97 only. */
    coherentBarn: real("coherent_barn"),
    incoherentBarn: real("incoherent_barn"),
    energyAbsorptionBarn: real("energy_absorption_barn"),
  },
  (table) => [
    primaryKey({ columns: [table.versionId, table.tabulation, table.atomicNumber, table.energyEv, table.side] }),
    check("factors_side", sql`${table.side} IN ('', 'below', 'above')`),
  ],
);

export const shells = sqliteTable(
  "shells",
  {
    versionId: versionId(),
    atomicNumber: integer("atomic_number").notNull(),
    shell: text().notNull(),
    edgeEnergyEv: real("edge_energy_ev").notNull(),
    /** Photons per vacancy; null where the source gives none. */
    fluorescenceYield: real("fluorescence_yield"),
  },
  (table) => [primaryKey({ columns: [table.versionId, table.atomicNumber, table.shell] })],
);

export const lines = sqliteTable(
  "lines",
  {
    versionId: versionId(),
    atomicNumber: integer("atomic_number").notNull(),
    shell: text().notNull(),
    line: text().notNull(),
    energyEv: real("energy_ev").notNull(),
    /** Share of the shell's radiative vacancies, 0 to 1. */
    rate: real().notNull(),
  },
  (table) => [primaryKey({ columns: [table.versionId, table.atomicNumber, table.shell, table.line] })],
);

export const elements = sqliteTable("elements", {
  atomicNumber: integer("atomic_number").primaryKey(),
  symbol: text().notNull().unique(),
  name: text().notNull(),
  standardAtomicWeight: real("standard_atomic_weight").notNull(),
  weightIsMassNumber: integer("weight_is_mass_number", { mode: "boolean" }).notNull(),
});
