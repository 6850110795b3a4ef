/** Files of the plan page: the API's answer to the address's question, or a problem document. */
import type { APIRoute } from "astro";
import { problemResponse } from "#src/lib/http/handler.ts";
import { planFile } from "#src/lib/services/plans.ts";

type PlanFile = Awaited<ReturnType<typeof planFile>>;

const TYPES = { csv: "text/csv; charset=utf-8", json: "application/json; charset=utf-8" } as const;

export function fileRoute(name: string, kind: keyof typeof TYPES, write: (file: PlanFile) => string): APIRoute {
  return async ({ url, locals }) => {
    try {
      return new Response(write(await planFile(url.searchParams)), {
        headers: {
          "content-type": TYPES[kind],
          "content-disposition": `attachment; filename="rimelight-${name}.${kind}"`,
          "cache-control": "no-store",
        },
      });
    } catch (error) {
      return problemResponse(error, { path: url.pathname, requestId: locals.requestId });
    }
  };
}
