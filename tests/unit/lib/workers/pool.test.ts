/** The server's worker: answers in order, a queue with an end, a limit for each sum, another worker after a bad one. */
import { afterEach, expect, it } from "vitest";
import { createPool, type Pool, PoolError } from "#src/lib/workers/pool.server.ts";

/** A worker that does what it is told: answer, take its time without letting go, or break. */
const PROGRAM = new URL(
  `data:text/javascript,${encodeURIComponent(`
    import { parentPort, workerData } from "node:worker_threads";
    parentPort.on("message", (job) => {
      if (job.kind === "break") throw new Error("broken on purpose");
      const end = Date.now() + (job.ms ?? 0);
      while (Date.now() < end);
      parentPort.postMessage({ job, data: workerData });
    });
  `)}`,
);

let pool: Pool | undefined;
afterEach(async () => {
  await pool?.close();
  pool = undefined;
});
const made = (waiting: number, limitMs: number): Pool =>
  (pool = createPool(PROGRAM, { from: "start" }, { waiting, limitMs }));
const kindOf = (error: unknown): string => (error instanceof PoolError ? error.kind : String(error));

it("answers each job with what the worker was started with, in order", async () => {
  const { run } = made(8, 5000);
  const answers = await Promise.all([1, 2, 3].map((id) => run({ id })));
  expect(answers).toEqual([1, 2, 3].map((id) => ({ job: { id }, data: { from: "start" } })));
});

it("refuses what the queue cannot hold, and answers the rest", async () => {
  const { run } = made(2, 5000);
  await run({ id: 0 });
  const asked = [1, 2, 3, 4].map((id) => run({ id, ms: 50 }).then(() => "answered", kindOf));
  // One runs, two wait.
  expect(await Promise.all(asked)).toEqual(["answered", "answered", "answered", "full"]);
});

it("gives up a sum that takes too long, and answers those who waited", async () => {
  const { run } = made(4, 300);
  await run({ id: 0 });
  const slow = run({ id: 1, ms: 60_000 }).then(() => "answered", kindOf);
  const next = run({ id: 2 }).then(() => "answered", kindOf);
  expect(await slow).toBe("slow");
  expect(await next).toBe("answered");
});

it("starts another worker after one broke", async () => {
  const { run } = made(4, 5000);
  expect(await run({ kind: "break" }).then(() => "answered", kindOf)).toBe("failed");
  expect(await run({ id: 1 }).then(() => "answered", kindOf)).toBe("answered");
});
