/** Moving over the grid by keys and by pointer. */
import type { PlaneLayout } from "./layout.ts";
import type { GridPoint } from "./types.ts";

const STEPS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};

/** Where a key leads: arrows one step, with Shift ten; Home and End the row's ends. Null for any other key. */
export function stepBy(
  key: string,
  shift: boolean,
  { i, j }: GridPoint,
  size: readonly [number, number],
): GridPoint | null {
  if (key === "Home") return { i: 0, j };
  if (key === "End") return { i: size[0] - 1, j };
  const step = Object.hasOwn(STEPS, key) ? STEPS[key] : undefined;
  if (!step) return null;
  const by = shift ? 10 : 1;
  const within = (value: number, count: number): number => Math.max(0, Math.min(count - 1, value));
  return { i: within(i + step[0] * by, size[0]), j: within(j + step[1] * by, size[1]) };
}

/** Index of the nearest of the places. */
export function nearestIndex(places: readonly number[], at: number): number {
  let best = 0;
  places.forEach((place, index) => {
    if (Math.abs(place - at) < Math.abs(places[best]! - at)) best = index;
  });
  return best;
}

/** The grid point nearest to a place of the drawing. */
export const pointAt = ({ x, y }: PlaneLayout, left: number, top: number): GridPoint => ({
  i: nearestIndex(x.at, left),
  j: nearestIndex(y.at, top),
});
