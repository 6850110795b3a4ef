/** The one database of the process. */
import { type Database, openDatabase } from "./client.ts";
import { type SeedResult, seedTables } from "./seed.ts";

export interface ReadyDatabase extends Database {
  /** The tables that this release ships. */
  readonly tables: SeedResult;
}

// The front server and the pages are bundled apart; what they share stands here.
const HOLDER = globalThis as { [key: symbol]: Promise<ReadyDatabase> | undefined };
const KEY = Symbol.for("rimelight.database");

/** Opens, migrates and seeds the database. Called once, before anything is served. */
export function startDatabase(databaseUrl: string, options: { init?: boolean } = {}): Promise<ReadyDatabase> {
  const started = start(databaseUrl, options);
  HOLDER[KEY] = started;
  return started;
}

/** The started database. Rejects where none was started. */
export function getDatabase(): Promise<ReadyDatabase> {
  return HOLDER[KEY] ?? Promise.reject(new Error("The database has not been started."));
}

async function start(databaseUrl: string, options: { init?: boolean }): Promise<ReadyDatabase> {
  const database = await openDatabase(databaseUrl, options);
  try {
    const tables = await seedTables(database.client);
    return { ...database, tables };
  } catch (error) {
    await database.close();
    throw error;
  }
}
