/** The fields of an open editor: a question of their own until they are taken. */
import { useState } from "react";
import type { PlanField, PlanQuestion } from "#src/lib/plans/question.ts";
import { type LiveField, liveReading, type LiveReading } from "#src/lib/plans/read-live.ts";

/** Micrometres are kept as "um", which stays short in the address, and shown as they are printed. */
const printed = (text: string): string => text.replace(/(\d\s*)um\b/g, "$1µm");
const kept = (text: string): string => text.replace(/[µμ]m/g, "um");

export interface Draft {
  readonly question: PlanQuestion;
  /** As a field shows it. */
  readonly text: (field: PlanField) => string;
  readonly set: (fields: Partial<PlanQuestion>) => void;
  /** A field's text, as it is typed. */
  readonly type: (field: PlanField) => (text: string) => void;
  readonly reading: (field: LiveField) => LiveReading | null;
  /** True where all of the fields can be read. */
  readonly reads: (...fields: LiveField[]) => boolean;
  /** The fields to take, without spaces around them. */
  readonly taken: <F extends PlanField>(...fields: F[]) => Pick<PlanQuestion, F>;
}

export function useDraft(start: PlanQuestion): Draft {
  const [question, setQuestion] = useState(start);
  const set = (fields: Partial<PlanQuestion>): void => setQuestion((before) => ({ ...before, ...fields }));
  const reading = (field: LiveField): LiveReading | null => liveReading(question, field);
  return {
    question,
    text: (field) => printed(question[field]),
    set,
    type: (field) => (text) => set({ [field]: kept(text) }),
    reading,
    reads: (...fields) => fields.every((field) => reading(field)?.ok !== false),
    taken: <F extends PlanField>(...fields: F[]) =>
      Object.fromEntries(fields.map((field) => [field, question[field].trim()])) as unknown as Pick<PlanQuestion, F>,
  };
}
