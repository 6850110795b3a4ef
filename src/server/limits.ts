/**
 * Look-up limits of callers without an account: per address and minute, counted in memory. An IPv6 caller counts by its
 * /64, since one subscriber holds all addresses of it.
 */
import rateLimit, { normalizeIP } from "@fastify/rate-limit";
import type { FastifyInstance, FastifyRequest } from "fastify";
import { ProblemError } from "#src/lib/http/problems.ts";
import type { Address } from "./paths.ts";

export interface LimitGroup {
  readonly name: string;
  readonly perMinute: number;
  readonly counts: (address: Address) => boolean;
}

const LOOKUP_PATHS = /^\/api\/v1\/(constants|elements|materials)(\/|$)/;
/** Pages that compute values on the server when they are asked a question. */
const LOOKUP_PAGES = /^\/(constants|materials)?\/?$/;
const ELEMENTS = /^\/api\/v1\/elements\//;

export const LIMIT_GROUPS: readonly LimitGroup[] = [
  {
    name: "rank",
    perMinute: 120,
    // The plan page ranks on the server when it is asked a question.
    counts: ({ path, query }) =>
      /^\/api\/v1\/plans\/rank\/?$/.test(path) ||
      (/^\/plan(\/(view\.json|picks\.csv|plane\.csv|answer\.json))?\/?$/.test(path) && query.size > 0),
  },
  {
    name: "evaluate",
    perMinute: 600,
    counts: ({ path }) => /^\/api\/v1\/(plans\/evaluate|claims\/check)\/?$/.test(path),
  },
  {
    name: "lookup",
    perMinute: 1200,
    // Element tables asked for by version never change and are kept by browsers: a page may fetch many at once.
    counts: ({ path, query }) =>
      (LOOKUP_PATHS.test(path) && !(ELEMENTS.test(path) && query.has("version"))) ||
      (LOOKUP_PAGES.test(path) && query.size > 0),
  },
];

const WINDOW_MS = 60_000;
/** Addresses remembered per group; the least recently seen is forgotten first. */
const ADDRESSES = 50_000;

export type LimitCheck = (request: FastifyRequest, address: Address) => Promise<void>;

/** A check that throws the problem tooManyRequests, with Retry-After, once a caller has used up its minute. */
export async function lookupLimits(app: FastifyInstance, factor: number): Promise<LimitCheck> {
  await app.register(rateLimit, { global: false, cache: ADDRESSES });
  const limiters = LIMIT_GROUPS.map((group) => ({
    group,
    take: app.createRateLimit({
      max: Math.max(1, Math.floor(group.perMinute * factor)),
      timeWindow: WINDOW_MS,
      keyGenerator: (request) => normalizeIP(request.clientAddress),
    }),
  }));
  return async (request, address) => {
    const found = limiters.find(({ group }) => group.counts(address));
    if (found === undefined) return;
    const state = await found.take(request);
    if (state.isAllowed || !state.isExceeded) return;
    throw new ProblemError(
      "tooManyRequests",
      `At most ${state.max} such requests a minute are answered. Try again in ${state.ttlInSeconds} s.`,
      { headers: { "retry-after": String(state.ttlInSeconds) } },
    );
  };
}
