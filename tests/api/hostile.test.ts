/** TRUST 6: hostile headers, paths and bodies, as bytes on a connection; the process stays up and says nothing it should not. */
import { readFileSync } from "node:fs";
import { connect } from "node:net";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import type { ProblemCode } from "#src/lib/http/problems.ts";
import { type RunningFront, startFront } from "#tests/support/front.ts";
import { expectProblem, expectSecurityHeaders } from "#tests/support/problems.ts";
import { type RawAnswer, rawGet, rawRequest, request } from "#tests/support/raw.ts";

const baseUrl = inject("baseUrl");

function refused(answer: RawAnswer, code: ProblemCode): void {
  expectProblem({ status: answer.status, contentType: answer.headers.get("content-type"), body: answer.body }, code);
  expectSecurityHeaders((name) => answer.headers.get(name));
}

const post = (url: string, path: string, body: string, headers: string[] = []): Promise<RawAnswer> =>
  rawRequest(url, request(url, `POST ${path}`, [`Content-Length: ${Buffer.byteLength(body)}`, ...headers]) + body);
const JSON_TYPE = "Content-Type: application/json";

/** Some tests need pages that tell what reached them. */
let front: RunningFront;
beforeAll(async () => {
  front = await startFront({ timeouts: { requestMs: 600, headersMs: 600 } });
});
afterAll(() => front.stop());

