/** Brings the program up in order (settings, port, database, pages), serves, and stops it in order. */
import { createServer } from "node:net";
import { fileURLToPath } from "node:url";
import type { FastifyBaseLogger } from "fastify";
import { startDatabase } from "#src/db/database.ts";
import { DatabaseError } from "#src/db/errors.ts";
import { readSettings, type Settings, SettingsError } from "#src/lib/settings.ts";
import type { PageHandler } from "./adapter.ts";
import { createFront } from "./app.ts";
import { createLog, logConsole } from "./log.ts";
import { stopOnSignal } from "./shutdown.ts";

interface ServeOptions {
  readonly init: boolean;
  /** Runs a step of the start and tells what it did and how long it took. */
  readonly step: (name: string, work: () => Promise<string>) => Promise<void>;
  readonly say: (text: string) => void;
}

/** Pages asked once before anyone is let in: the first answer of a page costs several times the later ones. */
const WARM_PATHS = ["/", "/api/v1/health", "/constants?formula=H2O&densityGCm3=1", "/plan"];

export async function serve({ init, step, say }: ServeOptions): Promise<void> {
  try {
    const settings = readSettings();
    await checkPort(settings);
    const log = createLog(settings.logLevel);
    let close = async (): Promise<void> => undefined;
    await step("Database", async () => {
      const database = await startDatabase(settings.databaseUrl, { init });
      close = () => database.close();
      const { version, rows } = database.tables;
      const where = database.file ?? "libSQL server";
      return rows === 0
        ? `${where} is ready, tables ${version}`
        : `${where} was filled with tables ${version}, ${rows} rows`;
    });
    logConsole(log);
    // Services start it when the first ranking is asked for (lib/services/plans.ts).
    (globalThis as { [key: symbol]: unknown })[Symbol.for("rimelight.planWorker")] = new URL(
      "./plan-worker.mjs",
      import.meta.url,
    );
    await step("Pages", async () => {
      const front = await createFront({
        settings,
        handler: await loadPages(log),
        clientFolder: fileURLToPath(new URL("./client/", import.meta.url)),
        log,
      });
      for (const url of WARM_PATHS) {
        await front.app.inject({ url, headers: { host: new URL(settings.publicUrl).host } });
      }
      await front.app.listen({ port: settings.port, host: settings.host });
      stopOnSignal(front, log, close);
      return "are ready";
    });
    say(`Rimelight is served at ${settings.publicUrl} (stop with Ctrl+C).`);
  } catch (error) {
    throw plain(error);
  }
}

/** The built pages. Astro's adapter prints addresses of failed requests, queries included, so that listener goes. */
async function loadPages(log: FastifyBaseLogger): Promise<PageHandler> {
  const entry = (await import(new URL("./server/entry.mjs", import.meta.url).href)) as { handler: PageHandler };
  process.removeAllListeners("unhandledRejection");
  process.on("unhandledRejection", (error) => log.error({ err: error }, "A promise failed unheard."));
  return entry.handler;
}

/** Tried before the database is touched: a second start on the same port must not come near the first one's file. */
async function checkPort({ port, host }: Settings): Promise<void> {
  const probe = createServer();
  await new Promise<void>((resolve, reject) => {
    probe.once("error", reject);
    probe.listen({ port, host }, resolve);
  });
  await new Promise((resolve) => probe.close(resolve));
}

/** Failures that a person can mend carry the one sentence that says how; the start script prints no more than that. */
function plain(error: unknown): unknown {
  if (error instanceof SettingsError || error instanceof DatabaseError) return Object.assign(error, { plain: true });
  const { code, port, address } = (error ?? {}) as { code?: string; port?: number; address?: string };
  const sentence =
    code === "EADDRINUSE"
      ? `Port ${port} is in use. Stop what runs there, or choose another: PORT=4322 npm start`
      : code === "EACCES"
        ? `Port ${port} may not be used by this account. Choose one above 1023: PORT=4321 npm start`
        : code === "EADDRNOTAVAIL" || code === "ENOTFOUND"
          ? `The setting HOST (${address ?? "given"}) is no address of this machine.`
          : null;
  return sentence === null ? error : Object.assign(new Error(sentence), { plain: true });
}
