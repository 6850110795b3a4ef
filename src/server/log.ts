/**
 * The log: one JSON document a line on stdout, times in UTC. Query strings never enter it: unpublished formulas stand in
 * them.
 */
import { format } from "node:util";
import { type Logger, pino, stdTimeFunctions } from "pino";
import type { Settings } from "#src/lib/settings.ts";

export function createLog(level: Settings["logLevel"]): Logger {
  return pino({
    level,
    base: null,
    timestamp: stdTimeFunctions.isoTime,
    formatters: { level: (label) => ({ level: label }) },
  });
}

/** What libraries print goes into the log as well, so that every line of stdout can be read by a program. */
export function logConsole(log: Logger): void {
  const write =
    (level: "info" | "warn" | "error") =>
    (...parts: unknown[]): void =>
      log[level]({ from: "console" }, withoutQueries(format(...parts)));
  console.log = write("info");
  console.info = write("info");
  console.warn = write("warn");
  console.error = write("error");
}

/** Text with the query of every address in it left out. */
export function withoutQueries(text: string): string {
  return text.replace(/(\/[^\s?"']*)\?[^\s"']*/g, "$1?…");
}
