/**
 * The database of this process: opened, checked, migrated and seeded once, and kept on globalThis, so that the front
 * server and the pages, which are bundled apart, share one client and one write queue.
 */
import { resolve } from "node:path";
import { type Client, createClient } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";
import { migrate } from "drizzle-orm/libsql/migrator";
import { DatabaseError, plainDatabaseError } from "./errors.ts";
import { databaseFile, prepareFile, writeMarker } from "./file.ts";
import { withWriteQueue } from "./writes.ts";

export interface Database {
  readonly client: Client;
  readonly db: LibSQLDatabase;
  /** Null where a libSQL server is used. */
  readonly file: string | null;
  /** Moves what stands in the write-ahead log into the file, so that the file alone is whole, and closes. */
  close(): Promise<void>;
}

/** "RIME": says whose file this is, to `file` and to us. */
export const APPLICATION_ID = 0x52494d45;
/** The driver waits for locks synchronously, so it may not wait long; the write queue tries again. */
const LOCK_WAIT_MS = 100;
/** Connections only matter for transactions that are open at the same time. */
const CONNECTIONS = 8;
const MIGRATIONS = "src/db/migrations";

/** What every connection must answer; compiled defaults, except for the journal, which stays in the file. */
const PRAGMAS: Readonly<Record<string, string>> = {
  journal_mode: "wal",
  foreign_keys: "1",
  synchronous: "2",
  busy_timeout: String(LOCK_WAIT_MS),
};

/**
 * Opens the database, makes it where it may be made (`init`: also in place of a lost one), and brings its schema up to date.
 * Throws DatabaseError with a plain sentence where the file is lost, foreign, damaged or out of reach.
 */
export async function openDatabase(
  databaseUrl: string,
  { init = false, migrations = MIGRATIONS } = {},
): Promise<Database> {
  const file = databaseFile(databaseUrl);
  if (file === null) return openServer(databaseUrl, migrations);
  const how = prepareFile(file, init);
  let client: Client | undefined;
  try {
    client = createClient({ url: `file:${file}`, timeout: LOCK_WAIT_MS, concurrency: CONNECTIONS });
    if (how === "open") await checkContent(client, file);
    // The identity comes first: a start that is cut short leaves a file that the next start knows as its own.
    else await client.execute(`PRAGMA application_id = ${APPLICATION_ID}`);
    await client.execute("PRAGMA journal_mode = wal");
    await checkConnections(client);
    const opened = wrap(client, file);
    await migrate(opened.db, { migrationsFolder: resolve(migrations) });
    writeMarker(file);
    return opened;
  } catch (error) {
    client?.close();
    throw plainDatabaseError(error, file);
  }
}

async function openServer(url: string, migrations: string): Promise<Database> {
  const client = createClient({ url });
  try {
    const opened = wrap(client, null);
    await migrate(opened.db, { migrationsFolder: resolve(migrations) });
    return opened;
  } catch (error) {
    client.close();
    throw new DatabaseError(
      "The libSQL server named by DATABASE_URL does not answer as it should. Check the address.",
      {
        cause: error,
      },
    );
  }
}

function wrap(bare: Client, file: string | null): Database {
  const client = withWriteQueue(bare);
  return {
    client,
    db: drizzle(client),
    file,
    close: async () => {
      try {
        if (file !== null) await client.execute("PRAGMA wal_checkpoint(TRUNCATE)");
      } finally {
        bare.close();
      }
    },
  };
}

/** That the file is ours and whole. `quick_check` reads every page: 30 ms for the tables alone. */
async function checkContent(client: Client, file: string): Promise<void> {
  const identity = await pragma(client, "application_id");
  if (identity !== String(APPLICATION_ID)) {
    throw new DatabaseError(
      `The file ${file} is a database of another program. Set DATABASE_URL to another place, then start again.`,
    );
  }
  if ((await pragma(client, "quick_check(1)")) !== "ok") {
    throw new DatabaseError(`The database ${file} is damaged. Put a back-up in its place, then start again.`);
  }
}

/** Asserts the pragmas on every connection that the pool can hold: a transaction keeps one, so all are held at once. */
async function checkConnections(client: Client): Promise<void> {
  const held = await Promise.all(Array.from({ length: CONNECTIONS }, () => client.transaction("deferred")));
  try {
    for (const transaction of held) {
      for (const [name, expected] of Object.entries(PRAGMAS)) {
        const found = await pragma(transaction, name);
        if (found !== expected) {
          throw new DatabaseError(`The database driver answers ${name} = ${found} where ${expected} is needed.`);
        }
      }
    }
  } finally {
    for (const transaction of held) transaction.close();
  }
}

async function pragma(on: Pick<Client, "execute">, name: string): Promise<string> {
  const result = await on.execute(`PRAGMA ${name}`);
  return String(result.rows[0]?.[0]);
}
