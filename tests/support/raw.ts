/** Requests as bytes on a connection: clients and `fetch` would tidy up what these tests are about. */
import { connect } from "node:net";

export interface RawAnswer {
  readonly status: number;
  /** Names in lower case; of repeated ones the last. */
  readonly headers: ReadonlyMap<string, string>;
  readonly body: string;
  readonly bodyBytes: Buffer;
  /** Everything that came. */
  readonly bytes: Buffer;
  /** Whether the server closed the connection. */
  readonly closed: boolean;
}

/**
 * Writes `parts` one after another and reads one answer. Resolves when the answer is complete or the connection ends;
 * rejects when neither happens within `waitMs`.
 */
export function rawRequest(
  baseUrl: string,
  parts: string | Buffer | readonly (string | Buffer)[],
  waitMs = 5000,
): Promise<RawAnswer> {
  const { hostname, port } = new URL(baseUrl);
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    const socket = connect({ port: Number(port), host: hostname === "localhost" ? "127.0.0.1" : hostname });
    const timer = setTimeout(() => {
      socket.destroy();
      reject(
        new Error(`No whole answer within ${waitMs} ms: ${Buffer.concat(chunks).toString("latin1").slice(0, 200)}`),
      );
    }, waitMs);
    const finish = (closed: boolean): void => {
      clearTimeout(timer);
      socket.destroy();
      resolve(parseAnswer(Buffer.concat(chunks), closed));
    };
    socket.on("connect", () => {
      for (const part of typeof parts === "string" || Buffer.isBuffer(parts) ? [parts] : parts) socket.write(part);
    });
    socket.on("data", (chunk) => {
      chunks.push(chunk);
      if (isComplete(Buffer.concat(chunks))) setTimeout(() => finish(false), 20);
    });
    socket.on("close", () => finish(true));
    // A connection reset after the answer still leaves the answer.
    socket.on("error", () => undefined);
  });
}

/** A request line and headers, Host included unless given. */
export function request(baseUrl: string, line: string, headers: readonly string[] = []): string {
  const host = headers.some((header) => /^host:/i.test(header)) ? [] : [`Host: ${new URL(baseUrl).host}`];
  return [`${line} HTTP/1.1`, ...host, ...headers, "", ""].join("\r\n");
}

/** GET of an address exactly as spelt. */
export function rawGet(baseUrl: string, target: string, headers: readonly string[] = []): Promise<RawAnswer> {
  return rawRequest(baseUrl, request(baseUrl, `GET ${target}`, headers));
}

function parseAnswer(bytes: Buffer, closed: boolean): RawAnswer {
  const text = bytes.toString("latin1");
  const end = text.indexOf("\r\n\r\n");
  const [first = "", ...lines] = text.slice(0, end < 0 ? undefined : end).split("\r\n");
  const headers = new Map(
    lines.map((line) => {
      const at = line.indexOf(":");
      return [line.slice(0, at).toLowerCase(), line.slice(at + 1).trim()];
    }),
  );
  const bodyBytes = end < 0 ? Buffer.alloc(0) : bytes.subarray(end + 4);
  const whole = headers.get("transfer-encoding") === "chunked" ? withoutChunks(bodyBytes) : bodyBytes;
  return {
    status: Number(/^HTTP\/1\.1 (\d{3})/.exec(first)?.[1] ?? 0),
    headers,
    body: whole.toString("utf8"),
    bodyBytes: whole,
    bytes,
    closed,
  };
}

function isComplete(bytes: Buffer): boolean {
  if (!bytes.includes("\r\n\r\n")) return false;
  const answer = parseAnswer(bytes, false);
  const length = answer.headers.get("content-length");
  if (answer.status === 304 || answer.status === 204) return true;
  if (length !== undefined) return answer.bodyBytes.length >= Number(length);
  return answer.headers.get("transfer-encoding") === "chunked" && bytes.subarray(-5).toString() === "0\r\n\r\n";
}

function withoutChunks(bytes: Buffer): Buffer {
  const parts: Buffer[] = [];
  for (let at = 0; ;) {
    const lineEnd = bytes.indexOf("\r\n", at);
    const length = lineEnd < 0 ? 0 : parseInt(bytes.subarray(at, lineEnd).toString("latin1"), 16);
    if (!(length > 0)) return Buffer.concat(parts);
    parts.push(bytes.subarray(lineEnd + 2, lineEnd + 2 + length));
    at = lineEnd + 2 + length + 2;
  }
}
