/** How the front says no: a problem document for programs, a small page for people. */
import { STATUS_CODES } from "node:http";
import type { Socket } from "node:net";
import type { FastifyReply, FastifyRequest } from "fastify";
import {
  PROBLEM_KINDS,
  PROBLEM_TYPE,
  problemDocument,
  ProblemError,
  type ProblemCode,
} from "#src/lib/http/problems.ts";
import { tooLarge } from "./bodies.ts";
import { ERROR_PAGE_POLICY, errorPage } from "./errorPage.ts";

/** Below /api/ everything speaks JSON; /api itself is a page. */
export function isApiPath(url: string): boolean {
  return url.startsWith("/api/");
}

export function sendProblem(request: FastifyRequest, reply: FastifyReply, problem: ProblemError): FastifyReply {
  const url = request.raw.url ?? "/";
  const document = problemDocument(problem.code, problem.message, {
    path: url.split("?", 1)[0] ?? "/",
    requestId: request.id,
    errors: problem.errors,
  });
  void reply.code(document.status).headers(problem.headers).header("cache-control", "no-store");
  if (document.status === 405) void reply.header("allow", "GET, HEAD, POST, PUT, PATCH, DELETE");
  if (!isApiPath(url) && (request.headers.accept ?? "").includes("text/html")) {
    return reply
      .type("text/html; charset=utf-8")
      .header("content-security-policy", ERROR_PAGE_POLICY)
      .send(errorPage(document));
  }
  return reply.type(PROBLEM_TYPE).send(JSON.stringify(document));
}

const FRAMEWORK_PROBLEMS: Readonly<Record<string, () => ProblemError>> = {
  FST_ERR_CTP_BODY_TOO_LARGE: tooLarge,
  FST_ERR_CTP_INVALID_CONTENT_LENGTH: () =>
    new ProblemError("malformed", "The body is not as long as its Content-Length says."),
  FST_ERR_CTP_INVALID_MEDIA_TYPE: () =>
    new ProblemError("unsupportedMediaType", "The body's Content-Type is not known."),
  FST_ERR_BAD_URL: () => new ProblemError("badPath", "The path of the address cannot be accepted."),
};

/** Any failure as a problem; what has no words of its own becomes `internal`, without a detail of what failed. */
export function problemOf(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  const { code, statusCode } = (error ?? {}) as { code?: string; statusCode?: number };
  const known = FRAMEWORK_PROBLEMS[code ?? ""];
  if (known !== undefined) return known();
  if (statusCode !== undefined && statusCode >= 400 && statusCode < 500) {
    return new ProblemError("malformed", "The request cannot be read.");
  }
  return new ProblemError(
    "internal",
    "This is not your fault. Please try again; if it stays, report the request's number.",
  );
}

/** A whole answer written to a bare connection, for requests that Node could not read. */
export function writeRawProblem(
  socket: Socket,
  problem: ProblemError,
  requestId: string,
  headers: Readonly<Record<string, string>>,
): void {
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
export function clientProblem(error: Error & { code?: string; rawPacket?: Buffer }): ProblemError {
  const say = (code: ProblemCode, detail: string): ProblemError => new ProblemError(code, detail);
  switch (error.code) {
    case "HPE_HEADER_OVERFLOW":
      return requestLineTooLong(error.rawPacket)
        ? say("addressTooLong", "An address may have at most 8192 bytes.")
        : say("headersTooLarge", "The headers of a request may have at most 16 KiB.");
    case "ERR_HTTP_REQUEST_TIMEOUT":
      return say("requestTimeout", "The request did not arrive completely in time.");
    case "HPE_INVALID_METHOD":
      if (!/^[A-Z]+ \//.test(error.rawPacket?.toString("latin1") ?? "")) break;
      return say("methodNotAllowed", "That method is not known here.");
  }
  return say("malformed", "This is not a request of HTTP/1.1 that can be read.");
}

function requestLineTooLong(packet: Buffer | undefined): boolean {
  const text = packet?.toString("latin1") ?? "";
  return /^[A-Z]+ \//.test(text) && text.split("\r\n", 1)[0]!.length > 8192;
}
