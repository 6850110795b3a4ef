/**
 * When a database file may be made. A file that is missing or empty where one was made before means loss, and a fresh one
 * in its place would hide that; so a marker beside the file, `<file>.made`, remembers that it was made.
 */
import { existsSync, mkdirSync, rmSync, statSync, writeFileSync } from "node:fs";
import { dirname, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { DatabaseError } from "./errors.ts";

/** Path of a `file:` address, relative ones from the working folder; null for a libSQL server. */
export function databaseFile(databaseUrl: string): string | null {
  if (!databaseUrl.startsWith("file:")) return null;
  return databaseUrl.startsWith("file://")
    ? fileURLToPath(databaseUrl)
    : resolve(decodeURIComponent(databaseUrl.slice("file:".length)));
}

/**
 * Decides whether the file is to be made or opened, and makes its folder.
 * Throws DatabaseError where the marker stands without its file or the file is empty, unless `init` asks for a new one.
 */
export function prepareFile(file: string, init: boolean): "make" | "open" {
  const size = statSync(file, { throwIfNoEntry: false })?.size;
  if (size !== undefined && size > 0) return "open";

  const traces = [`${file}.made`, `${file}-wal`].filter((trace) => existsSync(trace));
  if (!init && size === 0) {
    throw new DatabaseError(
      `The database ${file} is empty. Restore a back-up to that place, or make a new one with: npm start -- --init`,
    );
  }
  if (!init && traces.length > 0) {
    throw new DatabaseError(
      `The database ${file} is gone, though one was made there before. ` +
        "Restore a back-up to that place, or make a new one with: npm start -- --init",
    );
  }
  for (const leftover of [file, `${file}-wal`, `${file}-shm`, `${file}.made`]) rmSync(leftover, { force: true });
  mkdirSync(dirname(file), { recursive: true });
  return "make";
}

/** Remembers that the database was made. */
export function writeMarker(file: string): void {
  if (!existsSync(`${file}.made`)) {
    writeFileSync(
      `${file}.made`,
      "A database was made here. Start refuses to make a new one while this file stands.\n",
    );
  }
}
