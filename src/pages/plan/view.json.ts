/** The plan page's answer as data, for browsers without a worker. Scripts use POST /api/v1/plans/rank. */
import type { APIRoute } from "astro";
import { problemResponse } from "#src/lib/http/handler.ts";
import { planPage } from "#src/lib/services/plans.ts";

export const GET: APIRoute = async ({ url, locals }) => {
  try {
    const { view } = await planPage(url.searchParams);
    return new Response(JSON.stringify(view), {
      headers: { "content-type": "application/json; charset=utf-8", "cache-control": "no-store" },
    });
  } catch (error) {
    return problemResponse(error, { path: url.pathname, requestId: locals.requestId });
  }
};
