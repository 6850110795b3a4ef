/** Plans as requests state them: one point, or the whole ranking. Materials may be kept ones; nothing is stored. */
import type { ScatteringTables } from "#src/lib/physics/index.ts";
import { ProblemError } from "#src/lib/http/problems.ts";
import { type MaterialLookup, StatementError } from "#src/lib/materials/resolve.ts";
import { evaluateJob, rankJob } from "#src/lib/plans/jobs.ts";
import type { EvaluateRequest, RankRequest } from "#src/lib/schemas/plan.ts";
import type { EvaluateAnswer, RankAnswer } from "#src/lib/schemas/plan-answer.ts";

/** One point, also where the use or a limit forbids it. @throws ProblemError invalid or notFound */
export function evaluatePlan(
  request: EvaluateRequest,
  tables: ScatteringTables,
  lookup: MaterialLookup,
): EvaluateAnswer {
  return judged(() => evaluateJob(request, tables, lookup));
}

/** The shortlist and the plane. @throws ProblemError invalid or notFound */
export function rankPlanRequest(request: RankRequest, tables: ScatteringTables, lookup: MaterialLookup): RankAnswer {
  return judged(() => rankJob(request, tables, lookup, new Date()));
}

const ABSENT = new Set(["materialNotFound", "setupNotFound"]);

function judged<T>(compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof StatementError)) throw error;
    const { path, code, message } = error;
    throw new ProblemError(ABSENT.has(code) ? "notFound" : "invalid", message, { errors: [{ path, code, message }] });
  }
}
