/**
 * What must be there before the program can run: a fitting Node, the packages, the build. Plain JavaScript without
 * packages, because it runs before they are installed. Each step is skipped where a stamp says that it is done.
 */
import { spawn } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { brotliCompressSync, constants, gzipSync } from "node:zlib";

export const ROOT = fileURLToPath(new URL("../..", import.meta.url));

/** A failure whose message is all that a person needs: what happened and what to do. */
export class PlainError extends Error {}

/** Lines for people go to stderr: stdout holds the log, one JSON document a line. */
export function say(text) {
  process.stderr.write(`${text}\n`);
}

/** Runs one step and says what it did and how long it took. `work` answers with the words for it. */
export async function step(name, work) {
  const start = performance.now();
  const done = await work();
  say(`${name.padEnd(10)} ${done} (${((performance.now() - start) / 1000).toFixed(1)} s)`);
}

export function checkNode(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split(".").map(Number);
  const fits = (major === 20 && minor >= 12) || (major === 22 && minor >= 12) || major > 22;
  if (!fits) {
    throw new PlainError(
      `Node ${version} is too old. Install Node 20.12 or newer of the 20 line, or 22.12 or newer, then start again.`,
    );
  }
}

/** Installs the locked packages where they are not the ones installed. */
export async function install() {
  const stampFile = join(ROOT, "node_modules", ".rimelight-stamp");
  const stamp = hashOf(["package-lock.json", "package.json", ".npmrc"], [process.versions.node]);
  if (readOrEmpty(stampFile) === stamp) return "packages are up to date";
  if (installedMatchesLock()) {
    writeFileSync(stampFile, stamp);
    return "packages are up to date";
  }
  say("Packages   installing from package-lock.json, about a minute …");
  rmSync(stampFile, { force: true });
  await run("npm", ["ci", "--include=dev", "--no-audit", "--no-fund"], {
    failed: "The packages could not be installed. Check the network connection and the disk, then start again.",
  });
  writeFileSync(stampFile, stamp);
  return "packages installed";
}

/** npm keeps a list of what it installed; packages of other systems may be absent from it. */
function installedMatchesLock() {
  try {
    const locked = readJson("package-lock.json").packages;
    const installed = readJson("node_modules/.package-lock.json").packages;
    return Object.entries(locked).every(
      ([path, entry]) =>
        path === "" ||
        (installed[path] === undefined && entry.optional) ||
        (installed[path]?.version === entry.version && existsSync(join(ROOT, path, "package.json"))),
    );
  } catch {
    return false;
  }
}

const BUILT_FROM = [
  "src",
  "data/tables",
  "data/seed",
  "public",
  "astro.config.mjs",
  "package.json",
  "package-lock.json",
  "tsconfig.json",
];

/** Builds pages and front server into dist where what they are made of has changed. */
export async function build() {
  const stampFile = join(ROOT, "dist", ".stamp");
  const stamp = hashOf(BUILT_FROM, [process.versions.node]);
  if (readOrEmpty(stampFile) === stamp) return "build is up to date";
  say("Build      building the pages, about half a minute …");
  rmSync(stampFile, { force: true });
  await run(process.execPath, ["node_modules/astro/astro.js", "build"], {
    failed: "The pages could not be built; the lines above say why.",
  });
  await bundle("src/server/front.ts", "dist/front.mjs");
  await bundle("src/lib/workers/plan.server.ts", "dist/plan-worker.mjs");
  const compressed = compressFiles(join(ROOT, "dist", "client"));
  writeFileSync(stampFile, stamp);
  return `built, ${compressed} files compressed`;
}

/** What runs beside the pages' own build: the front server and the worker that ranks plans. */
async function bundle(entry, outfile) {
  const esbuild = await import("esbuild");
  await esbuild.build({
    absWorkingDir: ROOT,
    entryPoints: [entry],
    outfile,
    bundle: true,
    packages: "external",
    platform: "node",
    format: "esm",
    target: "node20",
    logLevel: "warning",
  });
}

const COMPRESSIBLE = /\.(js|mjs|css|svg|html|txt|json|xml|webmanifest)$/;

/** Writes .br and .gz beside each file that gains by it. Brotli 11 would take ten times as long for 2 %. */
function compressFiles(folder) {
  let count = 0;
  for (const file of filesUnder(folder)) {
    if (!COMPRESSIBLE.test(file)) continue;
    const bytes = readFileSync(file);
    if (bytes.length < 1024) continue;
    const params = { [constants.BROTLI_PARAM_QUALITY]: 9, [constants.BROTLI_PARAM_SIZE_HINT]: bytes.length };
    writeFileSync(`${file}.br`, brotliCompressSync(bytes, { params }));
    writeFileSync(`${file}.gz`, gzipSync(bytes, { level: 9 }));
    count++;
  }
  return count;
}

/** SHA-256 over the names and contents of files and of everything under folders, and over `more`. */
function hashOf(names, more) {
  const hash = createHash("sha256");
  for (const name of names) {
    const path = join(ROOT, name);
    const found = statSync(path, { throwIfNoEntry: false });
    if (found === undefined) continue;
    for (const file of found.isDirectory() ? filesUnder(path) : [path]) {
      hash
        .update(`${file.slice(ROOT.length)}\0`)
        .update(readFileSync(file))
        .update("\0");
    }
  }
  for (const text of more) hash.update(`${text}\0`);
  return hash.digest("hex");
}

function filesUnder(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath ?? entry.path, entry.name))
    .sort();
}

/** Runs a command quietly; where it fails, shows what it printed. */
async function run(command, args, { failed }) {
  const child = spawn(command, args, {
    cwd: ROOT,
    stdio: ["ignore", "pipe", "pipe"],
    shell: process.platform === "win32",
    env: { ...process.env, ASTRO_TELEMETRY_DISABLED: "1", NO_UPDATE_NOTIFIER: "1" },
  });
  const output = [];
  child.stdout.on("data", (chunk) => output.push(chunk));
  child.stderr.on("data", (chunk) => output.push(chunk));
  const code = await new Promise((resolve, reject) => {
    child.once("error", reject);
    child.once("close", resolve);
  }).catch((error) => error.message);
  if (code !== 0) {
    say(Buffer.concat(output).toString("utf8"));
    throw new PlainError(failed);
  }
}

function readOrEmpty(file) {
  try {
    return readFileSync(file, "utf8");
  } catch {
    return "";
  }
}

function readJson(name) {
  return JSON.parse(readFileSync(join(ROOT, name), "utf8"));
}
