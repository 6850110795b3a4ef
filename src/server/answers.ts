/** How the front says no: a problem document for programs, a small page for people. */
import type { FastifyReply, FastifyRequest } from "fastify";
import { PROBLEM_TYPE, problemDocument, ProblemError } from "#src/lib/http/problems.ts";
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