describe("headers", () => {
  it("H1 a foreign Host is refused, and no answer holds it", async () => {
    const answer = await rawGet(baseUrl, "/", ["Host: evil.example"]);
    refused(answer, "wrongHost");
    expect(answer.bytes.toString()).not.toContain("evil");
  });

  it.each(["evil.example:80", "localhost", "localhost:1", "localhost.:4321", "localhost@evil.example"])(
    "H1 Host %s is refused",
    async (host) => {
      expect([400, 421]).toContain((await rawGet(baseUrl, "/", [`Host: ${host}`])).status);
    },
  );

  it("H1 a page's links stay on the site whatever Host says in the right port", async () => {
    const port = new URL(baseUrl).port;
    for (const host of [`localhost:${port}`, `127.0.0.1:${port}`, `[::1]:${port}`]) {
      expect((await rawGet(baseUrl, "/", [`Host: ${host}`])).status).toBe(200);
    }
  });

  it("H2 two Hosts, or none, are refused", async () => {
    const host = `Host: ${new URL(baseUrl).host}`;
    refused(await rawGet(baseUrl, "/", [host, host]), "malformed");
    refused(await rawRequest(baseUrl, "GET / HTTP/1.1\r\n\r\n"), "malformed");
    refused(await rawRequest(baseUrl, "GET / HTTP/1.0\r\n\r\n"), "malformed");
  });

  it("H4 forwarding headers are ignored, and the pages see one trusted address", async () => {
    const answer = await rawGet(front.baseUrl, "/x", [
      "X-Forwarded-Host: evil.example",
      "X-Forwarded-Proto: https",
      "X-Forwarded-For: 6.6.6.6",
      "Forwarded: for=6.6.6.6;host=evil.example",
      "X-Real-IP: 6.6.6.6",
      "X-Client-Address: 6.6.6.6",
      "X-Original-URL: /admin",
    ]);
    const seen = JSON.parse(answer.body) as { headers: Record<string, string>; locals: { clientAddress: string } };
    expect(answer.body).not.toMatch(/evil|6\.6\.6\.6|\/admin/);
    expect(seen.headers["x-client-address"]).toBe("127.0.0.1");
    expect(seen.locals.clientAddress).toBe("127.0.0.1");
  });

  it.each([
    ["H5 a foreign Origin", ["Origin: https://evil.example"]],
    ["H5 Origin null with a cookie", ["Origin: null", "Cookie: a=b"]],
    ["Origin null", ["Origin: null"]],
    ["a cookie and no word of where it comes from", ["Cookie: a=b"]],
    ["Sec-Fetch-Site cross-site", ["Sec-Fetch-Site: cross-site"]],
    ["Sec-Fetch-Site same-site", ["Sec-Fetch-Site: same-site"]],
    ["our name in another scheme", [`Origin: https://${new URL(baseUrl).host}`]],
  ])("%s is refused for writes, JSON too, and not echoed", async (_what, headers) => {
    for (const type of [JSON_TYPE, "Content-Type: text/plain"]) {
      const answer = await post(baseUrl, "/api/v1/constants", "{}", [type, ...headers]);
      if (type === JSON_TYPE) refused(answer, "foreignOrigin");
      else expect([403, 415]).toContain(answer.status);
      expect(answer.bytes.toString()).not.toContain("evil");
    }
  });

  it.each([
    ["the site's own Origin", (url: string) => [`Origin: ${url}`]],
    ["another name of this machine", (url: string) => [`Origin: http://127.0.0.1:${new URL(url).port}`]],
    ["the site's own Origin with a cookie", (url: string) => [`Origin: ${url}`, "Cookie: a=b"]],
    ["a program, which says nothing", () => []],
  ])("%s is accepted for writes", async (_what, headers) => {
    expect((await post(front.baseUrl, "/api/v1/x", "{}", [JSON_TYPE, ...headers(front.baseUrl)])).status).toBe(200);
  });

  it("H6 two ways of saying how long a body is are refused and the connection closed", async () => {
    const both = await rawRequest(
      baseUrl,
      `${request(baseUrl, "POST /api/v1/constants", ["Content-Length: 4", "Transfer-Encoding: chunked", JSON_TYPE])}0\r\n\r\n`,
    );
    refused(both, "malformed");
    expect(both.headers.get("connection")).toBe("close");
    const twice = await rawRequest(
      baseUrl,
      request(baseUrl, "POST /api/v1/constants", ["Content-Length: 4", "Content-Length: 5"]),
    );
    refused(twice, "malformed");
    expect(twice.headers.get("connection")).toBe("close");
  });

  it.each([20_000, 60_000])("H7 %i bytes of headers are refused", async (size) => {
    refused(await rawGet(baseUrl, "/", [`X-Long: ${"a".repeat(size)}`]), "headersTooLarge");
  });

  it("H8 a key and a cookie together are refused", async () => {
    refused(
      await rawGet(baseUrl, "/api/v1/health", ["Authorization: Bearer abc", "Cookie: session=x"]),
      "twoIdentities",
    );
  });

  it.each(["Bearer abc", "bearer abc", "Bearer", `Bearer ${"k".repeat(10_000)}`])(
    "H9 the unknown key %# is 401 on public paths too",
    async (key) => {
      const answer = await rawGet(baseUrl, "/api/v1/health", [`Authorization: ${key}`]);
      refused(answer, "unauthenticated");
      expect(answer.headers.get("www-authenticate")).toBe("Bearer");
      expect(answer.body).not.toContain("kkkk");
    },
  );

  it("H10 method overrides are ignored", async () => {
    const answer = await rawGet(front.baseUrl, "/x", ["X-HTTP-Method-Override: DELETE", "X-Method-Override: DELETE"]);
    const seen = JSON.parse(answer.body) as { method: string; headers: Record<string, string> };
    expect(seen.method).toBe("GET");
    expect(Object.keys(seen.headers).filter((name) => name.includes("override"))).toEqual([]);
  });

  it("H12 many ranges are refused", async () => {
    const ranges = Array.from({ length: 200 }, () => "0-").join(",");
    refused(await rawGet(baseUrl, "/favicon.svg", [`Range: bytes=${ranges}`]), "rangeNotSatisfiable");
    refused(await rawGet(baseUrl, "/api/v1/health", [`Range: bytes=${ranges}`]), "rangeNotSatisfiable");
  });

  it.each(["TRACE", "OPTIONS", "PROPFIND", "LOCK", "MKCOL"])("H13 the method %s is not offered", async (method) => {
    const answer = await rawRequest(baseUrl, request(baseUrl, `${method} /api/v1/health`));
    refused(answer, "methodNotAllowed");
    expect(answer.headers.get("allow")).toMatch(/GET/);
  });

  it("H13 a method that is none, and a tunnel, are not offered", async () => {
    refused(await rawRequest(baseUrl, request(baseUrl, "FROBNICATE /")), "methodNotAllowed");
    refused(await rawRequest(baseUrl, request(baseUrl, "CONNECT evil.example:443")), "methodNotAllowed");
  });

  it("H14 an Accept that nothing fits is answered with JSON or refused", async () => {
    const answer = await rawGet(baseUrl, "/api/v1/health", ["Accept: */x"]);
    expect([200, 406]).toContain(answer.status);
    expect(answer.headers.get("content-type")).toMatch(/json/);
  });

  it("an expectation that is none is not answered behind our back", async () => {
    const answer = await rawGet(baseUrl, "/api/v1/health", ["Expect: miracles"]);
    expect(answer.status).toBe(200);
    expectSecurityHeaders((name) => answer.headers.get(name));
  });
});

