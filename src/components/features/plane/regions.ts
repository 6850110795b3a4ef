/** Regions of whole cells: what is hatched, what has a value, and the borders between codes. */
import { type PlaneLayout, px } from "./layout.ts";
import type { Grid } from "./types.ts";

/** Cells of one code: energies i0 to i1, distances j0 to j1, ends included. */
export interface CellRun {
  readonly code: string;
  readonly i0: number;
  readonly i1: number;
  readonly j0: number;
  readonly j1: number;
}

/** Cells of equal code in runs over distance; equal runs of neighbouring energies become one. Null cells are left out. */
export function cellRuns(
  codes: Grid<string | null>,
  energies: readonly [number, number] = [0, codes.length - 1],
  distances: readonly [number, number] = [0, (codes[0]?.length ?? 0) - 1],
): CellRun[] {
  const done: CellRun[] = [];
  let open = new Map<string, CellRun>();
  for (let i = energies[0]; i <= energies[1]; i++) {
    const next = new Map<string, CellRun>();
    for (const run of runsOf(codes[i] ?? [], distances)) {
      const key = `${run.code} ${run.j0} ${run.j1}`;
      next.set(key, { ...run, i0: open.get(key)?.i0 ?? i, i1: i });
    }
    for (const [key, run] of open) if (!next.has(key)) done.push(run);
    open = next;
  }
  return [...done, ...open.values()];
}

function runsOf(column: readonly (string | null)[], [first, last]: readonly [number, number]) {
  const runs: { code: string; j0: number; j1: number }[] = [];
  for (let j = first; j <= last; j++) {
    const code = column[j] ?? null;
    const before = runs.at(-1);
    if (code === null) continue;
    if (before && before.code === code && before.j1 === j - 1) before.j1 = j;
    else runs.push({ code, j0: j, j1: j });
  }
  return runs;
}

/** Runs of a layout: no run crosses what is not joined, such as the gap between strips. */
export const layoutRuns = (codes: Grid<string | null>, { x, y }: PlaneLayout): CellRun[] =>
  x.groups.flatMap((columns) =>
    y.groups.flatMap((rows) => cellRuns(codes, [columns.first, columns.last], [rows.first, rows.last])),
  );

/** One path of all runs. */
export function runsPath(runs: readonly CellRun[], { x, y }: PlaneLayout): string {
  return runs
    .map(({ i0, i1, j0, j1 }) => {
      const [left, right, bottom, top] = [x.cells[i0]![0], x.cells[i1]![1], y.cells[j0]![0], y.cells[j1]![1]].map(px);
      return `M${left} ${bottom}H${right}V${top}H${left}Z`;
    })
    .join("");
}

/** Lines between neighbouring cells whose codes differ, in as few pieces as may be. */
export function borderPath(codes: Grid<string | null>, { x, y }: PlaneLayout): string {
  const [columns, rows] = [x.cells.length, y.cells.length];
  const code = (i: number, j: number): string | null => codes[i]?.[j] ?? null;
  const touch = (axis: PlaneLayout["x"], k: number): boolean =>
    Math.abs(axis.cells[k]![1] - axis.cells[k + 1]![0]) < 0.01;
  let path = "";
  for (let i = 0; i + 1 < columns; i++) {
    if (!touch(x, i)) continue;
    for (const [from, to] of stretches(rows, (j) => code(i, j) !== code(i + 1, j))) {
      path += `M${px(x.cells[i]![1])} ${px(y.cells[from]![0])}V${px(y.cells[to]![1])}`;
    }
  }
  for (let j = 0; j + 1 < rows; j++) {
    if (!touch(y, j)) continue;
    for (const [from, to] of stretches(columns, (i) => code(i, j) !== code(i, j + 1))) {
      path += `M${px(x.cells[from]![0])} ${px(y.cells[j]![1])}H${px(x.cells[to]![1])}`;
    }
  }
  return path;
}

/** First and last index of each stretch for which the test holds. */
function stretches(count: number, holds: (index: number) => boolean): [number, number][] {
  const found: [number, number][] = [];
  for (let index = 0; index < count; index++) {
    if (!holds(index)) continue;
    const before = found.at(-1);
    if (before && before[1] === index - 1) before[1] = index;
    else found.push([index, index]);
  }
  return found;
}
