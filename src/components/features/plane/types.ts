/** What the plane is drawn from: a grid of values over energy and distance, and what stands on it. */
import type { Technique } from "#src/lib/format/quantities.ts";

export type Grid<T> = readonly (readonly T[])[];
/** Which end of the quantity is wanted; that end stands out from the ground. */
export type Better = "less" | "more";

export interface PlaneQuantity {
  /** "Dose needed" */
  readonly label: string;
  /** Of values and bands: "Gy", or "" for a ratio. */
  readonly unit: string;
  /** A value as it is read, with its unit. */
  readonly format: (value: number) => string;
  /** "less" unless stated. */
  readonly better?: Better;
}

export interface PlanePick {
  readonly id: string;
  readonly technique: Technique;
  readonly energyKeV: number;
  readonly distanceM: number;
  /** Said of it by a screen reader: "24 keV, 0.9 m, 0.31 Gy". */
  readonly words: string;
}

/** A place of the grid: energy i, distance j. */
export interface GridPoint {
  readonly i: number;
  readonly j: number;
}

export interface PlaneData {
  /** Ascending; not in even steps, since pairs stand beside edges. */
  readonly energiesKeV: readonly number[];
  /** Ascending; may begin at 0, and is drawn on a log scale only where it does not. */
  readonly distancesM: readonly number[];
  /** By energy, then distance; null where there is no value. */
  readonly values: Grid<number | null>;
  /** Code of what forbids a point, or null. */
  readonly forbidden: Grid<string | null>;
  /** Thresholds between bands, ascending, seven at most (niceBands). */
  readonly bands: readonly number[];
  readonly quantity: PlaneQuantity;
  readonly edges: readonly { readonly name: string; readonly energyKeV: number }[];
  /** What absorption needs over what phase needs: the rim line runs where it is 1. */
  readonly equal: Grid<number | null> | null;
  readonly picks: readonly PlanePick[];
  /** Id of the chosen pick. */
  readonly chosen: string | null;
  readonly cross: GridPoint;
}

export interface PlaneHandlers {
  readonly onCross?: (i: number, j: number) => void;
  readonly onKeep?: (i: number, j: number) => void;
  readonly onPick?: (id: string) => void;
}
