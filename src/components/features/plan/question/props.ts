import type { ReactNode } from "react";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { PlanFault } from "#src/lib/plans/faults.ts";
import type { PlanQuestion } from "#src/lib/plans/question.ts";
import type { PlanWords } from "#src/lib/plans/words.ts";

export interface PlanQuestionProps {
  readonly question: PlanQuestion;
  /** Left out: made from the question and the materials known. */
  readonly words?: PlanWords;
  readonly faults: readonly PlanFault[];
  readonly known: readonly KnownMaterial[];
  readonly change: (fields: Partial<PlanQuestion>) => void;
  readonly learn: (materials: readonly KnownMaterial[]) => void;
  /** Stands under the sentence, such as the question drawn. */
  readonly children?: ReactNode;
}

/** What every editor of the sentence is given. */
export interface EditorProps {
  /** The blank that was opened. */
  readonly field: PlanBlank;
  readonly question: PlanQuestion;
  readonly known: readonly KnownMaterial[];
  readonly learn: (materials: readonly KnownMaterial[]) => void;
  readonly onTake: (fields: Partial<PlanQuestion>) => void;
  readonly onClose: () => void;
}

/** The blanks of the sentence, in reading order. */
export const PLAN_BLANKS = [
  "size",
  "shape",
  "feature",
  "thickness",
  "host",
  "layers",
  "setup",
  "energies",
  "distances",
  "use",
  "dose",
  "time",
] as const;
export type PlanBlank = (typeof PLAN_BLANKS)[number];
