/** What is wrong with one field of a plan's question, and what to write instead. */
import type { PlanField } from "./question.ts";

export interface PlanFault {
  readonly field: PlanField;
  readonly message: string;
  /** From 1, in the field's text, where it is a formula. */
  readonly position: number | null;
  /** Texts that would be accepted in the field's place. */
  readonly suggestions: readonly { readonly text: string; readonly words: string }[];
}
