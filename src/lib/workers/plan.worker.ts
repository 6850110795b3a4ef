/** The browser's worker of the plan page: reads the question, fetches the tables of its elements, ranks, answers. */
import { z } from "zod";
import {
  DEFAULT_SCREEN,
  evaluatePoint,
  type Material,
  type RankedPlan,
  type ScatteringTables,
} from "#src/lib/physics/index.ts";
import { type KnownMaterial, materialFinder, type MaterialFinder, uniqueById } from "#src/lib/lookup/finder.ts";
import { searchMaterials } from "#src/lib/lookup/search.client.ts";
import { StatementError } from "#src/lib/materials/resolve.ts";
import { viewJob } from "#src/lib/plans/jobs.ts";
import { namedWords, type PlanQuestion } from "#src/lib/plans/question.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";
import { resolvePlan, type ResolvedPlan } from "#src/lib/plans/resolve-plan.ts";
import { pickView, planeView } from "#src/lib/plans/view.ts";
import type { RankRequest } from "#src/lib/schemas/plan.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";
import { type LoadedElement, loadElement, tablesOf } from "#src/lib/tables/load.client.ts";
import type { PlanAsk, PlanTold } from "./protocol.ts";

// The page's policy forbids code from strings, which the validator would try.
z.config({ jitless: true });

const tell = (message: PlanTold): void => self.postMessage(message);
const PROGRESS_EVERY_MS = 150;
const elements = new Map<number, Promise<LoadedElement>>();
const found = new Map<string, readonly KnownMaterial[]>();
let latest = 0;
let last: { ranked: RankedPlan; plan: ResolvedPlan; tables: ScatteringTables } | null = null;

self.addEventListener("message", (event: MessageEvent<PlanAsk>) => {
  const ask = event.data;
  latest = Math.max(latest, ask.job);
  answer(ask).catch((error: unknown) =>
    tell({ kind: "failed", job: ask.job, message: error instanceof Error ? error.message : String(error) }),
  );
});

async function answer(ask: PlanAsk): Promise<void> {
  if (ask.kind === "plan") return answerPlan(ask);
  if (ask.kind === "quantity") {
    tell({ kind: "quantity", job: ask.job, plane: last && planeView(last.ranked, ask.quantity) });
    return;
  }
  tell({ kind: "point", job: ask.job, pick: pointAt(ask.i, ask.j, ask.id) });
}

function pointAt(i: number, j: number, id: string) {
  if (!last) return null;
  const { ranked, plan, tables } = last;
  const { energiesEv, distancesM } = ranked.plane.grid;
  const [energyEv, distanceM] = [energiesEv[i], distancesM[j]];
  if (energyEv === undefined || distanceM === undefined) return null;
  const pick = evaluatePoint(ranked.task, energyEv, distanceM, tables);
  return pick && pickView(pick, id, ranked, plan);
}

async function answerPlan({ job, question, known, tables: info }: Extract<PlanAsk, { kind: "plan" }>): Promise<void> {
  const { finder, learnt } = await finderFor(question, known);
  if (job < latest) return;
  const { request, faults, objectiveProposed } = readPlan(question, finder);
  if (!request) {
    tell({ kind: "plan", job, view: { faults, result: null }, learnt });
    return;
  }
  const tables = tablesOf(await loaded(request, finder, info), info);
  if (job < latest) return;
  let told = performance.now();
  const answered = viewJob(request, objectiveProposed, tables, finder.lookup, new Date(), {
    onProgress: (share) => {
      // The page draws each; more often than eyes follow would only keep it busy.
      if (performance.now() - told < PROGRESS_EVERY_MS) return true;
      told = performance.now();
      tell({ kind: "progress", job, share });
      return true;
    },
  });
  last = answered.ranked && answered.plan && { ranked: answered.ranked, plan: answered.plan, tables };
  tell({ kind: "plan", job, view: answered.view, learnt });
}

/** Elements of every material of the plan and of its screen, each fetched once. */
async function loaded(request: RankRequest, finder: MaterialFinder, info: TableInfo): Promise<LoadedElement[]> {
  const materials: Material[] = [DEFAULT_SCREEN];
  try {
    const { task } = resolvePlan(request, finder.lookup);
    materials.push(task.sample.feature.material, task.sample.host.material);
    materials.push(...task.sample.layers.map((layer) => layer.material));
    if (task.setup.efficiency?.kind === "screen") materials.push(task.setup.efficiency.material);
  } catch (error) {
    // The ranking meets the same fault and tells it.
    if (!(error instanceof StatementError)) throw error;
  }
  const numbers = new Set(materials.flatMap((material) => [...material.massFractions.keys()]));
  return Promise.all(
    [...numbers].map((atomicNumber) => {
      const loading = elements.get(atomicNumber) ?? loadElement(atomicNumber, info);
      elements.set(atomicNumber, loading);
      // A table that did not arrive is asked for again next time.
      loading.catch(() => elements.delete(atomicNumber));
      return loading;
    }),
  );
}

/** Known materials and those that the question's words name; the handbook is asked once for each word. */
async function finderFor(question: PlanQuestion, known: readonly KnownMaterial[]) {
  const start = materialFinder(known);
  const words = namedWords(question).filter(
    (word) => word.length >= 2 && word.length <= 64 && /\p{L}/u.test(word) && !start.find(word),
  );
  await Promise.all(
    words.map(async (word) => {
      if (!found.has(word)) found.set(word, await searchMaterials(word, 8).catch(() => []));
    }),
  );
  const learnt = words.flatMap((word) => found.get(word) ?? []);
  return { finder: materialFinder(uniqueById([...known, ...learnt]), (word) => found.get(word) ?? []), learnt };
}
