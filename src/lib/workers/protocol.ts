/** Messages between the plan page and its worker. Every question carries a number; answers to older numbers are dropped. */
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { PlanQuestion } from "#src/lib/plans/question.ts";
import type { PickView, PlaneQuantity, PlaneView, PlanView } from "#src/lib/plans/view.ts";
import type { TableInfo } from "#src/lib/tables/info.ts";

export type PlanAsk =
  | {
      readonly kind: "plan";
      readonly job: number;
      readonly question: PlanQuestion;
      readonly known: readonly KnownMaterial[];
      readonly tables: TableInfo;
    }
  /** A point of the plane that was ranked last. */
  | { readonly kind: "point"; readonly job: number; readonly i: number; readonly j: number; readonly id: string }
  | { readonly kind: "quantity"; readonly job: number; readonly quantity: PlaneQuantity };

export type PlanTold =
  | { readonly kind: "progress"; readonly job: number; readonly share: number }
  | { readonly kind: "plan"; readonly job: number; readonly view: PlanView; readonly learnt: readonly KnownMaterial[] }
  | { readonly kind: "point"; readonly job: number; readonly pick: PickView | null }
  | { readonly kind: "quantity"; readonly job: number; readonly plane: PlaneView | null }
  | { readonly kind: "failed"; readonly job: number; readonly message: string };
