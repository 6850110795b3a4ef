import type { APIRoute } from "astro";
import { otherMethods } from "#src/lib/http/handler.ts";
import { PROBLEM_TYPE, problemDocument } from "#src/lib/http/problems.ts";
import { checkHealth } from "#src/lib/services/health.ts";

/** `GET /api/v1/health`: 200 while tables and database answer, else 503. */
export const GET: APIRoute = async ({ url, locals }) => {
  const health = await checkHealth();
  const headers = { "cache-control": "no-store" };
  if (health.status === "ok") {
    return new Response(JSON.stringify(health), {
      headers: { ...headers, "content-type": "application/json; charset=utf-8" },
    });
  }
  const problem = problemDocument("notReady", "The tables or the database do not answer. Try again shortly.", {
    path: url.pathname,
    requestId: locals.requestId,
  });
  return new Response(JSON.stringify(problem), {
    status: problem.status,
    headers: { ...headers, "content-type": PROBLEM_TYPE, "retry-after": "5" },
  });
};

export const ALL = otherMethods({ GET });
