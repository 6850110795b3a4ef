/**
 * The page's side of the plan worker: one question at a time, the newest wins. A question that runs past its own time limit, or that
 * is stopped, ends the worker; the next question starts another. Without a worker the server is asked.
 */
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import { type PlanQuestion, writePlanQuestion } from "#src/lib/plans/question.ts";
import type { PickView, PlaneQuantity, PlaneView, PlanView } from "#src/lib/plans/view.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";
import type { PlanAsk, PlanTold } from "./protocol.ts";

/** A ranking that takes longer than this is given up. */
export const RANKING_LIMIT_MS = 20_000;

export interface RankedAnswer {
  readonly view: PlanView;
  readonly learnt: readonly KnownMaterial[];
}

export interface PlanRunner {
  /** Resolves null where a newer question or a stop came first. Rejects with a message for people. */
  rank(
    question: PlanQuestion,
    known: readonly KnownMaterial[],
    onProgress: (share: number) => void,
  ): Promise<RankedAnswer | null>;
  /** A point of the plane ranked last; null where there is none, or no worker. */
  point(i: number, j: number, id: string): Promise<PickView | null>;
  quantity(quantity: PlaneQuantity): Promise<PlaneView | null>;
  stop(): void;
  close(): void;
}

interface Waiting {
  readonly resolve: (told: PlanTold | null) => void;
  readonly onProgress: ((share: number) => void) | undefined;
}

/** @param make makes the worker; throws or returns null where there is none */
export function createPlanRunner(tables: TableInfo, make: () => Worker | null = planWorker): PlanRunner {
  let worker: Worker | null = null;
  let broken = false;
  let job = 0;
  let ranking = 0;
  const waiting = new Map<number, Waiting>();

  const end = (): void => {
    worker?.terminate();
    worker = null;
    for (const each of waiting.values()) each.resolve(null);
    waiting.clear();
  };
  const started = (): Worker | null => {
    if (worker || broken) return worker;
    try {
      worker = make();
    } catch {
      worker = null;
    }
    if (!worker) {
      broken = true;
      return null;
    }
    worker.addEventListener("message", (event: MessageEvent<PlanTold>) => {
      const told = event.data;
      const asked = waiting.get(told.job);
      if (!asked) return;
      if (told.kind === "progress") asked.onProgress?.(told.share);
      else {
        waiting.delete(told.job);
        asked.resolve(told);
      }
    });
    // A worker that cannot start or dies is not tried again: the server answers instead.
    worker.addEventListener("error", (event) => {
      event.preventDefault();
      broken = true;
      end();
    });
    return worker;
  };
  const send = (ask: PlanAsk, onProgress?: (share: number) => void): Promise<PlanTold | null> => {
    const to = started();
    if (!to) return Promise.resolve(null);
    return new Promise((resolve) => {
      waiting.set(ask.job, { resolve, onProgress });
      to.postMessage(ask);
    });
  };
  return {
    rank: async (question, known, onProgress) => {
      const mine = ++job;
      ranking = mine;
      let late = false;
      const timer = setTimeout(() => {
        late = true;
        end();
      }, RANKING_LIMIT_MS);
      const told = await send({ kind: "plan", job: mine, question, known, tables }, onProgress);
      clearTimeout(timer);
      if (mine !== ranking) return null;
      if (late) throw new Error("The ranking took too long and was given up. Ask for fewer energies or distances.");
      if (told?.kind === "plan") return { view: told.view, learnt: told.learnt };
      if (told?.kind === "failed") throw new Error(told.message);
      return broken ? { view: await fromServer(question), learnt: [] } : null;
    },
    point: async (i, j, id) => {
      const told = await send({ kind: "point", job: ++job, i, j, id });
      return told?.kind === "point" ? told.pick : null;
    },
    quantity: async (quantity) => {
      const told = await send({ kind: "quantity", job: ++job, quantity });
      return told?.kind === "quantity" ? told.plane : null;
    },
    stop: () => {
      ranking = ++job;
      end();
    },
    close: end,
  };
}

function planWorker(): Worker | null {
  if (typeof Worker === "undefined") return null;
  return new Worker(new URL("./plan.worker.ts", import.meta.url), { type: "module", name: "plan" });
}

async function fromServer(question: PlanQuestion): Promise<PlanView> {
  const response = await fetch(`/plan/view.json?${writePlanQuestion(question)}`);
  if (!response.ok) throw new Error(`The site did not answer (${response.status}). Try again in a few seconds.`);
  return (await response.json()) as PlanView;
}
