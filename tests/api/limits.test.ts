/** B11: look-up limits per address and minute; and shedding, which protects the process as a whole. */
import { afterEach, describe, expect, it, vi } from "vitest";
import { LIMIT_GROUPS } from "#src/server/limits.ts";
import { readAddress } from "#src/server/paths.ts";
import { SHEDDING_LIMITS } from "#src/server/shedding.ts";
import { echo, type RunningFront, startFront } from "#tests/support/front.ts";
import { expectProblem } from "#tests/support/problems.ts";

let front: RunningFront | undefined;
afterEach(async () => {
  vi.useRealTimers();
  await front?.stop();
  front = undefined;
});

type Answer = { statusCode: number; headers: Record<string, unknown>; body: string };

/** Asks `count` times, all from one address unless told otherwise, and gives the last answer and all statuses. */
async function ask(
  running: RunningFront,
  url: string,
  count: number,
  remoteAddress = "203.0.113.7",
  headers: Record<string, string> = {},
) {
  const statuses: number[] = [];
  let last: Answer | undefined;
  for (let index = 0; index < count; index++) {
    last = await running.front.app.inject({
      url,
      remoteAddress,
      headers: { host: new URL(running.baseUrl).host, ...headers },
    });
    statuses.push(last.statusCode);
  }
  return { last: last!, good: statuses.filter((status) => status === 200).length, statuses };
}

const groupOf = (url: string): string | undefined => LIMIT_GROUPS.find((group) => group.counts(readAddress(url)))?.name;

describe("look-up limits", () => {
  it.each([
    ["/api/v1/constants?formula=H2O", "lookup"],
    ["/api/v1/constants/batch", "lookup"],
    ["/api/v1/materials", "lookup"],
    ["/api/v1/materials/water", "lookup"],
    ["/api/v1/elements/Fe/factors", "lookup"],
    ["/constants?formula=H2O", "lookup"],
    ["/api/v1/plans/evaluate", "evaluate"],
    ["/api/v1/claims/check", "evaluate"],
    ["/api/v1/plans/rank", "rank"],
    ["/plan?size=20%20um", "rank"],
    ["/plan/view.json?size=20%20um", "rank"],
    ["/plan/plane.csv?size=20%20um", "rank"],
    ["/plan", undefined],
    ["/plans", undefined],
    ["/api/v1/elements/Fe/factors?version=1.0.0", undefined],
    ["/api/v1/health", undefined],
    ["/constants", undefined],
    ["/_astro/x.js", undefined],
  ])("%s counts as %s", (url, name) => {
    expect(groupOf(url)).toBe(name);
  });

  it("are those that the API document states", () => {
    expect(Object.fromEntries(LIMIT_GROUPS.map((group) => [group.name, group.perMinute]))).toEqual({
      lookup: 1200,
      evaluate: 600,
      rank: 120,
    });
  });

  it("answer exactly as many as allowed, then 429 with Retry-After, then again after a minute", async () => {
    front = await startFront({ settings: { limitsFactor: 1 } });
    vi.useFakeTimers({ toFake: ["Date"] });
    const { good, last } = await ask(front, "/api/v1/plans/rank", 121);
    expect(good).toBe(120);
    expect(last.statusCode).toBe(429);
    expect(Number(last.headers["retry-after"])).toBeGreaterThan(50);
    expectProblem(
      { status: 429, contentType: String(last.headers["content-type"]), body: last.body },
      "tooManyRequests",
    );
    vi.setSystemTime(Date.now() + 60_001);
    expect((await ask(front, "/api/v1/plans/rank", 1)).good).toBe(1);
  });

  it("count each address and each group for itself", async () => {
    front = await startFront({ settings: { limitsFactor: 0.01 } });
    expect((await ask(front, "/api/v1/constants", 20)).good).toBe(12);
    expect((await ask(front, "/api/v1/constants", 20, "203.0.113.8")).good).toBe(12);
    expect((await ask(front, "/api/v1/plans/evaluate", 20)).good).toBe(6);
    expect((await ask(front, "/api/v1/health", 20)).good).toBe(20);
    expect((await ask(front, "/api/v1/elements/Fe/factors?version=1.0.0", 20)).good).toBe(20);
  });

  it("H3 gain nothing by forged forwarding headers", async () => {
    front = await startFront({ settings: { limitsFactor: 0.01 } });
    let good = 0;
    for (let index = 0; index < 40; index++) {
      const forged = {
        "x-forwarded-for": `6.6.6.${index}, 7.7.7.${index}`,
        "x-real-ip": `6.6.6.${index}`,
        forwarded: `for=6.6.6.${index}`,
      };
      good += (await ask(front, "/api/v1/constants", 1, "203.0.113.7", forged)).good;
    }
    expect(good).toBe(12);
  });

  it("count a whole IPv6 /64 as one caller, and an IPv4 address in IPv6 form as itself", async () => {
    front = await startFront({ settings: { limitsFactor: 0.01 } });
    let good = 0;
    for (let index = 0; index < 40; index++)
      good += (await ask(front, "/api/v1/constants", 1, `2001:db8:1:2::${index.toString(16)}:1`)).good;
    expect(good).toBe(12);
    expect((await ask(front, "/api/v1/constants", 1, "2001:db8:1:3::1")).good).toBe(1);
    expect((await ask(front, "/api/v1/constants", 20, "203.0.113.7")).good).toBe(12);
    expect((await ask(front, "/api/v1/constants", 1, "::ffff:203.0.113.7")).good).toBe(0);
  });

  it("count the address that a trusted proxy names", async () => {
    front = await startFront({ settings: { limitsFactor: 0.01, trustProxy: { hops: 1 } } });
    const from = (address: string) => ({ "x-forwarded-for": `6.6.6.6, ${address}` });
    expect((await ask(front, "/api/v1/constants", 20, "10.0.0.1", from("203.0.113.7"))).good).toBe(12);
    expect((await ask(front, "/api/v1/constants", 20, "10.0.0.1", from("203.0.113.8"))).good).toBe(12);
  });
});

