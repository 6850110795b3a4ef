/**
 * `npm start`: installs, builds and serves, each only as far as needed. `--build-only` stops before serving;
 * `--init` makes a new database where the old one is lost (npm start -- --init).
 */
import { existsSync } from "node:fs";
import { build, checkNode, install, PlainError, ROOT, say, step } from "./prepare.mjs";

const FLAGS = ["--build-only", "--init"];

async function start(flags) {
  const unknown = flags.find((flag) => !FLAGS.includes(flag));
  if (unknown !== undefined) throw new PlainError(`"${unknown}" is not known here; there are ${FLAGS.join(" and ")}.`);
  checkNode();
  // Everything else is named from the top of the project, wherever the command was given.
  process.chdir(ROOT);
  if (existsSync(".env")) process.loadEnvFile(".env");
  await step("Packages", install);
  await step("Build", build);
  if (flags.includes("--build-only")) return;
  const { serve } = await import(new URL("../../dist/front.mjs", import.meta.url).href);
  await serve({ init: flags.includes("--init"), step, say });
}

try {
  await start(process.argv.slice(2));
} catch (error) {
  say(error instanceof PlainError || error.plain === true ? error.message : `Start failed.\n${error.stack}`);
  process.exit(1);
}
