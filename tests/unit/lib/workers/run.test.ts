/** The page's side of the plan worker: the newest question wins, stopping ends the worker, without one the server is asked. */
import { afterEach, beforeEach, expect, it, vi } from "vitest";
import { DEFAULT_PLAN } from "#src/lib/plans/question.ts";
import type { PlanAsk, PlanTold } from "#src/lib/workers/protocol.ts";
import { createPlanRunner, RANKING_LIMIT_MS } from "#src/lib/workers/run.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";

const TABLES = { version: "0" } as unknown as TableInfo;
const VIEW = { faults: [], result: null };
const nothing = (): void => undefined;

class FakeWorker extends EventTarget {
  readonly asked: PlanAsk[] = [];
  terminated = false;
  postMessage(ask: PlanAsk): void {
    this.asked.push(ask);
  }
  terminate(): void {
    this.terminated = true;
  }
  tell(told: PlanTold): void {
    this.dispatchEvent(new MessageEvent("message", { data: told }));
  }
}

let workers: FakeWorker[];
const make = (): Worker => {
  const worker = new FakeWorker();
  workers.push(worker);
  return worker as unknown as Worker;
};
beforeEach(() => {
  workers = [];
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});
const answer = (job: number): PlanTold => ({ kind: "plan", job, view: VIEW, learnt: [] });

it("an answer to an older question is dropped", async () => {
  const runner = createPlanRunner(TABLES, make);
  const first = runner.rank(DEFAULT_PLAN, [], nothing);
  const second = runner.rank({ ...DEFAULT_PLAN, size: "10 um" }, [], nothing);
  workers[0]!.tell(answer(1));
  workers[0]!.tell(answer(2));
  expect(await first).toBeNull();
  expect(await second).toEqual({ view: VIEW, learnt: [] });
  expect(workers).toHaveLength(1);
});

it("progress is passed on, and a failure told in words", async () => {
  const runner = createPlanRunner(TABLES, make);
  const shares: number[] = [];
  const ranked = runner.rank(DEFAULT_PLAN, [], (share) => shares.push(share));
  workers[0]!.tell({ kind: "progress", job: 1, share: 0.5 });
  workers[0]!.tell({ kind: "failed", job: 1, message: "The table of oxygen did not arrive." });
  await expect(ranked).rejects.toThrow("oxygen");
  expect(shares).toEqual([0.5]);
});

it("stopping ends the worker at once, and the next question starts another", async () => {
  const runner = createPlanRunner(TABLES, make);
  const stopped = runner.rank(DEFAULT_PLAN, [], nothing);
  runner.stop();
  expect(await stopped).toBeNull();
  expect(workers[0]!.terminated).toBe(true);
  const next = runner.rank(DEFAULT_PLAN, [], nothing);
  workers[1]!.tell(answer(workers[1]!.asked[0]!.job));
  expect(await next).not.toBeNull();
});

it("a ranking past its own limit is given up in words", async () => {
  vi.useFakeTimers();
  const runner = createPlanRunner(TABLES, make);
  const late = runner.rank(DEFAULT_PLAN, [], nothing);
  const outcome = expect(late).rejects.toThrow("took too long");
  await vi.advanceTimersByTimeAsync(RANKING_LIMIT_MS + 1);
  await outcome;
  expect(workers[0]!.terminated).toBe(true);
});

it.each([
  ["cannot be made", () => null],
  [
    "dies at its start",
    () => {
      const worker = make() as unknown as FakeWorker;
      queueMicrotask(() => worker.dispatchEvent(new Event("error", { cancelable: true })));
      return worker as unknown as Worker;
    },
  ],
])("a worker that %s: the server answers", async (_, broken) => {
  const asked: string[] = [];
  vi.stubGlobal("fetch", async (address: string) => {
    asked.push(address);
    return new Response(JSON.stringify(VIEW));
  });
  const runner = createPlanRunner(TABLES, broken);
  expect(await runner.rank({ ...DEFAULT_PLAN, size: "7 um" }, [], nothing)).toEqual({ view: VIEW, learnt: [] });
  expect(asked).toEqual([expect.stringMatching(/^\/plan\/view\.json\?.*size=7\+um/)]);
  expect(await runner.point(0, 0, "A")).toBeNull();
});
