/**
 * When the process cannot keep up, requests are refused at once, so that the others are answered. Two things tell:
 * how many are under way, since they share one thread, and how long the present turn of the event loop has lasted, since
 * what arrives together may be handled in one turn, one after the other; who is reached late has waited too long.
 */
import type { ServerResponse } from "node:http";
import type { FastifyInstance } from "fastify";
import { ProblemError } from "#src/lib/http/problems.ts";

export interface SheddingLimits {
  readonly underWay: number;
  readonly turnMs: number;
  /** So many requests within one turn may be one person's, and get through however long it lasts. */
  readonly onePerson: number;
}

/** Fifty busy connections fit in; pages of 5 ms then answer within 0.4 s. Browsers open six connections. */
export const SHEDDING_LIMITS: SheddingLimits = { underWay: 64, turnMs: 250, onePerson: 6 };
/** Health and built files cost little and keep people informed: they go last, at this many times the limits. */
const LAST = 4;
const TICK_MS = 20;
const HEALTH = "/api/v1/health";

/** A check that throws the problem overloaded. */
export function createShedding(
  app: FastifyInstance,
  limits: SheddingLimits,
): (response: ServerResponse, path: string, isFile: boolean) => void {
  const underWay = new Set<ServerResponse>();
  let turn = performance.now();
  /** Requests reached in the present turn. */
  let reached = 0;
  const begin = (): void => {
    turn = performance.now();
    reached = 0;
  };
  const ticking = setInterval(begin, TICK_MS);
  ticking.unref();
  // Starting up is long synchronous work, and no reason to refuse the first caller.
  app.addHook("onListen", async () => begin());
  app.addHook("onClose", async () => clearInterval(ticking));
  return (response, path, isFile) => {
    const share = isFile || path === HEALTH ? LAST : 1;
    const late = performance.now() - turn - TICK_MS;
    reached++;
    if (
      (late > limits.turnMs * share && reached > limits.onePerson * share) ||
      underWay.size >= limits.underWay * share
    ) {
      throw new ProblemError("overloaded", "Too much is asked at once. Try again in a few seconds.", {
        headers: { "retry-after": "2" },
      });
    }
    underWay.add(response);
    // "close" comes without "finish" where the caller went away.
    for (const end of ["finish", "close"]) response.once(end, () => underWay.delete(response));
  };
}
