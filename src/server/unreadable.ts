/** Requests that never become one: what Node's parser cannot read, and what Node would answer without our headers. */
import { randomBytes } from "node:crypto";
import { type IncomingMessage, type Server, type ServerResponse, STATUS_CODES } from "node:http";
import type { Socket } from "node:net";
import type { FastifyBaseLogger } from "fastify";
import {
  PROBLEM_KINDS,
  PROBLEM_TYPE,
  type ProblemCode,
  problemDocument,
  ProblemError,
} from "#src/lib/http/problems.ts";
import { MAX_ADDRESS_BYTES } from "./paths.ts";

type Headers = Readonly<Record<string, string>>;
type Unreadable = Error & { code?: string; rawPacket?: unknown };

export function newRequestId(): string {
  return randomBytes(9).toString("base64url");
}

/** Sets the security headers before anything else touches an answer, and answers what Node would answer without them. */
export function guardServer(server: Server, headers: Headers): void {
  server.prependListener("request", (_request: IncomingMessage, response: ServerResponse) => {
    for (const [name, value] of Object.entries(headers)) response.setHeader(name, value);
  });
  server.on("checkExpectation", (request: IncomingMessage, response: ServerResponse) => {
    server.emit("request", request, response);
  });
  server.on("connect", (_request: IncomingMessage, socket: Socket) => {
    writeRawProblem(socket, new ProblemError("methodNotAllowed", "This is no proxy."), newRequestId(), headers);
  });
}

/** Answers what the parser could not read, and closes the connection. */
export function answerUnreadable(error: Unreadable, socket: Socket, headers: Headers, log: FastifyBaseLogger): void {
  if (error.code === "ECONNRESET" || !socket.writable) {
    socket.destroy();
    return;
  }
  const requestId = newRequestId();
  const problem = clientProblem(error);
  log.info({ requestId, code: problem.code, address: socket.remoteAddress }, "A request could not be read.");
  writeRawProblem(socket, problem, requestId, headers);
}

/** A whole answer written to a bare connection. */
function writeRawProblem(socket: Socket, problem: ProblemError, requestId: string, headers: Headers): void {
  const body = JSON.stringify(problemDocument(problem.code, problem.message, { path: "", requestId }));
  const { status } = PROBLEM_KINDS[problem.code];
  const lines = Object.entries({
    ...headers,
    "content-type": PROBLEM_TYPE,
    "content-length": String(Buffer.byteLength(body)),
    "cache-control": "no-store",
    "x-request-id": requestId,
    connection: "close",
  }).map(([name, value]) => `${name}: ${value}\r\n`);
  socket.end(`HTTP/1.1 ${status} ${STATUS_CODES[status] ?? ""}\r\n${lines.join("")}\r\n${body}`, () =>
    socket.destroy(),
  );
}

/** What Node's parser found wrong. */
function clientProblem(error: Unreadable): ProblemError {
  const say = (code: ProblemCode, detail: string): ProblemError => new ProblemError(code, detail);
  switch (error.code) {
    case "HPE_HEADER_OVERFLOW":
      return requestLineTooLong(error.rawPacket)
        ? say("addressTooLong", `An address may have at most ${MAX_ADDRESS_BYTES} bytes.`)
        : say("headersTooLarge", "The headers of a request may have at most 16 KiB.");
    case "ERR_HTTP_REQUEST_TIMEOUT":
      return say("requestTimeout", "The request did not arrive completely in time.");
    case "HPE_INVALID_METHOD":
      if (!/^[A-Z]+ \//.test(textOf(error.rawPacket))) break;
      return say("methodNotAllowed", "That method is not known here.");
  }
  return say("malformed", "This is not a request of HTTP/1.1 that can be read.");
}

function requestLineTooLong(packet: unknown): boolean {
  const text = textOf(packet);
  return /^[A-Z]+ \//.test(text) && text.split("\r\n", 1)[0]!.length > MAX_ADDRESS_BYTES;
}

function textOf(packet: unknown): string {
  return Buffer.isBuffer(packet) ? packet.toString("latin1") : "";
}
