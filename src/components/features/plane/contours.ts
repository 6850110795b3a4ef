/**
 * Lines and areas of equal value on a grid whose points stand anywhere in px. Between neighbours the value is taken as linear
 * in px (of its logarithm where all are positive); nothing is joined across an absorption edge or between strips.
 */
import { contours } from "d3-contour";
import { type AxisLayout, type PlaneLayout, px } from "./layout.ts";
import type { Grid } from "./types.ts";

export type Point = readonly [number, number];

/** A part of the grid that is interpolated as one: px of columns and rows, values row by row (-Infinity: none). */
export interface Patch {
  readonly xs: readonly number[];
  readonly ys: readonly number[];
  readonly values: readonly number[];
}

export interface Contour {
  /** Closed outlines of where the value is at or above the threshold; fill with the even-odd rule. */
  readonly rings: readonly (readonly Point[])[];
  /** Where the value is the threshold: the outlines without the patch's own border. */
  readonly lines: readonly (readonly Point[])[];
}

/** Finest detail kept in drawn lines, px. */
const TOLERANCE = 0.15;

/** Logarithms where every value is positive, the values themselves otherwise; thresholds take the same function. */
export function interpolation(values: Grid<number | null>): (value: number) => number {
  const positive = values.every((row) => row.every((value) => value === null || value > 0));
  return positive ? (value) => (value > 0 ? Math.log10(value) : -Infinity) : (value) => value;
}

/**
 * The grid in its patches. Points without a value take the mean of their neighbours, one step far: bands then reach the border
 * of the last cell with a value, where the drawing cuts them off.
 */
export function patchesOf(values: Grid<number | null>, layout: PlaneLayout, of: (value: number) => number): Patch[] {
  const known = values.map((row) => row.map((value) => (value === null ? null : of(value))));
  const at = (i: number, j: number): number => known[i]?.[j] ?? neighbours(known, i, j);
  return layout.x.groups.flatMap((columns) =>
    layout.y.groups.map((rows) => {
      const across = positions(layout.x, columns);
      const up = positions(layout.y, rows);
      return {
        xs: across.map(({ at: x }) => x),
        ys: up.map(({ at: y }) => y),
        values: up.flatMap(({ index: j }) => across.map(({ index: i }) => at(i, j))),
      };
    }),
  );
}

function neighbours(known: Grid<number | null>, i: number, j: number): number {
  let [sum, count] = [0, 0];
  for (const di of [-1, 0, 1]) {
    for (const dj of [-1, 0, 1]) {
      const value = known[i + di]?.[j + dj];
      if (value == null || !Number.isFinite(value)) continue;
      sum += value;
      count += 1;
    }
  }
  return count === 0 ? -Infinity : sum / count;
}

/** px of a group's points; its end values are carried on to where the group ends. */
function positions(axis: AxisLayout, group: AxisLayout["groups"][number]): { at: number; index: number }[] {
  const inner = axis.at.slice(group.first, group.last + 1).map((at, offset) => ({ at, index: group.first + offset }));
  const before = Math.abs(axis.at[group.first]! - group.from) > 0.01 ? [{ at: group.from, index: group.first }] : [];
  const after = Math.abs(axis.at[group.last]! - group.to) > 0.01 ? [{ at: group.to, index: group.last }] : [];
  return [...before, ...inner, ...after];
}

/** Where a patch is at or above a threshold. */
export function contourOf({ xs, ys, values }: Patch, threshold: number): Contour {
  const found = contours()
    .size([xs.length, ys.length])
    .contour([...values], threshold);
  const rings = found.coordinates.flatMap((polygon) =>
    polygon.map((ring) => ring.map(([x = 0, y = 0]): Point => [positionAt(xs, x), positionAt(ys, y)])),
  );
  const onBorder = ([x, y]: Point, [x2, y2]: Point): boolean =>
    [xs[0], xs.at(-1)].some((border) => near(x, border) && near(x2, border)) ||
    [ys[0], ys.at(-1)].some((border) => near(y, border) && near(y2, border));
  return { rings, lines: rings.flatMap((ring) => inside(ring, onBorder)) };
}

const near = (a: number, b: number | undefined): boolean => b !== undefined && Math.abs(a - b) < 1e-6;

/** d3-contour puts point k at k + ½ and its outline half a step outside; the half step is folded onto the border. */
function positionAt(places: readonly number[], coordinate: number): number {
  const last = places.length - 1;
  const step = Math.min(last, Math.max(0, coordinate - 0.5));
  const before = Math.min(Math.floor(step), Math.max(0, last - 1));
  const [from, to] = [places[before]!, places[before + 1] ?? places[before]!];
  return from + (step - before) * (to - from);
}

/** The parts of a closed ring that do not run along a border. */
function inside(ring: readonly Point[], onBorder: (a: Point, b: Point) => boolean): Point[][] {
  const lines: Point[][] = [];
  let line: Point[] = [];
  for (let index = 1; index < ring.length; index++) {
    const [from, to] = [ring[index - 1]!, ring[index]!];
    if (onBorder(from, to)) {
      if (line.length > 1) lines.push(line);
      line = [];
    } else {
      if (line.length === 0) line.push(from);
      line.push(to);
    }
  }
  if (line.length > 1) {
    // A ring that begins inside is cut there for no reason: its end is the beginning of its first line.
    const [first] = lines;
    const joined = first && samePoint(first[0]!, line.at(-1)!) ? [...line, ...first.slice(1)] : null;
    if (joined) lines[0] = joined;
    else lines.push(line);
  }
  return lines;
}

const samePoint = (a: Point, b: Point): boolean => a[0] === b[0] && a[1] === b[1];

/** SVG path of closed outlines. */
export const areaPath = (rings: readonly (readonly Point[])[]): string =>
  rings.map((ring) => `${linePath([ring])}Z`).join("");

/** SVG path of open lines. */
export const linePath = (lines: readonly (readonly Point[])[]): string =>
  lines
    .map(
      (line) =>
        `M${simplified(line)
          .map(([x, y]) => `${px(x)} ${px(y)}`)
          .join("L")}`,
    )
    .join("");

/** Douglas and Peucker: points nearer than the tolerance to the line without them are dropped. */
export function simplified(line: readonly Point[], tolerance = TOLERANCE): Point[] {
  const keep = new Set([0, line.length - 1]);
  const open: [number, number][] = [[0, line.length - 1]];
  for (let part = open.pop(); part; part = open.pop()) {
    const [first, last] = part;
    let [farthest, distance] = [-1, tolerance];
    for (let index = first + 1; index < last; index++) {
      const off = distanceTo(line[index]!, line[first]!, line[last]!);
      if (off > distance) [farthest, distance] = [index, off];
    }
    if (farthest < 0) continue;
    keep.add(farthest);
    open.push([first, farthest], [farthest, last]);
  }
  return line.filter((_, index) => keep.has(index));
}

function distanceTo([x, y]: Point, [x1, y1]: Point, [x2, y2]: Point): number {
  const [dx, dy] = [x2 - x1, y2 - y1];
  const length = Math.hypot(dx, dy);
  return length < 1e-9 ? Math.hypot(x - x1, y - y1) : Math.abs((x - x1) * dy - (y - y1) * dx) / length;
}
