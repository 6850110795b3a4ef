/** Rows of `henke93` and `chantler95`: stored as logarithms; what was clipped is missing, not small. */
import { elementBySymbol } from "#src/lib/physics/elements.ts";
import type { StoredElement } from "./sources.ts";

export interface FactorsRow {
  readonly energyEv: number;
  readonly side: "" | "below" | "above";
  /** Electrons; null where the source has no value. */
  readonly f1: number | null;
  readonly f2: number | null;
}

/** Values in electrons at which a source clipped its logarithms: f1 cannot be negative there, f2 not vanish. */
export interface ClippedAt {
  readonly f1: number;
  readonly f2: number;
}

/** exp of a stored logarithm, or null where it was clipped. */
export function storedValue(logarithm: number, clippedAt: number): number | null {
  return logarithm <= Math.log(clippedAt) + 1e-9 ? null : Math.exp(logarithm);
}

/** Rows inside a range, ascending; an energy that stands twice is an edge. Rows without any value are left out. */
export function factorsRows(
  element: StoredElement,
  rangeEv: readonly [number, number],
  clippedAt: ClippedAt,
): FactorsRow[] {
  return element.energy
    .map((energyEv, index) => ({
      energyEv,
      f1: storedValue(element.f1[index]!, clippedAt.f1),
      f2: storedValue(element.f2[index]!, clippedAt.f2),
    }))
    .filter(({ energyEv, f1, f2 }) => energyEv >= rangeEv[0] && energyEv <= rangeEv[1] && (f1 !== null || f2 !== null))
    .sort((a, b) => a.energyEv - b.energyEv)
    .map(({ energyEv, f1, f2 }, index, all) => ({
      energyEv,
      side: all[index + 1]?.energyEv === energyEv ? "below" : all[index - 1]?.energyEv === energyEv ? "above" : "",
      f1,
      f2,
    }));
}

/** Atomic number of a lower-case symbol. @throws Error where there is none */
export function atomicNumberOf(lowerCase: string): number {
  const element = elementBySymbol(lowerCase.charAt(0).toUpperCase() + lowerCase.slice(1));
  if (!element) throw new Error(`The source holds an element that is none: ${lowerCase}`);
  return element.atomicNumber;
}
