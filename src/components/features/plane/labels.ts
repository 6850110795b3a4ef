/** Places for words on the plane: numbers on the lines between bands, and the name of the side where absorption needs less. */
import type { Point } from "./contours.ts";
import { nearestIndex } from "./keys.ts";
import { type PlaneLayout, px } from "./layout.ts";
import type { Grid } from "./types.ts";

export interface LineLabel {
  readonly x: number;
  readonly y: number;
  readonly text: string;
  readonly width: number;
}

export interface LineToLabel {
  readonly text: string;
  readonly lines: readonly (readonly Point[])[];
}

export const LABEL_HEIGHT = 18;
const LETTER = 7.4;
/** Nearer than this to a mark or another label, px, a line goes without: the key has its number too. */
const CLEAR = 5;
/** Farther than this is no better. */
const FAR = 56;

interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

const markBox = ([x, y]: Point): Box => ({ x, y, width: 30, height: 30 });
/** Between the borders of two boxes. */
const gap = (a: Box, b: Box): number =>
  Math.hypot(
    Math.max(0, Math.abs(a.x - b.x) - (a.width + b.width) / 2),
    Math.max(0, Math.abs(a.y - b.y) - (a.height + b.height) / 2),
  );

/** One label a line, as clear of marks, of each other and of hatching as the line allows; left to the key where it is crowded. */
export function placeLabels(
  wanted: readonly LineToLabel[],
  layout: PlaneLayout,
  marks: readonly Point[],
  hatched: Grid<string | null>,
): LineLabel[] {
  const placed: LineLabel[] = [];
  const taken: Box[] = marks.map(markBox);
  for (const { text, lines } of wanted) {
    const width = Math.round(text.length * LETTER + 10);
    let best: { score: number; box: Box } | null = null;
    for (const [x, y] of lines.flatMap((line) => spaced(line))) {
      const box = { x, y, width, height: LABEL_HEIGHT };
      if (!insideFrame(layout, box)) continue;
      const clear = Math.min(FAR, ...taken.map((other) => gap(box, other)));
      if (clear < CLEAR) continue;
      const off = hatched[nearestIndex(layout.x.at, x)]?.[nearestIndex(layout.y.at, y)] ? 60 : 0;
      // Whole pixels: the last bits of a logarithm must not decide between two places.
      const score = Math.round(clear - off - (x - layout.left) * 0.05);
      if (best === null || score > best.score) best = { score, box };
    }
    if (best === null) continue;
    placed.push({ x: best.box.x, y: best.box.y, text, width });
    taken.push(best.box);
  }
  return placed;
}

/** Inside the frame and, of strips, inside one of them. */
function insideFrame({ x: across, y: up, kind }: PlaneLayout, { x, y, width, height }: Box): boolean {
  const holds = (from: number, to: number, at: number, size: number): boolean =>
    at - size / 2 >= Math.min(from, to) + 2 && at + size / 2 <= Math.max(from, to) - 2;
  const parts = (axis: PlaneLayout["x"], split: boolean): { from: number; to: number }[] =>
    split ? [...axis.groups] : [{ from: axis.cells[0]?.[0] ?? 0, to: axis.cells.at(-1)?.[1] ?? 0 }];
  return (
    parts(across, kind === "columns").some(({ from, to }) => holds(from, to, x, width)) &&
    parts(up, kind === "rows").some(({ from, to }) => holds(from, to, y, height))
  );
}

/** Points along a line, some 12 px apart, its middle among them. */
function spaced(line: readonly Point[]): Point[] {
  const lengths = line
    .slice(1)
    .map((point, index) => Math.hypot(point[0] - line[index]![0], point[1] - line[index]![1]));
  const whole = lengths.reduce((sum, length) => sum + length, 0);
  const count = Math.max(1, Math.floor(whole / 12));
  const points: Point[] = [];
  let [index, before] = [0, 0];
  for (let step = 0; step < count; step++) {
    const along = ((step + 0.5) / count) * whole;
    while (index < lengths.length - 1 && before + lengths[index]! < along) before += lengths[index++]!;
    const share = lengths[index]! > 0 ? (along - before) / lengths[index]! : 0;
    const [from, to] = [line[index]!, line[index + 1]!];
    points.push([px(from[0] + share * (to[0] - from[0])), px(from[1] + share * (to[1] - from[1]))]);
  }
  return points;
}

/** Middle of a box where every point of the grid below it is on absorption's side, far from what is placed; null without room. */
export function placeSide(
  equal: Grid<number | null>,
  layout: PlaneLayout,
  [width, height]: readonly [number, number],
  marks: readonly Point[],
  labels: readonly LineLabel[],
): Point | null {
  if (layout.kind !== "map") return null;
  const { x, y, left, right, top, bottom } = layout;
  const below = (a: number, b: number): boolean => {
    const ratio = equal[nearestIndex(x.at, a)]?.[nearestIndex(y.at, b)] ?? null;
    return ratio !== null && ratio < 1;
  };
  const taken = [...marks.map(markBox), ...labels.map((label) => ({ ...label, height: LABEL_HEIGHT }))];
  let best: { score: number; point: Point } | null = null;
  for (let b = bottom - height / 2 - 6; b > top + height / 2; b -= 14) {
    for (let a = left + width / 2 + 6; a < right - width / 2; a += 14) {
      const shares = [-0.5, -0.25, 0, 0.25, 0.5];
      if (!shares.every((s) => shares.every((t) => below(a + s * (width + 8), b + t * (height + 8))))) continue;
      const clear = Math.min(FAR, ...taken.map((other) => gap({ x: a, y: b, width, height }, other)));
      if (clear < CLEAR) continue;
      const score = Math.round(clear);
      if (best === null || score > best.score) best = { score, point: [a, b] };
    }
  }
  return best && [px(best.point[0]), px(best.point[1])];
}
