/**
 * `npm test`: everything that must hold, in one command. Installs and builds as far as needed, runs every suite whatever
 * the ones before said, tells how long each took, and ends with one line: N passed, N failed. `.ci/run` calls it.
 */
import { spawn } from "node:child_process";
import { accessSync, constants, mkdirSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { build, checkNode, install, PlainError, ROOT, say, step } from "../src/server/prepare.mjs";

const RESULTS = "var/test-results";
const CHROMIUM = ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];
const INSTALL_CHROMIUM = "apt-get update && apt-get install -y --no-install-recommends chromium";

const counts = { passed: 0, failed: 0 };

try {
  checkNode();
  process.chdir(ROOT);
  await step("Packages", install);
  await step("Chromium", findChromium);
  mkdirSync(RESULTS, { recursive: true });
  await check("Types", "npm", ["run", "--silent", "check"]);
  await check("Lint", "npm", ["run", "--silent", "lint"]);
  await step("Build", build);
  await suite("Unit", "unit");
  await suite("API", "api");
  await suite("Browser", "e2e");
} catch (error) {
  say(error instanceof PlainError ? error.message : error.stack);
  counts.failed++;
}
process.stdout.write(`${counts.passed} passed, ${counts.failed} failed\n`);
process.exitCode = counts.failed === 0 ? 0 : 1;

/** The browser of the browser tests. Root gets Debian's package; others are told the one line to run. */
async function findChromium() {
  const found = CHROMIUM.find(isExecutable);
  if (found !== undefined) return `is ${found}`;
  if (process.getuid?.() !== 0)
    throw new PlainError(`Chromium is missing. Install it with: sudo sh -c '${INSTALL_CHROMIUM}'`);
  const { code, output } = await run("sh", ["-c", INSTALL_CHROMIUM], "quiet");
  if (code !== 0) throw new PlainError(`${output}\nChromium could not be installed with: ${INSTALL_CHROMIUM}`);
  return "was installed";
}

function isExecutable(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** A command that passes or fails as a whole. */
async function check(name, command, args) {
  await step(name, async () => {
    const { code, output } = await run(command, args, "quiet");
    if (code === 0) {
      counts.passed++;
      return "passed";
    }
    counts.failed++;
    say(output);
    return "FAILED";
  });
}

/** One vitest project, counted test by test from its own report. */
async function suite(name, project) {
  await step(name, async () => {
    const file = join(RESULTS, `${project}.json`);
    rmSync(file, { force: true });
    await run(
      process.execPath,
      [
        "node_modules/vitest/vitest.mjs",
        "run",
        "--project",
        project,
        "--reporter=default",
        "--reporter=json",
        `--outputFile.json=${file}`,
      ],
      "shown",
    );
    const { passed, failed } = countReport(file);
    counts.passed += passed;
    counts.failed += failed;
    return failed === 0 ? `${passed} passed` : `${passed} passed, ${failed} FAILED`;
  });
}

/** A skipped test has not held and counts as failed, and so does a file that could not run or a report that is missing. */
function countReport(file) {
  let report;
  try {
    report = JSON.parse(readFileSync(file, "utf8"));
  } catch {
    return { passed: 0, failed: 1 };
  }
  const broken = report.testResults.filter(
    (result) => result.status === "failed" && result.assertionResults.length === 0,
  );
  const skipped = report.numPendingTests + report.numTodoTests;
  const failed = report.numFailedTests + broken.length + skipped;
  return { passed: report.numPassedTests, failed: failed === 0 && !report.success ? 1 : failed };
}

async function run(command, args, how) {
  const child = spawn(command, args, {
    cwd: ROOT,
    stdio: how === "shown" ? "inherit" : ["ignore", "pipe", "pipe"],
    env: { ...process.env, ASTRO_TELEMETRY_DISABLED: "1" },
  });
  const output = [];
  child.stdout?.on("data", (chunk) => output.push(chunk));
  child.stderr?.on("data", (chunk) => output.push(chunk));
  const code = await new Promise((resolve) => {
    child.once("error", () => resolve(1));
    child.once("close", resolve);
  });
  return { code, output: Buffer.concat(output).toString("utf8") };
}
