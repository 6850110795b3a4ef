/**
 * `npm run bench`: figures, never verdicts. Each line names what was measured, its aim and what came out; on a shared machine
 * compare figures of one run with each other.
 */
import { spawn } from "node:child_process";
import { readFileSync, rmSync } from "node:fs";
import { createServer } from "node:http";
import { availableParallelism } from "node:os";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import autocannon from "autocannon";
import { committedTables } from "#data/build/committed-tables.ts";
import { compositionOfFormula, constantsOverEnergy, parseFormula, withDensity } from "#src/lib/physics/index.ts";
import { searchMaterials } from "#src/lib/services/materials.ts";
import { folder, freePort } from "#tests/support/server.ts";
import { planes } from "./planes.ts";

const say = (what: string, figure: string, aim = ""): void =>
  console.log(`${what.padEnd(66)} ${figure.padStart(16)}${aim === "" ? "" : `   aim ${aim}`}`);
const ms = (value: number): string => `${value < 10 ? value.toFixed(2) : value.toFixed(0)} ms`;

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? Number.NaN;
}

/** Median and 99th percentile of repeated runs, after a warm-up. */
function repeat(times: number, work: () => void): { median: number; p99: number } {
  for (let i = 0; i < Math.min(times, 50); i++) work();
  const took = Array.from({ length: times }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  }).sort((a, b) => a - b);
  return { median: quantile(took, 0.5), p99: quantile(took, 0.99) };
}

function core(): void {
  const tables = committedTables();
  const energies = Float64Array.from({ length: 1000 }, (_, index) => 1000 * 100 ** (index / 999));
  const glass = withDensity(compositionOfFormula(parseFormula("Na2CaSi6AlO14")), 2500);
  const five = repeat(400, () => constantsOverEnergy(glass, energies, tables));
  say("1,000 energies of a five-element compound, median", ms(five.median), "1 ms");
  say("  the same, 99th percentile", ms(five.p99));
  const long = `Ca5(PO4)3OH·${"C".repeat(240)}`;
  const short = repeat(400, () => parseFormula("Ca5(PO4)3OH"));
  const full = repeat(400, () => parseFormula(long));
  say(
    "Reading a formula of 11 and of 252 characters",
    `${(short.median * 1000).toFixed(1)} / ${(full.median * 1000).toFixed(1)} µs`,
  );
  const search = repeat(100, () => searchMaterials("hydroxiapatit mineral of bone, sixty-four characters long text"));
  say("Search of the handbook, 62 characters, median and 99th percentile", `${ms(search.median)} / ${ms(search.p99)}`);
}

interface Started {
  readonly url: string;
  readonly tookMs: number;
  readonly said: () => string;
  readonly stop: () => Promise<void>;
}

