/**
 * When the process cannot keep up, most requests are refused at once, so that the rest are answered. What tells is how
 * late timers fire: work here is synchronous, so requests in flight say nothing.
 */
import underPressure from "@fastify/under-pressure";
import type { FastifyInstance } from "fastify";
import { ProblemError } from "#src/lib/http/problems.ts";

const MAX_DELAY_MS = 100;
/** Health and built files cost little and keep people informed: they go last. */
const MAX_DELAY_LAST_MS = 1000;
const SAMPLE_MS = 250;
const HEALTH = "/api/v1/health";

/** A check that throws the problem overloaded. */
export async function createShedding(app: FastifyInstance): Promise<(path: string, isFile: boolean) => void> {
  await app.register(underPressure, { sampleInterval: SAMPLE_MS });
  return (path, isFile) => {
    const { eventLoopDelay } = app.memoryUsage();
    if (eventLoopDelay <= (isFile || path === HEALTH ? MAX_DELAY_LAST_MS : MAX_DELAY_MS)) return;
    throw new ProblemError("overloaded", "Too much is asked at once. Try again in a few seconds.", {
      headers: { "retry-after": "2" },
    });
  };
}
