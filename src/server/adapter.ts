/**
 * The pages' server (the adapter's handler in middleware mode) behind the front. It writes to a stand-in for Node's
 * response, so that what it answers passes through the front's headers, compression and problem documents.
 */
import type { IncomingMessage, OutgoingHttpHeaders, ServerResponse } from "node:http";
import { PassThrough, type TransformCallback } from "node:stream";

export type PageHandler = (
  request: IncomingMessage & { body?: unknown },
  response: ServerResponse,
  next: undefined,
  locals: { requestId: string; clientAddress: string },
) => Promise<unknown>;

export interface PageAnswer {
  readonly status: number;
  readonly headers: OutgoingHttpHeaders;
  /** Whole answers; a stream where it is an event stream or larger than what is worth holding. */
  readonly body: Buffer | PassThrough;
}

/** Held back up to this size, so that most answers leave with their length and are compressed in one go. */
const HELD_BYTES = 1024 * 1024;

/** Asks the pages' server. `body` is the whole request body, or undefined. */
export async function askPages(
  handler: PageHandler,
  request: IncomingMessage,
  body: Buffer | undefined,
  locals: { requestId: string; clientAddress: string },
): Promise<PageAnswer> {
  const sink = new Sink(request);
  // The adapter encodes Buffers and streams as JSON, but hands on what can only be iterated.
  const read = Object.assign(request, {
    body: {
      async *[Symbol.asyncIterator]() {
        if (body !== undefined && body.length > 0) yield body;
      },
    },
  });
  // A failure inside is answered by the adapter itself, with status 500.
  const served = handler(read, sink as unknown as ServerResponse, undefined, locals);
  served.catch((error: unknown) => sink.destroy(error instanceof Error ? error : new Error("The page failed.")));
  const { status, headers } = await sink.head;
  return { status, headers, body: await hold(sink, headers) };
}

async function hold(sink: Sink, headers: OutgoingHttpHeaders): Promise<Buffer | PassThrough> {
  if (String(headers["content-type"]).startsWith("text/event-stream")) return sink;
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of sink.iterator({ destroyOnReturn: false })) {
    chunks.push(chunk as Buffer);
    size += (chunk as Buffer).length;
    if (size > HELD_BYTES) {
      sink.unshift(Buffer.concat(chunks));
      return sink;
    }
  }
  return Buffer.concat(chunks);
}

/** As much of Node's ServerResponse as the adapter uses. */
class Sink extends PassThrough {
  readonly req: IncomingMessage;
  readonly head: Promise<{ status: number; headers: OutgoingHttpHeaders }>;
  headersSent = false;
  statusCode = 200;
  statusMessage = "";
  #headers: OutgoingHttpHeaders = {};
  #settle: (head: { status: number; headers: OutgoingHttpHeaders }) => void = () => undefined;

  constructor(request: IncomingMessage) {
    super();
    this.req = request;
    this.head = new Promise((resolve, reject) => {
      this.#settle = resolve;
      this.once("error", reject);
      this.once("close", () => reject(new Error("The page was closed before it began.")));
    });
    this.head.catch(() => undefined);
  }

  setHeader(name: string, value: string | string[]): this {
    this.#headers[name.toLowerCase()] = value;
    return this;
  }

  writeHead(status: number, reason?: string | OutgoingHttpHeaders, headers?: OutgoingHttpHeaders): this {
    const given = typeof reason === "object" ? reason : (headers ?? {});
    for (const [name, value] of Object.entries(given)) this.#headers[name.toLowerCase()] = value;
    this.headersSent = true;
    this.#settle({ status, headers: this.#headers });
    return this;
  }

  // The adapter may end without a head, having set only the status.
  override _transform(chunk: unknown, encoding: BufferEncoding, done: TransformCallback): void {
    this.#headAtLatestNow();
    super._transform(chunk, encoding, done);
  }

  override _flush(done: TransformCallback): void {
    this.#headAtLatestNow();
    done();
  }

  #headAtLatestNow(): void {
    if (!this.headersSent) this.writeHead(this.statusCode);
  }
}
