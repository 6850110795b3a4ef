/** B15: security headers on everything; compression and caching as they should be. */
import { readdirSync, readFileSync } from "node:fs";
import { brotliDecompressSync, gunzipSync } from "node:zlib";
import { describe, expect, inject, it } from "vitest";
import { rawGet } from "#tests/support/raw.ts";
import { echo, startFront } from "#tests/support/front.ts";
import { expectSecurityHeaders } from "#tests/support/problems.ts";

const baseUrl = inject("baseUrl");

/** Pages of the build without parameters in their address. */
const pages = readdirSync("src/pages", { recursive: true, encoding: "utf8" })
  .filter((file) => file.endsWith(".astro") && !file.includes("["))
  .map((file) => `/${file.replace(/\.astro$/, "").replace(/(^|\/)index$/, "")}`);
const built = readdirSync("dist/client", { recursive: true, encoding: "utf8" }).filter((file) => /\.\w+$/.test(file));
const files = built.filter((file) => !/\.(br|gz)$/.test(file)).map((file) => `/${file}`);

describe("every answer carries the security headers:", () => {
  it.each(pages)("page %s", async (path) => {
    const answer = await fetch(baseUrl + path);
    expectSecurityHeaders((name) => answer.headers.get(name));
    expect(answer.headers.get("content-type")).toBe("text/html; charset=utf-8");
    const policy = answer.headers.get("content-security-policy") ?? "";
    expect(policy).toMatch(/script-src 'self'/);
    expect(policy).toMatch(/style-src-attr 'unsafe-inline'/);
    expect(policy).not.toMatch(/style-src [^;]*'unsafe-inline'/);
    await answer.text();
  });

  it("built files", async () => {
    expect(files.length).toBeGreaterThan(0);
    for (const path of files) {
      const answer = await fetch(baseUrl + path);
      expect(answer.status, path).toBe(200);
      expectSecurityHeaders((name) => answer.headers.get(name));
      expect(Buffer.from(await answer.arrayBuffer()).equals(readFileSync(`dist/client${path}`)), path).toBe(true);
      const caching = answer.headers.get("cache-control");
      expect(caching).toBe(path.startsWith("/_astro/") ? "public, max-age=31536000, immutable" : "public, max-age=0");
    }
  });

  it.each(["/api/v1/health", "/api/v1/nothing", "/nothing", "/api", "//x", "/?a=1&a=2"])("%s", async (path) => {
    const answer = await rawGet(baseUrl, path);
    expectSecurityHeaders((name) => answer.headers.get(name));
    expect(answer.headers.get("x-request-id")).toMatch(/^[\w-]{8,}$/);
  });

  it("what Node itself cannot read", async () => {
    const answer = await rawGet(baseUrl, "/", ["Content-Length: 5", "Transfer-Encoding: chunked"]);
    expect(answer.status).toBe(400);
    expectSecurityHeaders((name) => answer.headers.get(name));
  });
});

describe("transport security", () => {
  it("is promised where the site is served over TLS, and only there", async () => {
    expect((await fetch(baseUrl)).headers.get("strict-transport-security")).toBeNull();
    const front = await startFront({ settings: { publicUrl: "https://rimelight.example" } });
    const answer = await rawGet(front.baseUrl, "/x", ["Host: rimelight.example"]);
    expect(answer.status).toBe(200);
    expect(answer.headers.get("strict-transport-security")).toMatch(/^max-age=\d{8}/);
    await front.stop();
  });
});

describe("compression", () => {
  const encoded = async (path: string, encoding: string) => {
    const answer = await rawGet(baseUrl, path, [`Accept-Encoding: ${encoding}`]);
    return { answer, body: answer.bodyBytes };
  };

  it("of pages is brotli or gzip, as asked for, and says that it varies", async () => {
    const plain = (await rawGet(baseUrl, "/method/errors")).body;
    const br = await encoded("/method/errors", "gzip, br");
    expect(br.answer.headers.get("content-encoding")).toBe("br");
    expect(br.answer.headers.get("vary")).toMatch(/accept-encoding/i);
    expect(brotliDecompressSync(br.body).toString()).toBe(plain);
    const gzip = await encoded("/method/errors", "gzip");
    expect(gzip.answer.headers.get("content-encoding")).toBe("gzip");
    expect(gunzipSync(gzip.body).toString()).toBe(plain);
    expect(br.body.length).toBeLessThan(plain.length / 2);
  });

  it("of built files was done at build time", async () => {
    const path = files.find((file) => built.includes(`${file.slice(1)}.br`));
    expect(path).toBeDefined();
    const { answer, body } = await encoded(path!, "br");
    expect(answer.headers.get("content-encoding")).toBe("br");
    expect(answer.headers.get("vary")).toMatch(/accept-encoding/i);
    expect(body.equals(readFileSync(`dist/client${path!}.br`))).toBe(true);
    expect((await rawGet(baseUrl, `${path!}.br`)).status).toBe(404);
  });

  it("leaves event streams alone", async () => {
    const front = await startFront({
      handler: async (request, response, next, locals) => {
        if (request.url !== "/stream") return echo(request, response, next, locals);
        response.writeHead(200, { "content-type": "text/event-stream" });
        response.write(`data: ${"x".repeat(5000)}\n\n`);
        await new Promise((resolve) => setTimeout(resolve, 300));
        response.end("data: end\n\n");
      },
    });
    const answer = await fetch(`${front.baseUrl}/stream`, { headers: { "accept-encoding": "br" } });
    expect(answer.headers.get("content-encoding")).toBeNull();
    const start = performance.now();
    const first = await answer.body!.getReader().read();
    expect(performance.now() - start).toBeLessThan(200);
    expect(Buffer.from(first.value!).toString()).toMatch(/^data: xxx/);
    await front.stop();
  });
});

describe("conditional and partial requests of built files", () => {
  it("answer 304 and 206", async () => {
    const path = "/favicon.svg";
    const first = await rawGet(baseUrl, path);
    expect(first.status).toBe(200);
    expect((await rawGet(baseUrl, path, [`If-None-Match: ${first.headers.get("etag")!}`])).status).toBe(304);
    const part = await rawGet(baseUrl, path, ["Range: bytes=0-9"]);
    expect(part.status).toBe(206);
    expect(part.body).toBe(first.body.slice(0, 10));
  });
});
