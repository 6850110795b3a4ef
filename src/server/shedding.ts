/**
 * When the process cannot keep up, most requests are refused at once, so that the rest are answered. What tells is how
 * late timers fire: work here is synchronous, so requests in flight say nothing.
 */
import { monitorEventLoopDelay } from "node:perf_hooks";
import type { FastifyInstance } from "fastify";
import { ProblemError } from "#src/lib/http/problems.ts";

/** Above this delay of timers, as a mean over a sample, requests are refused. */
export const MAX_DELAY_MS = 100;
/** Health and built files cost little and keep people informed: they go last, at this many times the delay. */
const LAST = 10;
const SAMPLE_MS = 250;
const RESOLUTION_MS = 10;
const HEALTH = "/api/v1/health";

/** A check that throws the problem overloaded. */
export function createShedding(app: FastifyInstance, maxDelayMs: number): (path: string, isFile: boolean) => void {
  const delays = monitorEventLoopDelay({ resolution: RESOLUTION_MS });
  delays.enable();
  let delayMs = 0;
  const timer = setInterval(() => {
    // Without a sample nothing is known, and what was known stands.
    if (delays.count > 0) delayMs = Math.max(0, delays.mean / 1e6 - RESOLUTION_MS);
    delays.reset();
  }, SAMPLE_MS);
  timer.unref();
  // Starting up is long synchronous work, and no reason to refuse the first caller.
  app.addHook("onListen", async () => {
    delays.reset();
    delayMs = 0;
    timer.refresh();
  });
  app.addHook("onClose", async () => {
    clearInterval(timer);
    delays.disable();
  });
  return (path, isFile) => {
    if (delayMs <= maxDelayMs * (isFile || path === HEALTH ? LAST : 1)) return;
    throw new ProblemError("overloaded", "Too much is asked at once. Try again in a few seconds.", {
      headers: { "retry-after": "2" },
    });
  };
}
