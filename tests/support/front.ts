/** The front server in this process, before pages that a test makes up. */
import type { ServerResponse } from "node:http";
import { pino } from "pino";
import type { PageHandler } from "#src/server/adapter.ts";
import { createFront, type FrontOptions, type Front } from "#src/server/app.ts";
import { drain } from "#src/server/shutdown.ts";
import { freePort } from "./server.ts";

export interface RunningFront {
  readonly baseUrl: string;
  readonly front: Front;
  stop(): Promise<void>;
}

/** Answers 200 with what it was asked, as JSON. */
export const echo: PageHandler = async (request, response, _next, locals) => {
  const chunks: Buffer[] = [];
  for await (const chunk of request.body as AsyncIterable<Buffer>) chunks.push(chunk);
  const { method, url, headers } = request;
  send(
    response,
    200,
    "application/json",
    JSON.stringify({ method, url, headers, locals, body: String(Buffer.concat(chunks)) }),
  );
};

export function send(response: ServerResponse, status: number, type: string, body: string): void {
  response.writeHead(status, { "content-type": type });
  response.end(body);
}

type Given = Partial<Omit<FrontOptions, "settings">> & { settings?: Partial<FrontOptions["settings"]> };

export async function startFront({ settings, ...given }: Given = {}): Promise<RunningFront> {
  const port = await freePort();
  const baseUrl = `http://localhost:${port}`;
  const front = await createFront({
    handler: echo,
    clientFolder: null,
    log: pino({ level: "silent" }),
    // The tests' own work delays this process too.
    shedding: { underWay: 1000, turnMs: 60_000, onePerson: 6 },
    ...given,
    settings: { publicUrl: baseUrl, trustProxy: null, limitsFactor: 1000, ...settings },
  });
  await front.app.listen({ port, host: "127.0.0.1" });
  return { baseUrl, front, stop: () => drain(front, 500) };
}
