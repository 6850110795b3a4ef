/** What a plane says in words: why points are forbidden, what its line means, and what stands at its cross. */
import { distanceText, energyText } from "#src/lib/format/plan-quantities.ts";
import { FORBIDDEN_REASONS, type Reason } from "#src/lib/plans/forbidden-words.ts";
import type { ForbiddenCode } from "#src/lib/schemas/plan-answer.ts";
import type { PlaneData } from "./types.ts";

const OTHER: Reason = { note: "Not allowed", short: "not allowed" };

const reasonOf = (code: string): Reason =>
  Object.hasOwn(FORBIDDEN_REASONS, code) ? FORBIDDEN_REASONS[code as ForbiddenCode] : OTHER;

/** A forbidden point in a word or two. */
export const forbiddenShort = (code: string): string => reasonOf(code).short;

/** Why points of this plane are hatched: one sentence without its full stop for each reason that occurs, each once. */
export function forbiddenNotes({ forbidden }: Pick<PlaneData, "forbidden">): string[] {
  const found = new Set(forbidden.flat().filter((code) => code !== null));
  const known = Object.keys(FORBIDDEN_REASONS).filter((code) => found.has(code));
  const others = [...found].some((code) => !Object.hasOwn(FORBIDDEN_REASONS, code));
  return [...known.map((code) => reasonOf(code).note), ...(others ? [OTHER.note] : [])];
}

/** What the rim line means; null where the plane has none. */
export function rimNote({ equal }: Pick<PlaneData, "equal">): string | null {
  const ratios = (equal ?? []).flat().filter((ratio) => ratio !== null);
  return ratios.some((ratio) => ratio >= 1) && ratios.some((ratio) => ratio < 1)
    ? "Along the dark and bright line, phase and absorption need the same"
    : null;
}

/** The cross, held inside the grid. */
export function crossOf({ cross, energiesKeV, distancesM }: PlaneData): { i: number; j: number } {
  const within = (value: number, count: number): number => Math.max(0, Math.min(count - 1, Math.round(value) || 0));
  return { i: within(cross.i, energiesKeV.length), j: within(cross.j, distancesM.length) };
}

/** The point under the cross: "24 keV, 0.9 m: 0.31 Gy." and why it is forbidden, where it is. */
export function crossText(data: PlaneData): string {
  const { i, j } = crossOf(data);
  const [energyKeV, distanceM] = [data.energiesKeV[i], data.distancesM[j]];
  if (energyKeV === undefined || distanceM === undefined) return "";
  const value = data.values[i]?.[j] ?? null;
  const code = data.forbidden[i]?.[j] ?? null;
  const place = `${energyText(energyKeV)}, ${distanceText(distanceM)}`;
  const amount = value === null ? "no value" : data.quantity.format(value);
  return `${place}: ${amount}.${code === null ? "" : ` ${reasonOf(code).note}.`}`;
}

/** The map's name for those who do not see it. */
export function planeName({ quantity, energiesKeV, distancesM }: PlaneData): string {
  const span = (values: readonly number[], text: (value: number) => string): string => {
    const [low, high] = [values[0], values.at(-1)];
    if (low === undefined || high === undefined) return "none";
    return low === high ? text(low) : `${text(low)} to ${text(high)}`;
  };
  return `${quantity.label} over photon energy, ${span(energiesKeV, energyText)}, and distance, ${span(distancesM, distanceText)}. Arrow keys move the cross, with Shift ten steps; Enter keeps the point.`;
}