describe("shedding", () => {
  it("refuses some with 503 and Retry-After while the process is behind, never health, and recovers", async () => {
    front = await startFront({
      // Callers here share the program's own thread, so that only a few requests come within one turn.
      shedding: { ...SHEDDING_LIMITS, onePerson: 1 },
      handler: async (request, response, next, locals) => {
        // Work here is synchronous, as rendering is.
        const end = performance.now() + (request.url === "/slow" ? 80 : 0);
        while (performance.now() < end);
        await echo(request, response, next, locals);
      },
    });
    const { baseUrl } = front;
    const statuses = { "/slow": new Set<number>(), "/api/v1/health": new Set<number>() };
    let refused: Response | undefined;
    const end = Date.now() + 3000;
    const keepAsking = async (path: keyof typeof statuses): Promise<void> => {
      while (Date.now() < end) {
        const answer = await fetch(baseUrl + path);
        statuses[path].add(answer.status);
        if (answer.status === 503) refused ??= answer.clone();
        await answer.text();
      }
    };
    await Promise.all([...Array.from({ length: 12 }, () => keepAsking("/slow")), keepAsking("/api/v1/health")]);
    expect([...statuses["/slow"]].sort()).toEqual([200, 503]);
    expect([...statuses["/api/v1/health"]]).toEqual([200]);
    expect(refused!.headers.get("retry-after")).toBe("2");
    expectProblem(
      { status: 503, contentType: refused!.headers.get("content-type") ?? "", body: await refused!.text() },
      "overloaded",
    );
    await new Promise((resolve) => setTimeout(resolve, 100));
    expect((await fetch(`${baseUrl}/x`)).status).toBe(200);
  });

  it("refuses what comes above the number that may be under way, and makes room when callers go away", async () => {
    let release = (): void => undefined;
    const held = new Promise<void>((resolve) => (release = resolve));
    front = await startFront({
      shedding: { underWay: 3, turnMs: 60_000, onePerson: 6 },
      handler: async (request, response, next, locals) => {
        if (request.url === "/held") await held;
        await echo(request, response, next, locals);
      },
    });
    const { baseUrl } = front;
    const leaving = new AbortController();
    const asked = [1, 2].map(() => fetch(`${baseUrl}/held`).then((answer) => answer.status));
    const left = fetch(`${baseUrl}/held`, { signal: leaving.signal }).catch(() => "left");
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect((await fetch(`${baseUrl}/x`)).status).toBe(503);
    expect((await fetch(`${baseUrl}/api/v1/health`)).status).toBe(200);
    leaving.abort();
    expect(await left).toBe("left");
    await new Promise((resolve) => setTimeout(resolve, 100));
    expect((await fetch(`${baseUrl}/x`)).status).toBe(200);
    release();
    expect(await Promise.all(asked)).toEqual([200, 200]);
  });
});
