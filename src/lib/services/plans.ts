/**
 * Plans as requests state them: one point, or the whole ranking. Nothing is stored. Rankings run in a worker thread where the
 * program has one (the built server), and in place where it has none (tests, development).
 */
import type { ScatteringTables } from "#src/lib/physics/index.ts";
import { ProblemError } from "#src/lib/http/problems.ts";
import { type KnownMaterial, uniqueById } from "#src/lib/lookup/finder.ts";
import { type MaterialLookup, StatementError } from "#src/lib/materials/resolve.ts";
import { evaluateJob, rankJob, viewJob } from "#src/lib/plans/jobs.ts";
import { namedWords, type PlanQuestion, readPlanQuestion } from "#src/lib/plans/question.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";
import type { PlanView } from "#src/lib/plans/view.ts";
import type { EvaluateRequest, RankRequest } from "#src/lib/schemas/plan.ts";
import type { EvaluateAnswer, RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import { type TableInfo, tableInfo } from "#src/lib/tables/info.ts";
import type { PlanJob, PlanJobAnswer } from "#src/lib/workers/plan-jobs.ts";
import { createPool, type Pool, PoolError } from "#src/lib/workers/pool.server.ts";
import { handbookFinder, materialLookup, slimMaterial } from "./lookup.ts";
import { allMaterials } from "./materials.ts";
import { getTables } from "./tables.ts";

/** One point, also where the use or a limit forbids it. @throws ProblemError invalid or notFound */
export function evaluatePlan(
  request: EvaluateRequest,
  tables: ScatteringTables,
  lookup: MaterialLookup,
): EvaluateAnswer {
  return judged(() => evaluateJob(request, tables, lookup));
}

/** The shortlist and the plane, in place. @throws ProblemError invalid or notFound */
export function rankPlanRequest(request: RankRequest, tables: ScatteringTables, lookup: MaterialLookup): RankAnswer {
  return judged(() => rankJob(request, tables, lookup, new Date()));
}

/** The same off the main thread. @throws ProblemError invalid, notFound, or overloaded */
export async function rankPlan(request: RankRequest): Promise<RankAnswer> {
  const tables = await getTables();
  const pool = poolOf(tables);
  if (!pool) return rankPlanRequest(request, tables, materialLookup);
  const answer = await run(pool, { kind: "rank", request, time: Date.now() });
  if (answer.kind !== "rank") throw new Error("The worker answered another question.");
  return answer.answer;
}

export interface PlanPage {
  readonly question: PlanQuestion;
  readonly view: PlanView;
  /** Why there is no answer although the question is sound: the site is busy. */
  readonly trouble: string | null;
  /** Handbook entries that the question names. */
  readonly known: readonly KnownMaterial[];
  readonly tables: TableInfo;
}

let unasked: Promise<PlanPage> | null = null;

/** The plan page: the address's question and its answer, or what stands in the way. What nobody asked is answered once. */
export function planPage(query: URLSearchParams): Promise<PlanPage> {
  if (query.size > 0) return answeredPage(query);
  unasked ??= answeredPage(query).then((page) => {
    if (page.trouble !== null) unasked = null;
    return page;
  });
  unasked.catch(() => (unasked = null));
  return unasked;
}

async function answeredPage(query: URLSearchParams): Promise<PlanPage> {
  const question = readPlanQuestion(query);
  const tables = await getTables();
  const finder = handbookFinder();
  const { request, faults, objectiveProposed } = readPlan(question, finder);
  const page = { question, trouble: null, known: namedIn(question), tables: tableInfo(tables) };
  if (!request) return { ...page, view: { faults, result: null } };
  const pool = poolOf(tables);
  if (!pool) return { ...page, view: viewJob(request, objectiveProposed, tables, materialLookup, new Date()).view };
  try {
    const answer = await run(pool, { kind: "view", request, objectiveProposed, time: Date.now() });
    if (answer.kind !== "view") throw new Error("The worker answered another question.");
    return { ...page, view: answer.view };
  } catch (error) {
    // The page stands without its answer; the browser's own worker may still find it.
    if (!(error instanceof ProblemError) || error.code !== "overloaded") throw error;
    return { ...page, trouble: error.message, view: { faults: [], result: null } };
  }
}

/** The API's answer to the address's question, for files. @throws ProblemError invalid where a field cannot be read */
export async function planFile(query: URLSearchParams): Promise<{ request: RankRequest; answer: RankAnswer }> {
  const { request, faults } = readPlan(readPlanQuestion(query), handbookFinder());
  if (!request) {
    throw new ProblemError("invalid", "The question cannot be answered, so there is nothing to save.", {
      errors: faults.map(({ field, message }) => ({ path: `/${field}`, code: "invalid", message })),
    });
  }
  return { request, answer: await rankPlan(request) };
}

function namedIn(question: PlanQuestion): KnownMaterial[] {
  const finder = handbookFinder();
  const found = namedWords(question).flatMap((word) => [finder.find(word) ?? [], finder.ofFormula(word)].flat());
  return uniqueById(found).map(slimMaterial);
}

/** Where the front server put the worker's program (server/front.ts). */
export const PLAN_WORKER = Symbol.for("rimelight.planWorker");
const POOL = Symbol.for("rimelight.planPool");
const HOLDER = globalThis as { [PLAN_WORKER]?: URL; [POOL]?: Pool };

function poolOf(tables: ScatteringTables): Pool | null {
  const entry = HOLDER[PLAN_WORKER];
  if (!entry) return null;
  HOLDER[POOL] ??= createPool(entry, { tables, known: allMaterials().map(slimMaterial) });
  return HOLDER[POOL];
}

async function run(pool: Pool, job: PlanJob): Promise<Exclude<PlanJobAnswer, { kind: "fault" }>> {
  let answer: PlanJobAnswer;
  try {
    answer = (await pool.run(job)) as PlanJobAnswer;
  } catch (error) {
    if (!(error instanceof PoolError) || error.kind === "failed") throw error;
    throw new ProblemError(
      "overloaded",
      error.kind === "full"
        ? "Too many rankings are asked at once. Try again in a few seconds."
        : "This ranking takes too long. Ask for fewer energies or distances, or try again in a few seconds.",
      { headers: { "retry-after": "2" } },
    );
  }
  if (answer.kind === "fault") throw problemOf(answer);
  return answer;
}

const ABSENT = new Set(["materialNotFound", "setupNotFound"]);

function problemOf({ path, code, message }: { path: string; code: string; message: string }): ProblemError {
  return new ProblemError(ABSENT.has(code) ? "notFound" : "invalid", message, { errors: [{ path, code, message }] });
}

function judged<T>(compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (error instanceof StatementError) throw problemOf(error);
    throw error;
  }
}
