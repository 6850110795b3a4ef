/**
 * The state of a look-up in the browser: the question is all there is; the answer is derived from it by the physics core with
 * the tables of the elements it needs. Until those are here the served answer stands.
 */
import { useQueries, type UseQueryResult } from "@tanstack/react-query";
import { useAddress } from "../question/useAddress.ts";
import { useEffect, useMemo, useRef, useState } from "react";
import { useNamedMaterials } from "#src/components/features/question/useNamedMaterials.ts";
import { answerQuestion } from "#src/lib/lookup/answer.ts";
import { type KnownMaterial, materialFinder, type MaterialFinder, uniqueById } from "#src/lib/lookup/finder.ts";
import { type Question, writeQuestion } from "#src/lib/lookup/question.ts";
import { readRecipe } from "#src/lib/lookup/recipe.ts";
import { materialOfLine, QuestionError, statedMaterial } from "#src/lib/lookup/state-material.ts";
import { type View, viewOf } from "#src/lib/lookup/view.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";
import { type LoadedElement, loadElement, tablesOf } from "#src/lib/tables/load.client.ts";

export interface LookupStart {
  readonly question: Question;
  readonly view: View;
  readonly known: readonly KnownMaterial[];
  readonly tables: TableInfo;
}

export interface Lookup {
  readonly question: Question;
  readonly view: View;
  /** True while the view still answers an older question. */
  readonly stale: boolean;
  /** What stands in the way of an answer, in words. */
  readonly trouble: string | null;
  /** Kept materials that the browser has heard of. */
  readonly known: readonly KnownMaterial[];
  readonly change: (fields: Partial<Question>) => void;
  readonly learn: (materials: readonly KnownMaterial[]) => void;
}

export function useLookup(start: LookupStart): Lookup {
  const [question, setQuestion] = useState(start.question);
  const [learnt, setLearnt] = useState<readonly KnownMaterial[]>(start.known);
  const asked = useNamedMaterials(wordsOf(question), learnt);
  const known = useMemo(() => uniqueById([...learnt, ...asked.found]), [learnt, asked.found]);
  const near = asked.near;
  const finder = useMemo(() => materialFinder(known, (words) => near.get(words) ?? []), [known, near]);
  const elements = useElements(question, finder, start.tables);
  const ready = elements.loaded !== null && !asked.pending;

  const latest = useRef({ question: start.question, view: start.view });
  const view = useMemo(() => {
    if (question === start.question && !elements.loaded) return start.view;
    if (!ready || !elements.loaded) return latest.current.view;
    return viewOf(answerQuestion(question, tablesOf(elements.loaded, start.tables), finder));
  }, [question, ready, elements.loaded, finder, start]);
  useEffect(() => {
    latest.current = { question, view };
  }, [question, view]);

  useAddress(writeQuestion(question).toString());
  return {
    question,
    view,
    stale: !ready && question !== start.question,
    trouble: elements.trouble ?? asked.trouble,
    known,
    change: (fields) => setQuestion((before) => ({ ...before, ...fields })),
    learn: (materials) => setLearnt((before) => uniqueById([...before, ...materials])),
  };
}

/** Words of the question that may name a kept material. */
function wordsOf(question: Question): string[] {
  const lines = question.with.split("\n").flatMap((line) => line.split(/[;\t]/).slice(0, 2));
  const named =
    question.parts.trim() === "" ? [question.material] : readRecipe(question.parts).map((line) => line.material);
  return [...named, ...lines];
}

/** The elements of every material that can be read from the question. */
function useElements(question: Question, finder: MaterialFinder, info: TableInfo) {
  const atomicNumbers = useMemo(() => {
    const found = new Set<number>();
    const take = (read: () => { material: { massFractions: ReadonlyMap<number, number> } }): void => {
      try {
        for (const atomicNumber of read().material.massFractions.keys()) found.add(atomicNumber);
      } catch (error) {
        if (!(error instanceof QuestionError)) throw error;
      }
    };
    take(() => statedMaterial(question, finder));
    for (const line of question.with.split("\n"))
      if (line.trim() !== "") take(() => materialOfLine(line.trim(), finder));
    return [...found].sort((a, b) => a - b);
  }, [question, finder]);
  return useQueries({
    queries: atomicNumbers.map((atomicNumber) => ({
      queryKey: ["element", info.version, atomicNumber],
      queryFn: ({ signal }: { signal: AbortSignal }) => loadElement(atomicNumber, info, signal),
      staleTime: Infinity,
      gcTime: Infinity,
    })),
    combine: loadedElements,
  });
}

// Kept outside the hooks: react-query gives the same object back while the results are the same, so that answers are not
// computed again for nothing.
function loadedElements(results: UseQueryResult<LoadedElement>[]) {
  const loaded = results.flatMap((result) => (result.data ? [result.data] : []));
  return {
    loaded: loaded.length === results.length ? loaded : null,
    trouble: results.some((result) => result.isError)
      ? "The tables did not arrive. The values below answer the question before; try again when the connection is back."
      : null,
  };
}
