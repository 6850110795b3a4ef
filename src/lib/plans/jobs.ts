/** The work of a plan in one call each, with tables as a value: the server's and the browser's workers run the same. */
import { evaluatePoint, evFromKev, rankPlan, type RankedPlan, type ScatteringTables } from "#src/lib/physics/index.ts";
import { type MaterialLookup, StatementError } from "#src/lib/materials/resolve.ts";
import type { EvaluateRequest, RankRequest } from "#src/lib/schemas/plan.ts";
import type { EvaluateAnswer, RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import { evaluateAnswer, rankAnswer } from "./answer.ts";
import type { PlanFault } from "./faults.ts";
import { fieldOfPath } from "./read-question.ts";
import { refuseOutside, resolveGrid, resolvePlan, type ResolvedPlan } from "./resolve-plan.ts";
import { planResult, type PlanView } from "./view.ts";

export interface JobOptions {
  readonly onProgress?: (share: number) => boolean;
}

/** One point, also where the use or a limit forbids it. @throws StatementError */
export function evaluateJob(
  request: EvaluateRequest,
  tables: ScatteringTables,
  lookup: MaterialLookup,
): EvaluateAnswer {
  const plan = resolvePlan(request, lookup);
  const energyEv = Number(evFromKev(request.energyKeV).toPrecision(14));
  refuseOutside([energyEv], plan.task.tabulation, tables, "/energyKeV");
  const pick = evaluatePoint(plan.task, energyEv, request.distanceM, tables);
  if (!pick) {
    throw new StatementError({
      path: "/energyKeV",
      code: "notInTable",
      message: `${plan.task.tabulation} has no values of all the materials at ${request.energyKeV} keV. Take another energy or tabulation.`,
    });
  }
  return evaluateAnswer(pick, plan, tables);
}

/** The shortlist and the plane. @throws StatementError */
export function rankJob(
  request: RankRequest,
  tables: ScatteringTables,
  lookup: MaterialLookup,
  date: Date,
): RankAnswer {
  const plan = resolvePlan(request, lookup);
  const grid = resolveGrid(request, plan.task, tables);
  return rankAnswer(rankPlan(plan.task, grid, tables), plan, tables, date);
}

export interface AnsweredPlan {
  readonly view: PlanView;
  /** Kept by a worker for single points and other quantities of the same plan. */
  readonly ranked: RankedPlan | null;
  readonly plan: ResolvedPlan | null;
}

/** The page's answer to a request that was read from a question. */
export function viewJob(
  request: RankRequest,
  objectiveProposed: boolean,
  tables: ScatteringTables,
  lookup: MaterialLookup,
  date: Date,
  options: JobOptions = {},
): AnsweredPlan {
  try {
    const plan = resolvePlan(request, lookup);
    const grid = resolveGrid(request, plan.task, tables);
    const ranked = rankPlan(plan.task, grid, tables, options);
    const result = planResult(ranked, plan, tables, { objectiveProposed, date });
    return { view: { faults: [], result }, ranked, plan };
  } catch (error) {
    if (!(error instanceof StatementError)) throw error;
    const { path, message } = error;
    const fault: PlanFault = { field: fieldOfPath(path), message, position: null, suggestions: [] };
    return { view: { faults: [fault], result: null }, ranked: null, plan: null };
  }
}