describe("addresses", () => {
  it.each(["/api/v1/materials/../../etc/passwd", "/../../etc/passwd", "/..", "/api/v1/%2e%2e%2f"])(
    "I2, I3 %s",
    async (target) => {
      refused(await rawGet(baseUrl, target), "badPath");
    },
  );

  it.each([8300, 15_000, 40_000])("I5 an address of %i bytes", async (size) => {
    refused(await rawGet(baseUrl, `/constants?formula=${"H".repeat(size)}`), "addressTooLong");
  });

  it.each(["/?id=a&id=b", "/constants?formula=H2O&formula=D2O", "/api/v1/health?id=a&%69d=b"])(
    "I6 %s",
    async (target) => {
      const answer = await rawGet(baseUrl, target);
      refused(answer, "repeatedKey");
      expect(answer.body).toMatch(/"path":"\/(id|formula)"/);
    },
  );

  it.each(["//api/x", "/\\api/x", "/api/v1/materials/%00"])("I7, I8 %s", async (target) => {
    refused(await rawGet(baseUrl, target), "badPath");
  });

  it("I8 NUL in a query", async () => {
    refused(await rawGet(baseUrl, "/api/v1/constants?formula=H2%00O"), "malformed");
  });
});

describe("bodies", () => {
  it("J4 of 257 KiB are refused before they are read, by length", async () => {
    const head = request(baseUrl, "POST /api/v1/constants", [`Content-Length: ${257 * 1024}`, JSON_TYPE]);
    refused(await rawRequest(baseUrl, head), "tooLarge");
  });

  it("J4 of 257 KiB are refused when they pass the limit, chunked", async () => {
    const chunk = `10000\r\n${" ".repeat(65536)}\r\n`;
    const head = request(baseUrl, "POST /api/v1/constants", ["Transfer-Encoding: chunked", JSON_TYPE]);
    refused(await rawRequest(baseUrl, [head, chunk, chunk, chunk, chunk, chunk]), "tooLarge");
  });

  it("J4 of 15 MB in any number leave nothing behind: the answer comes before the body ends", async () => {
    const body = Buffer.alloc(15 * 1024 * 1024, 32);
    const statuses = await Promise.all(
      Array.from({ length: 20 }, () =>
        fetch(`${baseUrl}/api/v1/constants`, {
          method: "POST",
          body,
          headers: { "content-type": "application/json" },
        }).then((answer) => answer.status),
      ),
    );
    expect(new Set(statuses)).toEqual(new Set([413]));
  });

  it("of 256 KiB reach the pages whole, by length and chunked", async () => {
    const text = `"${"a".repeat(256 * 1024 - 2)}"`;
    const sent = JSON.parse((await post(front.baseUrl, "/api/v1/x", text, [JSON_TYPE])).body) as { body: string };
    expect(sent.body).toBe(text);
    const head = request(front.baseUrl, "POST /api/v1/x", ["Transfer-Encoding: chunked", JSON_TYPE]);
    const chunked = await rawRequest(front.baseUrl, [head, "3\r\n[1,\r\n", "2\r\n2]\r\n0\r\n\r\n"]);
    expect((JSON.parse(chunked.body) as { body: string }).body).toBe("[1,2]");
  });

  it.each([
    ["J12 JSON called text", ["Content-Type: text/plain"]],
    ["J12 JSON called nothing", []],
    ["a form on the API", ["Content-Type: application/x-www-form-urlencoded"]],
    ["J13 a compressed body", [JSON_TYPE, "Content-Encoding: gzip"]],
    ["J14 another charset", ["Content-Type: application/json; charset=utf-16"]],
    ["J14 a made-up charset", ["Content-Type: application/json;charset=utf-8x"]],
  ])("%s is refused", async (_what, headers) => {
    refused(await post(baseUrl, "/api/v1/constants", "{}", headers), "unsupportedMediaType");
  });

  it.each(["application/json;charset=UTF-8", 'application/json; charset="utf-8"', "Application/JSON"])(
    "%s is read",
    async (type) => {
      expect((await post(front.baseUrl, "/api/v1/x", "{}", [`Content-Type: ${type}`])).status).toBe(200);
    },
  );

  it("of a GET are refused", async () => {
    const answer = await rawRequest(
      baseUrl,
      `${request(baseUrl, "GET /api/v1/health", ["Content-Length: 2", JSON_TYPE])}{}`,
    );
    refused(answer, "malformed");
  });

  it("J15 that come one byte a second are given up when the time is over", async () => {
    const head = request(front.baseUrl, "POST /api/v1/x", ["Content-Length: 100", JSON_TYPE]);
    const start = performance.now();
    refused(await rawRequest(front.baseUrl, [head, "{"]), "requestTimeout");
    expect(performance.now() - start).toBeGreaterThan(400);
    refused(await rawRequest(front.baseUrl, "GET / HTTP/1.1\r\nHost: local"), "requestTimeout");
  });

  it("that break off leave the server well", async () => {
    const head = request(baseUrl, "POST /api/v1/constants", ["Content-Length: 100", JSON_TYPE]);
    await rawRequest(baseUrl, [head, "{"], 200).catch(() => undefined);
    expect((await rawGet(baseUrl, "/api/v1/health")).status).toBe(200);
  });
});