async function start(database: string): Promise<Started> {
  const port = await freePort();
  const begun = performance.now();
  let said = "";
  const child = spawn(process.execPath, ["src/server/start.mjs"], {
    stdio: ["ignore", "ignore", "pipe"],
    env: {
      ...process.env,
      NODE_ENV: "production",
      PORT: String(port),
      DATABASE_URL: `file:${database}`,
      LIMITS_FACTOR: "100000",
      LOG_LEVEL: "silent",
    },
  });
  child.stderr.on("data", (chunk: Buffer) => (said += chunk.toString()));
  const url = `http://localhost:${port}`;
  for (;;) {
    const answer = await fetch(`${url}/api/v1/health`).catch(() => null);
    if (answer?.status === 200) break;
    if (child.exitCode !== null) throw new Error(`The program stopped: ${said}`);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  return {
    url,
    tookMs: performance.now() - begun,
    said: () => said,
    stop: async () => {
      const ended = new Promise((resolve) => child.once("exit", resolve));
      child.kill("SIGTERM");
      await ended;
    },
  };
}

/** A server that does nothing but send the same bytes. */
async function bare(body: Buffer, type: string): Promise<{ url: string; stop: () => Promise<void> }> {
  const server = createServer((_, response) => {
    response.writeHead(200, { "content-type": type, "content-length": body.length });
    response.end(body);
  });
  const port = await freePort();
  await new Promise<void>((resolve) => server.listen(port, "127.0.0.1", resolve));
  return { url: `http://127.0.0.1:${port}/`, stop: () => new Promise((resolve) => server.close(() => resolve())) };
}

const CONSTANTS = "/api/v1/constants?formula=Ca5P3O13H&densityGCm3=3.16&energiesKeV=10,20,30";

async function served(): Promise<void> {
  const place = folder();
  const database = join(place, "rimelight.db");
  // Building is not what is measured: the first start may have to.
  await (await start(database)).stop();
  rmSync(place, { recursive: true, force: true });
  const fresh = folder();
  const first = await start(join(fresh, "rimelight.db"));
  say("Start with an empty database, to the first good answer", ms(first.tookMs));
  const seeded = /filled.*\((\d+(?:\.\d+)?) s\)/.exec(first.said())?.[1];
  say("  of it filling the database with the tables", seeded === undefined ? "not told" : `${seeded} s`, "under 5 s");
  await first.stop();
  const second = await start(join(fresh, "rimelight.db"));
  say("Second start", ms(second.tookMs), "3 s");

  await autocannon({ url: second.url + CONSTANTS, connections: 10, duration: 3 });
  const paced = await autocannon({ url: second.url + CONSTANTS, connections: 10, overallRate: 200, duration: 10 });
  say("GET constants at 200 requests a second, p50 / p99", `${paced.latency.p50} / ${paced.latency.p99} ms`);
  say("  answers other than 200", String(paced.non2xx + paced.errors + paced.timeouts));
  const free = await autocannon({ url: second.url + CONSTANTS, connections: 10, duration: 8 });
  const body = Buffer.from(await (await fetch(second.url + CONSTANTS)).arrayBuffer());
  const plain = await bare(body, "application/json; charset=utf-8");
  const bound = await autocannon({ url: plain.url, connections: 10, duration: 8 });
  await plain.stop();
  say("GET constants, requests a second", free.requests.average.toFixed(0));
  say("  a bare node:http server with the same bytes", bound.requests.average.toFixed(0));
  say("  ratio", (free.requests.average / bound.requests.average).toFixed(3));
  const page = await autocannon({ url: `${second.url}/constants`, connections: 10, duration: 8 });
  say("Page /constants, requests a second", page.requests.average.toFixed(0));

  const asked = await autocannon({ url: `${second.url}/plan`, connections: 10, duration: 8 });
  say("Page /plan as nobody changed it, requests a second", asked.requests.average.toFixed(0));
  await rankings(second.url);

  const worst = await worstRequest(second.url);
  say("Worst legal request: 2,000 energies, 32 parts of 98 elements", ms(worst));
  for (const path of ["/", "/constants", "/plan", "/materials", "/method"]) await scriptBytes(second.url, path);
  await second.stop();
  rmSync(fresh, { recursive: true, force: true });
}

/** Rankings one after the other, and how long health takes to answer meanwhile: what the main thread is held up. */
async function rankings(url: string): Promise<void> {
  const body = JSON.stringify({
    feature: { material: { materialId: "pmma" }, shape: "fibre", sizeUm: 20 },
    host: { material: { materialId: "water" }, thicknessMm: 5 },
    setup: { setupId: "fine-parallel" },
    use: "tomography",
  });
  const took: number[] = [];
  const waited: number[] = [];
  let going = true;
  const probing = (async () => {
    while (going) {
      const begun = performance.now();
      await (await fetch(`${url}/api/v1/health`)).arrayBuffer();
      waited.push(performance.now() - begun);
      await new Promise((resolve) => setTimeout(resolve, 10));
    }
  })();
  for (let i = 0; i < 20; i++) {
    const begun = performance.now();
    const answer = await fetch(`${url}/api/v1/plans/rank`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body,
    });
    await answer.arrayBuffer();
    if (answer.status !== 200) throw new Error(`A ranking was refused: ${answer.status}`);
    took.push(performance.now() - begun);
  }
  going = false;
  await probing;
  const [ranks, waits] = [took, waited].map((list) => list.sort((a, b) => a - b)) as [number[], number[]];
  say("Ranking an example setup over the API, median", ms(quantile(ranks, 0.5)));
  say("  health meanwhile, 99th percentile", ms(quantile(waits, 0.99)), "100 ms");
}

async function worstRequest(url: string): Promise<number> {
  const { ELEMENTS } = await import("#src/lib/physics/index.ts");
  const components = Array.from({ length: 32 }, (_, index) => ({
    formula: ELEMENTS.filter((element) => element.atomicNumber % 32 === index)
      .map((element) => element.symbol)
      .join(""),
    fraction: 1 / 32,
  }));
  const request = JSON.stringify({
    material: { components, basis: "mass", densityGCm3: 5 },
    energiesKeV: { from: 1, to: 400, count: 2000 },
  });
  const took: number[] = [];
  for (let i = 0; i < 20; i++) {
    const begun = performance.now();
    const answer = await fetch(`${url}/api/v1/constants`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: request,
    });
    await answer.arrayBuffer();
    if (answer.status !== 200) throw new Error(`The worst request was refused: ${answer.status}`);
    took.push(performance.now() - begun);
  }
  return quantile(
    took.sort((a, b) => a - b),
    0.5,
  );
}

/** Scripts a page needs until its served values answer to input: its own, its islands and all they import at once. */
async function scriptBytes(url: string, path: string): Promise<void> {
  const html = await (await fetch(url + path, { headers: { accept: "text/html" } })).text();
  const wanted = [
    ...html.matchAll(/(?:component-url|renderer-url|<script[^>]*src|before-hydration-url)="([^"]+\.js)"/g),
  ].map(([, file]) => file as string);
  const seen = new Set<string>();
  let bytes = 0;
  while (wanted.length > 0) {
    const file = wanted.pop() as string;
    if (seen.has(file)) continue;
    seen.add(file);
    const text = readFileSync(join("dist/client", file), "utf8");
    bytes += gzipSync(text, { level: 9 }).length;
    for (const [, imported] of text.matchAll(/(?:from|import)\s*"(\.\/[^"]+\.js)"/g))
      wanted.push(new URL(imported as string, `http://x${file}`).pathname);
  }
  const aim = path === "/constants" || path === "/" ? "200 kB, 300 kB with the first chart" : "";
  say(`Scripts of ${path}, gzip, chart included`, `${(bytes / 1000).toFixed(1)} kB`, aim);
}

console.log(`Rimelight, Node ${process.version}, ${availableParallelism()} cores\n`);
core();
await planes(committedTables(), say);
await served();
