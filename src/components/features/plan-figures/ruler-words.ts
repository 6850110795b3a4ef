/** Words beside the marks of the ruler, where they find room. */
import type { Scale } from "../chart/scales.ts";
import { type Box, firstFree } from "./place.ts";
import { RULER, type RulerMark, type RulerProps, SIZE } from "./ruler.ts";
import { textWidth } from "./text-width.ts";

export interface Words {
  readonly text: string;
  readonly x: number;
  readonly y: number;
}

/** Words of the marks above the axis, beside their marks; where none are given the small rings are named together. */
export function layWords(
  { phase, interval, intervalOf = "phase" }: RulerProps,
  toX: Scale,
  best: RulerMark | null,
  area: Box,
  taken: readonly Box[],
): Words[] {
  const blocked = [...taken];
  const { ring, smallRing } = RULER;
  for (const [index, { value }] of phase.entries()) {
    const { y, r } = index === 0 ? ring : smallRing;
    blocked.push({ x: toX(value) - r - 2, y: y - r, width: 2 * r + 4, height: index === 0 ? 27 : 2 * r });
  }
  if (interval && intervalOf === "phase") {
    const [from, to] = [toX(Math.min(...interval)), toX(Math.max(...interval))];
    blocked.push({ x: from - 2, y: RULER.interval - 6, width: to - from + 4, height: 12 });
  }
  if (best) blocked.push({ x: toX(best.value) - 1, y: RULER.axis, width: 2, height: 20 });
  const found: Words[] = [];
  const say = (text: string, lefts: number, rights: number, baselines: readonly number[]): void => {
    const width = textWidth(text, SIZE);
    const boxes = baselines.flatMap((base) =>
      [rights + 5, lefts - 5 - width].map((x) => ({ x, y: base - 11, width, height: 14 })),
    );
    const box = firstFree(boxes, area, blocked);
    if (!box) return;
    blocked.push(box);
    found.push({ text, x: box.x, y: box.y + 11 });
  };
  const [first, ...others] = phase;
  if (first?.words) say(first.words, toX(first.value) - ring.r, toX(first.value) + ring.r, [56]);
  const told = others.filter(({ words }) => words);
  for (const { value, words } of told) say(words ?? "", toX(value) - 6, toX(value) + 6, [72, 57]);
  if (told.length === 0 && others.length > 0) {
    const xs = others.map(({ value }) => toX(value));
    say(picksText(others.map(({ id }) => id)), Math.min(...xs) - 6, Math.max(...xs) + 6, [72, 57]);
  }
  return found;
}

/** "pick 2", "picks 2 to 5", "picks 2, 4, B". */
export function picksText(ids: readonly string[]): string {
  const first = ids[0] ?? "";
  if (ids.length < 2) return `pick ${first}`;
  const run = ids.length > 2 && ids.every((id, index) => id === String(Number(first) + index));
  return run ? `picks ${first} to ${ids.at(-1) ?? ""}` : `picks ${ids.join(", ")}`;
}