describe("bytes that are no request", () => {
  it.each([
    "\r\n\r\n\r\nhello\r\n\r\n",
    "GET /\r\n\r\n",
    "GET / HTTP/9.9\r\n\r\n",
    "GET / HTTP/1.1\r\nBad Header: x\r\n\r\n",
    "\u0016\u0003\u0001\u0002",
  ])("%j", async (bytes) => {
    refused(await rawRequest(baseUrl, bytes), "malformed");
  });
});

describe("a connection", () => {
  it("that turns to nonsense while an answer is being sent is cut, not written into", async () => {
    const slow = await startFront({
      handler: async (_request, response) => {
        response.writeHead(200, { "content-type": "text/event-stream" });
        response.write("data: begun\n\n");
        await new Promise((resolve) => setTimeout(resolve, 400));
        response.end("data: end\n\n");
      },
    });
    const { hostname, port } = new URL(slow.baseUrl);
    const socket = connect({ port: Number(port), host: hostname === "localhost" ? "127.0.0.1" : hostname });
    let text = "";
    socket.on("data", (chunk) => (text += chunk.toString()));
    socket.write(request(slow.baseUrl, "GET /"));
    await new Promise((resolve) => setTimeout(resolve, 150));
    socket.write("\u0000nonsense\r\n\r\n");
    await new Promise((resolve) => socket.once("close", resolve));
    expect(text).toContain("data: begun");
    expect(text.match(/HTTP\/1\.1/g)).toHaveLength(1);
    await slow.stop();
  });
});

describe("the log", () => {
  it("holds one JSON document a line and never a query", async () => {
    await rawGet(baseUrl, "/constants?formula=Ne7Kr3Unpublished");
    await rawGet(baseUrl, "/constants?formula=Ne7Kr3Unpublished&formula=2");
    await rawGet(baseUrl, "/a%0d%0ab");
    await new Promise((resolve) => setTimeout(resolve, 200));
    const lines = readFileSync(inject("serverLog"), "utf8").trim().split("\n");
    const paths = lines.map((line) => (JSON.parse(line) as { path?: string }).path);
    expect(paths).toContain("/constants");
    expect(lines.join("\n")).not.toContain("Unpublished");
  });
});
