/** Answers of the export addresses: a file where the question can be answered, a problem document where it cannot. */
import type { APIRoute } from "astro";
import { PROBLEM_TYPE, problemDocument } from "#src/lib/http/problems.ts";
import { lookUp, type LookupPage } from "#src/lib/services/lookup.ts";

const TYPES = {
  csv: "text/csv; charset=utf-8",
  svg: "image/svg+xml; charset=utf-8",
  json: "application/json; charset=utf-8",
} as const;

export function exportRoute(kind: keyof typeof TYPES, write: (page: LookupPage) => string | Promise<string>): APIRoute {
  return async ({ url, locals }) => {
    const page = await lookUp(url.searchParams);
    if (!page.view.main) {
      const errors = page.view.faults.map((fault) => ({
        path: `/${fault.field}`,
        code: "invalid",
        message: fault.message,
      }));
      const problem = problemDocument("invalid", "The question cannot be answered, so there is nothing to save.", {
        path: url.pathname,
        requestId: locals.requestId,
        errors,
      });
      return new Response(JSON.stringify(problem), {
        status: problem.status,
        headers: { "Content-Type": PROBLEM_TYPE },
      });
    }
    return new Response(await write(page), {
      headers: {
        "Content-Type": TYPES[kind],
        "Content-Disposition": `attachment; filename="rimelight-constants.${kind}"`,
      },
    });
  };
}
