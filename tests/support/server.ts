/** The built program as a child process, on a free port and a database of its own. */
import { type ChildProcess, spawn } from "node:child_process";
import { createWriteStream, mkdtempSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";

export interface RunningServer {
  readonly baseUrl: string;
  readonly process: ChildProcess;
  /** What it wrote to stdout: its log, one JSON document a line. */
  readonly logFile: string;
  /** Everything it told people so far. */
  said(): string;
  /** Asks it to stop; resolves with its exit code. */
  stop(): Promise<number | null>;
}

export const folder = (): string => mkdtempSync(join(tmpdir(), "rimelight-test-"));

export async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  await new Promise((resolve) => server.close(resolve));
  if (address === null || typeof address === "string") throw new Error("No port was given.");
  return address.port;
}

/** Starts `npm start`'s script. Building first, where needed, may take a minute. */
export async function startServer(environment: Record<string, string> = {}): Promise<RunningServer> {
  const place = folder();
  const port = await freePort();
  const logFile = join(place, "log.jsonl");
  const child = spawn(process.execPath, ["src/server/start.mjs"], {
    stdio: ["ignore", "pipe", "pipe"],
    env: {
      ...process.env,
      NODE_ENV: "production",
      PORT: String(port),
      HOST: "127.0.0.1",
      DATABASE_URL: `file:${join(place, "rimelight.db")}`,
      LIMITS_FACTOR: "1000",
      ...environment,
    },
  });
  let said = "";
  child.stdout.pipe(createWriteStream(logFile));
  child.stderr.on("data", (chunk: Buffer) => (said += chunk.toString()));
  const ended = new Promise<number | null>((resolve) => child.once("exit", resolve));

  const baseUrl = `http://localhost:${port}`;
  const server: RunningServer = {
    baseUrl,
    process: child,
    logFile,
    said: () => said,
    stop: async () => {
      child.kill("SIGTERM");
      const code = await ended;
      rmSync(place, { recursive: true, force: true });
      return code;
    },
  };
  await untilReady(server, ended);
  return server;
}

async function untilReady(server: RunningServer, ended: Promise<unknown>): Promise<void> {
  let over = false;
  void ended.then(() => (over = true));
  const end = Date.now() + 180_000;
  while (Date.now() < end && !over) {
    const answer = await fetch(`${server.baseUrl}/api/v1/health`).catch(() => null);
    if (answer?.status === 200) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  server.process.kill("SIGKILL");
  throw new Error(`The server did not come up:\n${server.said()}`);
}
