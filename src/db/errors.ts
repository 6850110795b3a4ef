/** The database cannot be used as it is. The message is one or two plain sentences: what is wrong and what to do. */
export class DatabaseError extends Error {
  override readonly name = "DatabaseError";
}

/** Another process holds the database for writing, or writes are queued for too long; trying again later may work. */
export class DatabaseBusyError extends Error {
  override readonly name = "DatabaseBusyError";
}

/** SQLite's result code of a failure, such as "SQLITE_BUSY", or "". Looks into causes, since drizzle wraps what it catches. */
export function sqliteCode(error: unknown): string {
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    if ("code" in at && typeof at.code === "string" && at.code.startsWith("SQLITE_")) return at.code;
  }
  return "";
}

const SENTENCES: Readonly<Record<string, string>> = {
  SQLITE_NOTADB: "is not a database, or its first page is damaged. Put a back-up in its place",
  SQLITE_CORRUPT: "is damaged. Put a back-up in its place",
  SQLITE_CANTOPEN: "cannot be opened. Check that this account may read and write it and its folder",
  SQLITE_PERM: "may not be used by this account. Give it the right to read and write the file and its folder",
  SQLITE_READONLY: "can only be read by this account. Give it the right to write the file and its folder",
  SQLITE_IOERR: "cannot be read from or written to the disk. Check the disk",
  SQLITE_FULL: "cannot grow because the disk is full. Free some space",
  SQLITE_BUSY: "is held by another process. Stop that process first",
};

/** The failure as a DatabaseError that names the file, where SQLite gave a code that has a sentence; else as it was. */
export function plainDatabaseError(error: unknown, file: string): unknown {
  const sentence = SENTENCES[sqliteCode(error)];
  return sentence === undefined
    ? error
    : new DatabaseError(`The database ${file} ${sentence}, then start again.`, { cause: error });
}
