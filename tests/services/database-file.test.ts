import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readFileSync,
  rmSync,
  statSync,
  truncateSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { createClient } from "@libsql/client";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { openDatabase } from "#src/db/client.ts";
import { DatabaseError } from "#src/db/errors.ts";
import { seedTables } from "#src/db/seed.ts";
import { folder } from "#tests/support/server.ts";
import { writeTables } from "#tests/support/tables.ts";

let place: string;
let file: string;
let url: string;

beforeEach(() => {
  place = folder();
  file = join(place, "sub", "rimelight.db");
  url = `file:${file}`;
});
afterEach(() => rmSync(place, { recursive: true, force: true }));

/** The one sentence with which opening is refused, and proof that nothing was changed. */
async function refusal(options: { init?: boolean } = {}): Promise<string> {
  const before = existsSync(file) ? readFileSync(file) : null;
  const error: unknown = await openDatabase(url, options).then(
    (database) => database.close(),
    (reason: unknown) => reason,
  );
  expect(error).toBeInstanceOf(DatabaseError);
  expect(existsSync(file) ? readFileSync(file) : null).toEqual(before);
  return (error as Error).message;
}

async function make(): Promise<void> {
  const database = await openDatabase(url);
  await seedTables(database.client, writeTables(join(place, "tables")));
  await database.close();
}

describe("a database file", () => {
  it("is made with its folder where neither it nor its marker stands, and opened from then on", async () => {
    await make();
    expect(existsSync(`${file}.made`)).toBe(true);
    const again = await openDatabase(url);
    expect((await again.client.execute("SELECT count(*) FROM factors")).rows[0]?.[0]).toBe(10);
    await again.close();
  });

  it("is not made anew where it was lost: the marker stands", async () => {
    await make();
    rmSync(file);
    expect(await refusal()).toMatch(/is gone.*Restore a back-up.*npm start -- --init/);
    expect(existsSync(file)).toBe(false);
  });

  it("is not made anew over what a lost one left in its write-ahead log", async () => {
    mkdirSync(join(place, "sub"));
    writeFileSync(`${file}-wal`, "rows that were never moved");
    expect(await refusal()).toMatch(/is gone/);
  });

  it("is not taken for new where it is empty", async () => {
    mkdirSync(join(place, "sub"));
    writeFileSync(file, "");
    expect(await refusal()).toMatch(/is empty.*Restore a back-up.*npm start -- --init/);
  });

  it("is made anew where --init asks for it, lost or empty", async () => {
    await make();
    rmSync(file);
    await (await openDatabase(url, { init: true })).close();
    expect(statSync(file).size).toBeGreaterThan(0);
    truncateSync(file, 0);
    await (await openDatabase(url, { init: true })).close();
    expect(statSync(file).size).toBeGreaterThan(0);
  });

  it("is kept with all it holds where --init is given though nothing is lost", async () => {
    await make();
    const database = await openDatabase(url, { init: true });
    expect((await database.client.execute("SELECT count(*) FROM factors")).rows[0]?.[0]).toBe(10);
    await database.close();
  });

  it("is refused where it is text", async () => {
    mkdirSync(join(place, "sub"));
    writeFileSync(file, "This is a shopping list.\n".repeat(400));
    expect(await refusal()).toMatch(/is not a database/);
  });

  it("is refused where it belongs to another program", async () => {
    mkdirSync(join(place, "sub"));
    const other = createClient({ url });
    await other.execute("CREATE TABLE birds (name TEXT)");
    other.close();
    expect(await refusal()).toMatch(/database of another program/);
    expect(existsSync(`${file}.made`)).toBe(false);
  });

  it.each([
    ["its first page is zeros", (bytes: Buffer) => bytes.fill(0, 0, 100)],
    ["an inner page is zeros", (bytes: Buffer) => bytes.fill(0, 4096 * 3, 4096 * 4)],
    ["half of it is missing", (bytes: Buffer) => bytes.subarray(0, Math.floor(bytes.length / 8192) * 4096)],
  ])("is refused within 5 s with one plain sentence where %s", async (_what, damage) => {
    await make();
    const bytes = readFileSync(file);
    writeFileSync(file, damage(bytes));
    const start = performance.now();
    const message = await refusal();
    expect(performance.now() - start).toBeLessThan(5000);
    expect(message).toMatch(/Put a back-up in its place, then start again\.$/);
    expect(message).toContain(file);
  });

  it("is refused where another process keeps it locked", async () => {
    await make();
    const other = createClient({ url });
    const holding = await other.transaction("write");
    const error = await openDatabase(url).then(
      async (database) => {
        // Opening only reads where nothing is to be migrated; the first write says it.
        await expect(database.client.execute("DELETE FROM lines")).rejects.toThrow(/held by another process/);
        await database.close();
      },
      (reason: unknown) => reason,
    );
    expect(error).toBeUndefined();
    holding.close();
    other.close();
  });

  it("asserts write-ahead log, foreign keys, full synchronisation and short waits on every connection", async () => {
    const database = await openDatabase(url);
    const all = await Promise.all(Array.from({ length: 8 }, () => database.client.transaction("read")));
    for (const transaction of all) {
      const answers = [];
      for (const name of ["journal_mode", "foreign_keys", "synchronous", "busy_timeout", "application_id"]) {
        answers.push((await transaction.execute(`PRAGMA ${name}`)).rows[0]?.[0]);
      }
      expect(answers).toEqual(["wal", 1, 2, 100, 0x52494d45]);
      transaction.close();
    }
    await database.close();
  });

  it("stays as it was where a migration fails at any statement", async () => {
    await make();
    const migrations = join(place, "migrations");
    mkdirSync(join(migrations, "meta"), { recursive: true });
    const journal = JSON.parse(readFileSync("src/db/migrations/meta/_journal.json", "utf8")) as { entries: object[] };
    for (const entry of journal.entries as { tag: string }[]) {
      copyFileSync(`src/db/migrations/${entry.tag}.sql`, join(migrations, `${entry.tag}.sql`));
    }
    const failing = {
      idx: journal.entries.length,
      version: "6",
      when: 9_000_000_000_000,
      tag: "9999_failing",
      breakpoints: true,
    };
    writeFileSync(
      join(migrations, "meta/_journal.json"),
      JSON.stringify({ ...journal, entries: [...journal.entries, failing] }),
    );
    writeFileSync(
      join(migrations, "9999_failing.sql"),
      "CREATE TABLE extra (id integer);--> statement-breakpoint\nDELETE FROM lines;--> statement-breakpoint\nINSERT INTO nowhere VALUES (1);",
    );
    await expect(openDatabase(url, { migrations })).rejects.toThrow();

    const database = await openDatabase(url);
    const tables = await database.client.execute("SELECT name FROM sqlite_master WHERE name = 'extra'");
    expect(tables.rows).toHaveLength(0);
    expect((await database.client.execute("SELECT count(*) FROM lines")).rows[0]?.[0]).toBe(2);
    await database.close();
  });
});
