/** The frame of every API route: what is read, what is answered, and how faults are told. Handlers only call services. */
import type { APIContext, APIRoute } from "astro";
import { createHash } from "node:crypto";
import type { z } from "zod";
import { readStrictJson } from "./json.ts";
import { PROBLEM_TYPE, type ProblemDocument, problemDocument, ProblemError, quoteInput } from "./problems.ts";
import { validate } from "./validate.ts";

const JSON_TYPE = "application/json; charset=utf-8";

interface Route<Query, Body> {
  /** Accepted query keys and their form; none where left out. Values are texts. */
  readonly query?: z.ZodType<Query>;
  readonly body?: z.ZodType<Body>;
  /** How long an answer stands. `immutable` only where its address names a version. */
  readonly cache?: (query: Query) => "no-store" | "revalidate" | "immutable";
  readonly answer: (input: { query: Query; body: Body; params: APIContext["params"]; requestId: string }) => unknown;
}

/** Makes an Astro route: checks Accept, query, content type and body, answers JSON with an ETag, or a problem document. */
export function apiRoute<Query = Record<string, never>, Body = undefined>(route: Route<Query, Body>): APIRoute {
  return async (context) => {
    const { request, url, locals, params } = context;
    try {
      refuseOtherAccept(request);
      const query = readQuery(route, url);
      const body = route.body
        ? validate(route.body, await readBody(request), "The body is not valid.")
        : (undefined as Body);
      const value = await route.answer({ query, body, params, requestId: locals.requestId });
      return respond(request, value, route.cache?.(query) ?? "no-store");
    } catch (error) {
      return problemResponse(error, { path: url.pathname, requestId: locals.requestId });
    }
  };
}

/** Any error as a problem document; what is not foreseen is logged and answers 500 without a word of its own. */
export function problemOf(
  error: unknown,
  context: { path: string; requestId: string },
): { document: ProblemDocument; headers: Readonly<Record<string, string>> } {
  let problem = error instanceof ProblemError ? error : null;
  if (!problem) {
    console.error("Request", context.requestId, "failed:", error);
    problem = new ProblemError(
      "internal",
      "Something failed on our side. Nothing was changed. Try again, and name the request id if it stays.",
    );
  }
  return {
    document: problemDocument(problem.code, problem.message, { ...context, errors: problem.errors }),
    headers: problem.headers,
  };
}

export function problemResponse(error: unknown, context: { path: string; requestId: string }): Response {
  const { document, headers } = problemOf(error, context);
  return new Response(JSON.stringify(document), {
    status: document.status,
    headers: { ...headers, "content-type": PROBLEM_TYPE, "cache-control": "no-store" },
  });
}

function refuseOtherAccept(request: Request): void {
  const accept = request.headers.get("accept");
  if (!accept) return;
  const taken = accept
    .split(",")
    .some(
      (part) =>
        /^\s*(\*\/\*|application\/(\*|json|problem\+json))\s*(;|$)/i.test(part) &&
        !/;\s*q\s*=\s*0(\.0*)?\s*$/i.test(part),
    );
  // Browsers that open an API address ask for HTML first; they get JSON all the same.
  if (!taken && !/text\/html|\*\/(?!\*)/i.test(accept))
    throw new ProblemError(
      "notAcceptable",
      "Only application/json is answered here. Send Accept: application/json, or leave it out.",
    );
}

function readQuery<Query>(route: { query?: z.ZodType<Query> }, url: URL): Query {
  const seen = new Map<string, string>();
  for (const [key, value] of url.searchParams) {
    if (seen.has(key))
      throw new ProblemError("repeatedKey", `The query key ${quoteInput(key, 40)} stands twice. Send it once.`);
    if (/[\0-\x1f\x7f]/.test(key + value))
      throw new ProblemError("malformed", "The query holds a control character. Remove it.");
    seen.set(key, value);
  }
  if (!route.query) {
    const [first] = seen.keys();
    if (first !== undefined) {
      throw new ProblemError("invalid", "No query keys are read here.", {
        errors: [{ path: `/${quoteInput(first, 40)}`, code: "unknownKey", message: "Remove this key." }],
      });
    }
    return {} as Query;
  }
  return validate(route.query, Object.fromEntries(seen), "The query is not valid.");
}

async function readBody(request: Request): Promise<unknown> {
  const type = request.headers.get("content-type") ?? "";
  if (!/^application\/json\s*(;\s*charset\s*=\s*"?utf-8"?\s*)?$/i.test(type)) {
    throw new ProblemError("unsupportedMediaType", "The body must be JSON. Send Content-Type: application/json.");
  }
  const bytes = await request.arrayBuffer();
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw new ProblemError("malformed", "The body is not UTF-8.");
  }
  return readStrictJson(text);
}

function respond(request: Request, value: unknown, cache: "no-store" | "revalidate" | "immutable"): Response {
  const text = JSON.stringify(value);
  if (cache === "no-store")
    return new Response(text, { headers: { "content-type": JSON_TYPE, "cache-control": "no-store" } });
  const etag = `"${createHash("sha256").update(text).digest("base64url").slice(0, 22)}"`;
  const headers = {
    "content-type": JSON_TYPE,
    etag,
    "cache-control": cache === "immutable" ? "public, max-age=31536000, immutable" : "no-cache",
  };
  const known = request.headers
    .get("if-none-match")
    ?.split(",")
    .map((tag) => tag.trim().replace(/^W\//, ""));
  return known?.some((tag) => tag === etag || tag === "*")
    ? new Response(null, { status: 304, headers })
    : new Response(text, { headers });
}

/** The route for every method that has none of its own: HEAD is GET without the body, others are refused. */
export function otherMethods(routes: { readonly GET?: APIRoute; readonly POST?: APIRoute }): APIRoute {
  const allow = [...Object.keys(routes), ...(routes.GET ? ["HEAD"] : [])].join(", ");
  return (context) => {
    const { url, locals, request } = context;
    if (request.method === "HEAD" && routes.GET) return routes.GET(context);
    return problemResponse(
      new ProblemError("methodNotAllowed", `${request.method} is not offered here. Offered: ${allow}.`, {
        headers: { allow },
      }),
      { path: url.pathname, requestId: locals.requestId },
    );
  };
}
