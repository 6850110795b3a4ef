/** What the server's worker is asked and answers. */
import type { ScatteringTables } from "#src/lib/physics/index.ts";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { PlanView } from "#src/lib/plans/view.ts";
import type { RankRequest } from "#src/lib/schemas/plan.ts";
import type { RankAnswer } from "#src/lib/schemas/plan-answer.ts";

export interface PlanWorkerData {
  readonly tables: ScatteringTables;
  readonly known: readonly KnownMaterial[];
}

export type PlanJob =
  | { readonly kind: "rank"; readonly request: RankRequest; readonly time: number }
  | {
      readonly kind: "view";
      readonly request: RankRequest;
      readonly objectiveProposed: boolean;
      readonly time: number;
    };

export type PlanJobAnswer =
  | { readonly kind: "rank"; readonly answer: RankAnswer }
  | { readonly kind: "view"; readonly view: PlanView }
  | { readonly kind: "fault"; readonly path: string; readonly code: string; readonly message: string };
