/**
 * The state of the plan page in the browser: the question is all there is; the answer comes from the worker. Until it is here the
 * served answer stands, marked as the answer to the question before.
 */
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { useAddress } from "../question/useAddress.ts";
import { type KnownMaterial, uniqueById } from "#src/lib/lookup/finder.ts";
import { ADDRESS_CHARACTERS, type PlanQuestion, writePlanQuestion } from "#src/lib/plans/question.ts";
import type { PickView, PlaneQuantity, PlaneView, PlanView } from "#src/lib/plans/view.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";
import { createPlanRunner, type PlanRunner } from "#src/lib/workers/run.ts";

export interface PlanStart {
  readonly question: PlanQuestion;
  readonly view: PlanView;
  readonly trouble: string | null;
  readonly known: readonly KnownMaterial[];
  readonly tables: TableInfo;
}

export interface PlanState {
  readonly question: PlanQuestion;
  readonly view: PlanView;
  /** The last answer there was, while the question cannot be answered. */
  readonly shown: PlanView["result"];
  /** True while `shown` answers an older question. */
  readonly stale: boolean;
  /** Share of the ranking done, while one runs. */
  readonly progress: number | null;
  readonly trouble: string | null;
  readonly known: readonly KnownMaterial[];
  /** True where the address cannot hold the plan. */
  readonly tooLong: boolean;
  /** Picks of the list, then those kept from the plane. */
  readonly picks: readonly PickView[];
  readonly chosen: PickView | null;
  readonly plane: PlaneView | null;
  readonly change: (fields: Partial<PlanQuestion>) => void;
  readonly learn: (materials: readonly KnownMaterial[]) => void;
  readonly choose: (id: string) => void;
  readonly keepPoint: (i: number, j: number) => Promise<PickView | null>;
  readonly showQuantity: (quantity: PlaneQuantity) => void;
  readonly stop: () => void;
}

/** Typing in a field of the sentence must not start a ranking for every letter. */
const SETTLE_MS = 120;
const MOST_FREE_PICKS = 8;

export function usePlan(start: PlanStart): PlanState {
  const [question, setQuestion] = useState(start.question);
  const [known, setKnown] = useState(start.known);
  const [answer, setAnswer] = useState({ question: start.question, view: start.view });
  const [shown, setShown] = useState(start.view.result);
  const [progress, setProgress] = useState<number | null>(null);
  const [trouble, setTrouble] = useState(start.trouble);
  const [free, setFree] = useState<readonly PickView[]>([]);
  const [chosenId, setChosenId] = useState<string | null>(null);
  const [plane, setPlane] = useState<PlaneView | null>(null);
  const runner = useRef<PlanRunner | null>(null);
  const latest = useRef({ question, known });
  useEffect(() => {
    latest.current = { question, known };
  }, [question, known]);

  const rank = useCallback(
    async (asked: PlanQuestion): Promise<boolean> => {
      runner.current ??= createPlanRunner(start.tables);
      setProgress(0);
      try {
        const answered = await runner.current.rank(asked, latest.current.known, setProgress);
        if (!answered) return false;
        if (answered.learnt.length > 0) setKnown((before) => uniqueById([...before, ...answered.learnt]));
        setAnswer({ question: asked, view: answered.view });
        setTrouble(null);
        if (answered.view.result) {
          setShown(answered.view.result);
          setPlane(null);
          setFree([]);
        }
        setProgress(null);
        return answered.view.result !== null;
      } catch (error) {
        setProgress(null);
        setTrouble(error instanceof Error ? error.message : "The ranking failed.");
        return false;
      }
    },
    [start.tables],
  );

  // A question that was changed is ranked once it has settled.
  const first = useRef(true);
  useEffect(() => {
    if (first.current) {
      first.current = false;
      if (start.view.result !== null || start.view.faults.length > 0) return;
    }
    const timer = setTimeout(() => void rank(question), SETTLE_MS);
    return () => clearTimeout(timer);
  }, [question, rank, start.view]);
  useEffect(() => () => runner.current?.close(), []);
  const query = writePlanQuestion(question).toString();
  const tooLong = query.length > ADDRESS_CHARACTERS;
  useAddress(tooLong ? null : query);

  /** The worker holds the plane that is shown, so that its points can be asked for. */
  const primed = useRef<PlanView["result"]>(null);
  const prime = useCallback(async (): Promise<boolean> => {
    if (runner.current && primed.current === shown) return true;
    runner.current ??= createPlanRunner(start.tables);
    const answered = await runner.current.rank(answer.question, latest.current.known, () => undefined);
    primed.current = shown;
    return answered?.view.result != null;
  }, [answer.question, shown, start.tables]);

  const picks = useMemo(() => [...(shown?.picks ?? []), ...free], [shown, free]);
  const keepPoint = async (i: number, j: number): Promise<PickView | null> => {
    if (!(await prime())) return null;
    const id = String.fromCharCode(65 + (free.length % MOST_FREE_PICKS));
    const pick = (await runner.current?.point(i, j, id)) ?? null;
    if (pick) {
      setFree((before) => [...before.filter((other) => other.id !== id), pick]);
      setChosenId(id);
    }
    return pick;
  };
  return {
    question,
    view: answer.view,
    shown,
    stale: question !== answer.question || (answer.view.result === null && shown !== null),
    progress: question === answer.question ? null : progress,
    trouble,
    known,
    tooLong,
    picks,
    chosen: picks.find(({ id }) => id === chosenId) ?? picks[0] ?? null,
    plane: plane ?? shown?.plane ?? null,
    change: (fields) => setQuestion((before) => ({ ...before, ...fields })),
    learn: (materials) => setKnown((before) => uniqueById([...before, ...materials])),
    choose: setChosenId,
    keepPoint,
    showQuantity: (quantity) => {
      if (quantity === "objective") {
        setPlane(null);
        return;
      }
      void prime().then(async (ready) => {
        if (ready) setPlane((await runner.current?.quantity(quantity)) ?? null);
      });
    },
    stop: () => {
      runner.current?.stop();
      setProgress(null);
      setTrouble("Stopped. The answer below is to the question before.");
    },
  };
}
