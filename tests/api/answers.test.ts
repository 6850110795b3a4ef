/** What the pages' server answers, and what comes out of the front: the same, but never a stack, an empty page or a bare header. */
import type { ServerResponse } from "node:http";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import type { PageHandler } from "#src/server/adapter.ts";
import { type RunningFront, send, startFront } from "#tests/support/front.ts";
import { expectProblem, expectSecurityHeaders } from "#tests/support/problems.ts";
import { rawRequest, request } from "#tests/support/raw.ts";

const STACK = "Error: secret\n    at page (/srv/app/page.mjs:1:1)";

/** By path, what a page does. */
const PAGES: Record<string, (response: ServerResponse) => Promise<void> | void> = {
  "/plain": (response) => send(response, 200, "text/html", "<p>Plain</p>"),
  "/api/v1/throws": () => Promise.reject(new Error(STACK)),
  "/throws": () => Promise.reject(new Error(STACK)),
  "/api/v1/html-500": (response) => send(response, 500, "text/html", STACK),
  "/bare-500": (response) => {
    response.statusCode = 500;
    response.end();
  },
  "/late-status": (response) => {
    response.statusCode = 200;
    response.setHeader("content-type", "text/plain; charset=utf-8");
    response.end("late");
  },
  "/api/v1/own-503": (response) => {
    response.writeHead(503, { "content-type": "application/problem+json", "retry-after": "7" });
    response.end('{"code":"notReady"}');
  },
  "/bare-404": (response) => {
    response.writeHead(404);
    response.end();
  },
  "/full-404": (response) => send(response, 404, "text/html", "<p>Not here, but kindly</p>"),
  "/api/v1/empty": (response) => {
    response.writeHead(204);
    response.end();
  },
  "/redirect": (response) => {
    response.writeHead(303, { location: "/plain" });
    response.end();
  },
  "/cookies": (response) => {
    response.writeHead(200, {
      "content-type": "text/plain",
      "set-cookie": ["a=1", "b=2"],
      "cache-control": "no-store",
    });
    response.end("x");
  },
  "/large": async (response) => {
    response.writeHead(200, { "content-type": "text/plain" });
    for (let index = 0; index < 40; index++) {
      response.write(Buffer.alloc(100_000, index));
      await new Promise((resolve) => setImmediate(resolve));
    }
    response.end();
  },
  "/broken": async (response) => {
    response.writeHead(200, { "content-type": "text/plain" });
    response.write("begun");
    await new Promise((resolve) => setImmediate(resolve));
    response.destroy(new Error(STACK));
  },
};

const handler: PageHandler = async (incoming, response) => PAGES[(incoming.url ?? "").split("?", 1)[0]!]?.(response);

let front: RunningFront;
beforeAll(async () => {
  front = await startFront({ handler });
});
afterAll(() => front.stop());

const get = (path: string, accept = "*/*") => fetch(front.baseUrl + path, { headers: { accept }, redirect: "manual" });

describe("answers of pages", () => {
  it("come out as they are, with charset, length and headers", async () => {
    const answer = await get("/plain");
    expect(answer.status).toBe(200);
    expect(answer.headers.get("content-type")).toBe("text/html; charset=utf-8");
    expect(answer.headers.get("cache-control")).toBe("no-cache");
    expectSecurityHeaders((name) => answer.headers.get(name));
    expect(await answer.text()).toBe("<p>Plain</p>");
  });

  it("keep their cookies, redirects, caching and empty forms", async () => {
    const cookies = await get("/cookies");
    expect(cookies.headers.getSetCookie()).toEqual(["a=1", "b=2"]);
    expect(cookies.headers.get("cache-control")).toBe("no-store");
    const redirect = await get("/redirect");
    expect([redirect.status, redirect.headers.get("location")]).toEqual([303, "/plain"]);
    expect((await get("/api/v1/empty")).status).toBe(204);
    expect(await (await get("/late-status")).text()).toBe("late");
    expect(await (await get("/full-404")).text()).toContain("kindly");
  });

  it("of any size come out whole", async () => {
    const body = Buffer.from(await (await get("/large")).arrayBuffer());
    expect(body.length).toBe(4_000_000);
    expect([body[0], body[1_234_567], body[3_999_999]]).toEqual([0, 12, 39]);
  });

  it("to HEAD have the headers and no body", async () => {
    const answer = await rawRequest(front.baseUrl, request(front.baseUrl, "HEAD /plain", ["Connection: close"]));
    expect(answer.status).toBe(200);
    expect(answer.body).toBe("");
    expectSecurityHeaders((name) => answer.headers.get(name));
  });
});

describe("failures of pages", () => {
  it.each(["/api/v1/throws", "/api/v1/html-500", "/throws", "/bare-500", "/broken"])(
    "%s become the problem internal, without what failed",
    async (path) => {
      const answer = await get(path);
      const body = await answer.text();
      const problem = expectProblem(
        { status: answer.status, contentType: answer.headers.get("content-type") ?? "", body },
        "internal",
      );
      expect(body).not.toMatch(/secret|\/srv\//);
      expect(problem.requestId).toBe(answer.headers.get("x-request-id"));
      expectSecurityHeaders((name) => answer.headers.get(name));
    },
  );

  it("are told to people in a page", async () => {
    const answer = await get("/throws", "text/html,*/*");
    expect([answer.status, answer.headers.get("content-type")]).toEqual([500, "text/html; charset=utf-8"]);
    const body = await answer.text();
    expect(body).toContain("Something failed on our side");
    expect(body).toContain(answer.headers.get("x-request-id"));
    expect(body).not.toMatch(/secret|\/srv\//);
  });

  it("that are problems already stay as they are", async () => {
    const answer = await get("/api/v1/own-503");
    expect([answer.status, answer.headers.get("retry-after"), await answer.text()]).toEqual([
      503,
      "7",
      '{"code":"notReady"}',
    ]);
  });

  it("to find anything are told even where the page was empty", async () => {
    const answer = await get("/bare-404");
    expectProblem(
      { status: answer.status, contentType: answer.headers.get("content-type") ?? "", body: await answer.text() },
      "notFound",
    );
  });
});

describe("the running site", () => {
  it("answers what no route of the API takes with a problem, for every method", async () => {
    for (const method of ["GET", "POST", "PUT", "PATCH", "DELETE"]) {
      const answer = await fetch(`${inject("baseUrl")}/api/v1/nothing-here`, { method });
      expectProblem(
        { status: answer.status, contentType: answer.headers.get("content-type") ?? "", body: await answer.text() },
        "notFound",
      );
    }
  });

  it("names the methods that a route offers where another is asked for", async () => {
    const answer = await fetch(`${inject("baseUrl")}/api/v1/health`, { method: "DELETE" });
    expect(answer.headers.get("allow")).toBe("GET, HEAD");
    expectProblem(
      { status: answer.status, contentType: answer.headers.get("content-type") ?? "", body: await answer.text() },
      "methodNotAllowed",
    );
  });
});
