import { rmSync } from "node:fs";
import { join } from "node:path";
import { type Client, createClient } from "@libsql/client";
import { drizzle } from "drizzle-orm/libsql";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { DatabaseBusyError } from "#src/db/errors.ts";
import { withWriteQueue } from "#src/db/writes.ts";
import { folder } from "#tests/support/server.ts";

let place: string;
let bare: Client;
let client: Client;

beforeEach(async () => {
  place = folder();
  bare = createClient({ url: `file:${join(place, "x.db")}`, timeout: 10 });
  await bare.execute("PRAGMA journal_mode = wal");
  await bare.execute("CREATE TABLE counts (n INTEGER)");
  await bare.execute("INSERT INTO counts VALUES (0)");
  client = withWriteQueue(bare, 300);
});
afterEach(() => {
  bare.close();
  rmSync(place, { recursive: true, force: true });
});

const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));
const count = async (): Promise<unknown> => (await client.execute("SELECT n FROM counts")).rows[0]?.[0];

describe("writes", () => {
  it("of a hundred parallel transactions that wait inside are all kept", async () => {
    const patient = withWriteQueue(bare, 10_000);
    const db = drizzle(patient);
    await Promise.all(
      Array.from({ length: 100 }, () =>
        db.transaction(async (tx) => {
          const [row] = await tx.all<{ n: number }>("SELECT n FROM counts");
          await pause(1);
          await tx.run(`UPDATE counts SET n = ${row!.n + 1}`);
        }),
      ),
    );
    expect(await count()).toBe(100);
  });

  it("wait for the one before, while reads do not", async () => {
    const transaction = await client.transaction("write");
    await transaction.execute("UPDATE counts SET n = 1");
    const second = client.execute("UPDATE counts SET n = n + 10");
    expect(await count()).toBe(0);
    await transaction.commit();
    await second;
    expect(await count()).toBe(11);
  });

  it("give their turn on when they fail or are rolled back", async () => {
    await expect(client.execute("INSERT INTO nowhere VALUES (1)")).rejects.toThrow();
    (await client.transaction("write")).close();
    await (await client.transaction("write")).rollback();
    await client.batch(["UPDATE counts SET n = 5"]);
    await client.executeMultiple("UPDATE counts SET n = n + 1; UPDATE counts SET n = n + 1;");
    expect(await count()).toBe(7);
  });

  it("that wait for too long are told so, and the queue goes on after them", async () => {
    const transaction = await client.transaction("write");
    await expect(client.execute("UPDATE counts SET n = 2")).rejects.toThrow(DatabaseBusyError);
    await transaction.commit();
    await client.execute("UPDATE counts SET n = 3");
    expect(await count()).toBe(3);
  });

  it("come through when another process lets go of its lock in time, without freezing this one", async () => {
    const other = createClient({ url: `file:${join(place, "x.db")}`, timeout: 10 });
    const holding = await other.transaction("write");
    let ticks = 0;
    const ticking = setInterval(() => ticks++, 5);
    const write = withWriteQueue(bare, 20_000).execute("UPDATE counts SET n = 4");
    await pause(200);
    await holding.commit();
    await write;
    clearInterval(ticking);
    other.close();
    expect(await count()).toBe(4);
    expect(ticks).toBeGreaterThan(3);
  });
});
