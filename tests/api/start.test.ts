/** Starting and stopping, as a person or a supervisor does it. */
import { spawn } from "node:child_process";
import { existsSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { createServer } from "node:http";
import { connect } from "node:net";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { folder, freePort, startServer } from "#tests/support/server.ts";
import { rawRequest, request } from "#tests/support/raw.ts";

let place: string;
beforeEach(() => {
  place = folder();
});
afterEach(() => rmSync(place, { recursive: true, force: true }));

/** Runs the start script to its end, which must come by itself. */
async function start(
  environment: Record<string, string>,
  flags: string[] = [],
): Promise<{ code: number | null; said: string; ms: number }> {
  const begun = performance.now();
  const child = spawn(process.execPath, ["src/server/start.mjs", ...flags], {
    stdio: ["ignore", "ignore", "pipe"],
    env: {
      ...process.env,
      PORT: String(await freePort()),
      DATABASE_URL: `file:${join(place, "x.db")}`,
      ...environment,
    },
  });
  let said = "";
  child.stderr.on("data", (chunk: Buffer) => (said += chunk.toString()));
  const code = await new Promise<number | null>((resolve) => child.once("exit", resolve));
  return { code, said, ms: performance.now() - begun };
}

/** What a person is told last, after the steps that were done. */
const lastLines = (said: string): string => said.trimEnd().split("\n").slice(2).join("\n");

describe("a start that cannot be", () => {
  it("names every setting that cannot be used", async () => {
    const { code, said } = await start({ PORT: "many", PUBLIC_URL: "here" });
    expect(code).toBe(1);
    expect(lastLines(said)).toMatch(/^The setting PORT must be .*\.\nThe setting PUBLIC_URL must be .*\.$/);
  });

  it("says that the port is in use and how to choose another, before it touches the database", async () => {
    const other = createServer();
    const port = await freePort();
    await new Promise<void>((resolve) => other.listen(port, "127.0.0.1", resolve));
    const { code, said } = await start({ PORT: String(port) });
    other.close();
    expect(code).toBe(1);
    expect(lastLines(said)).toBe(
      `Port ${port} is in use. Stop what runs there, or choose another: PORT=4322 npm start`,
    );
    expect(existsSync(join(place, "x.db"))).toBe(false);
  });

  it("says within 5 s that the database is lost, and that restore or --init is the way", async () => {
    writeFileSync(join(place, "x.db.made"), "");
    const { code, said, ms } = await start({});
    expect(code).toBe(1);
    expect(lastLines(said)).toMatch(/^The database .*x\.db is gone.*Restore.*npm start -- --init$/);
    expect(ms).toBeLessThan(5000);
    expect(existsSync(join(place, "x.db"))).toBe(false);
  });

  it("says that a host is none of this machine", async () => {
    const { code, said } = await start({ HOST: "192.0.2.1" });
    expect(code).toBe(1);
    expect(lastLines(said)).toMatch(/^The setting HOST \(192\.0\.2\.1\) is no address of this machine\.$/);
  });

  it("says which flags there are", async () => {
    const { code, said } = await start({}, ["--initialise"]);
    expect(code).toBe(1);
    expect(said.trim()).toBe('"--initialise" is not known here; there are --build-only and --init.');
  });
});

describe("a running server", () => {
  it("told to stop answers what is under way, refuses what is new, and ends by itself", async () => {
    const server = await startServer();
    const { port } = new URL(server.baseUrl);
    // A request whose body is still coming, on one connection; an idle connection beside it.
    const busy = connect({ port: Number(port), host: "127.0.0.1" });
    const idle = connect({ port: Number(port), host: "127.0.0.1" });
    let answer = "";
    busy.on("data", (chunk) => (answer += chunk.toString()));
    const idleClosed = new Promise((resolve) => idle.once("close", resolve));
    busy.write(
      `${request(server.baseUrl, "POST /api/v1/nothing", ["Content-Type: application/json", "Content-Length: 2"])}{`,
    );
    await new Promise((resolve) => setTimeout(resolve, 200));

    const begun = performance.now();
    const stopped = server.stop();
    await idleClosed;
    await new Promise((resolve) => setTimeout(resolve, 200));
    await expect(
      rawRequest(server.baseUrl, request(server.baseUrl, "GET /"), 500).then((late) => late.status),
    ).resolves.toBe(0);
    busy.write("}");
    expect(await stopped).toBe(0);
    expect(performance.now() - begun).toBeLessThan(3000);
    expect(answer).toMatch(/^HTTP\/1\.1 404 /);
    expect(answer).toMatch(/connection: close/i);
    expect(answer).toMatch(/"code":"notFound"/);
  });

  it("leaves one whole file, and opens it again quickly", async () => {
    const url = `file:${join(place, "x.db")}`;
    const first = await startServer({ DATABASE_URL: url });
    expect(first.said()).toMatch(/Database .* was filled with tables \d+\.\d+\.\d+, \d+ rows \(\d+\.\d s\)/);
    expect(await first.stop()).toBe(0);
    expect(statSync(join(place, "x.db-wal"), { throwIfNoEntry: false })?.size ?? 0).toBe(0);
    expect(readFileSync(join(place, "x.db")).length).toBeGreaterThan(4096);

    const begun = performance.now();
    const second = await startServer({ DATABASE_URL: url });
    const ms = performance.now() - begun;
    console.info(`Second start to the first good answer: ${Math.round(ms)} ms.`);
    expect(second.said()).toMatch(/Database .* is ready, tables/);
    expect(second.said()).toMatch(/Rimelight is served at http:\/\/localhost:\d+/);
    await second.stop();
  });
});
