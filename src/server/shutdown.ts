/** Stopping: no new requests, those under way get their answer, then the database is closed. */
import type { FastifyBaseLogger } from "fastify";
import type { Front } from "./app.ts";

/** Supervisors kill after ten seconds; what is not done by then is cut off a little earlier. */
const DRAIN_MS = 9000;

/** On SIGTERM or SIGINT; a second signal ends at once. */
export function stopOnSignal(front: Front, log: FastifyBaseLogger, closeDatabase: () => Promise<void>): void {
  let stopping = false;
  const stop = (signal: string): void => {
    if (stopping) process.exit(1);
    stopping = true;
    log.info({ signal }, "Stopping.");
    void drain(front, DRAIN_MS)
      .then(closeDatabase)
      .then(
        () => {
          log.info("Stopped.");
          process.exit(0);
        },
        (error: unknown) => {
          log.error({ err: error }, "Stopped, but not as it should be.");
          process.exit(1);
        },
      );
  };
  process.on("SIGTERM", stop);
  process.on("SIGINT", stop);
}

/** Ends every connection: those without a request now, the others after their answer, all of them after `limitMs`. */
export async function drain(front: Front, limitMs: number): Promise<void> {
  front.startClosing();
  const timer = setTimeout(() => front.app.server.closeAllConnections(), limitMs);
  await front.app.close();
  clearTimeout(timer);
}
