import type { APIRoute } from "astro";
import { PROBLEM_TYPE, problemDocument } from "#src/lib/http/problems.ts";

/** Whatever no route of the API takes. */
export const ALL: APIRoute = ({ url, locals }) => {
  const problem = problemDocument(
    "notFound",
    "The API has nothing at this address; /api/v1/openapi.json lists what it has.",
    {
      path: url.pathname,
      requestId: locals.requestId,
    },
  );
  return new Response(JSON.stringify(problem), {
    status: problem.status,
    headers: { "content-type": PROBLEM_TYPE, "cache-control": "no-store" },
  });
};
