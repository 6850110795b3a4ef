/** Which points of a plane are listed, and why: candidates at least 15 % apart in energy or distance. */
import { isAllowed, type Plane } from "./plane.ts";
import type { Objective } from "./task.ts";

export type Why =
  "leastDose" | "leastFluence" | "shortestTime" | "shortestDistance" | "mostTransmitted" | "besideEdge" | "nextBest";

export interface Chosen {
  readonly place: number;
  readonly why: readonly Why[];
}

export const MOST_CANDIDATES = 12;
/** Candidates for a reason of their own need at most so many times the best's objective. */
const WITHIN = 3;
/** Nearer than this in both energy and distance, two points are one choice. */
const APART = 1.15;

export const LEAST_OF: Readonly<Record<Objective, Why>> = {
  dose: "leastDose",
  fluence: "leastFluence",
  time: "shortestTime",
};

/** At most twelve allowed points: the best, the best for single reasons, then the best remaining; in order of the objective. */
export function chooseCandidates(plane: Plane, objective: Objective): Chosen[] {
  const order = allowedByObjective(plane);
  const best = order[0];
  if (best === undefined) return [];
  const taken: { place: number; why: Why[] }[] = [];
  const take = (place: number, why: Why): void => {
    const near = taken.find((other) => isNear(plane, other.place, place));
    if (near) {
      if (why !== "nextBest" && !near.why.includes(why)) near.why.push(why);
    } else if (taken.length < MOST_CANDIDATES) taken.push({ place, why: [why] });
  };
  take(best, LEAST_OF[objective]);
  const within = order.filter((place) => plane.objective[place]! <= WITHIN * plane.objective[best]!);
  const width = plane.grid.distancesM.length;
  const beamOf = (place: number) => plane.beams[Math.floor(place / width)];
  const least = (rank: (place: number) => number): number =>
    within.reduce((found, place) => (rank(place) < rank(found) ? place : found), within[0]!);
  const timeOf = (place: number): number => {
    const flux = beamOf(place)?.fluxPerSM2;
    return flux ? plane.fluencePerM2[place]! / flux : Infinity;
  };
  if (objective !== "time" && within.some((place) => timeOf(place) < Infinity)) take(least(timeOf), "shortestTime");
  take(
    least((place) => plane.grid.distancesM[place % width]!),
    "shortestDistance",
  );
  take(
    least((place) => -(beamOf(place)?.transmission ?? 0)),
    "mostTransmitted",
  );
  for (const place of bestBetweenEdges(plane, within)) take(place, "besideEdge");
  for (const place of order) {
    if (taken.length >= MOST_CANDIDATES) break;
    take(place, "nextBest");
  }
  return taken.sort((a, b) => plane.objective[a.place]! - plane.objective[b.place]!);
}

function allowedByObjective(plane: Plane): number[] {
  const places: number[] = [];
  for (let place = 0; place < plane.objective.length; place++) if (isAllowed(plane, place)) places.push(place);
  // Equal objectives keep the order of the grid: lower energy, shorter distance first.
  return places.sort((a, b) => plane.objective[a]! - plane.objective[b]! || a - b);
}

function isNear({ grid }: Plane, first: number, second: number): boolean {
  const width = grid.distancesM.length;
  const close = (a: number, b: number): boolean =>
    a === b || (Math.min(a, b) > 0 && Math.max(a, b) / Math.min(a, b) <= APART);
  return (
    close(grid.energiesEv[Math.floor(first / width)]!, grid.energiesEv[Math.floor(second / width)]!) &&
    close(grid.distancesM[first % width]!, grid.distancesM[second % width]!)
  );
}

/** The best point of each stretch between edges that lie inside the range; none where there is no edge. */
function bestBetweenEdges({ grid }: Plane, within: readonly number[]): number[] {
  const { energiesEv, distancesM, edges } = grid;
  const inside = edges.filter(({ energyEv }) => energyEv > energiesEv[0]! && energyEv < energiesEv.at(-1)!);
  if (inside.length === 0) return [];
  const best = new Map<number, number>();
  for (const place of within) {
    const energyEv = energiesEv[Math.floor(place / distancesM.length)]!;
    const stretch = inside.findIndex((edge) => energyEv < edge.energyEv);
    // `within` is in order of the objective: the first of a stretch is its best.
    if (!best.has(stretch)) best.set(stretch, place);
  }
  return [...best.values()];
}

export interface Plateau {
  readonly energyEv: readonly [number, number];
  readonly distanceM: readonly [number, number];
}

/** Along each axis through the point, the unbroken run of allowed points within 1.2 × its own objective (PHYSICS 6). */
export function plateauOf(plane: Plane, place: number): Plateau {
  const { energiesEv, distancesM } = plane.grid;
  const width = distancesM.length;
  const [row, column] = [Math.floor(place / width), place % width];
  const most = PLATEAU * plane.objective[place]!;
  const run = (count: number, start: number, placeAt: (index: number) => number): [number, number] => {
    const good = (index: number): boolean =>
      index >= 0 && index < count && isAllowed(plane, placeAt(index)) && plane.objective[placeAt(index)]! <= most;
    let [low, high] = [start, start];
    while (good(low - 1)) low--;
    while (good(high + 1)) high++;
    return [low, high];
  };
  const energies = run(energiesEv.length, row, (index) => index * width + column);
  const distances = run(width, column, (index) => row * width + index);
  return {
    energyEv: [energiesEv[energies[0]]!, energiesEv[energies[1]]!],
    distanceM: [distancesM[distances[0]]!, distancesM[distances[1]]!],
  };
}
const PLATEAU = 1.2;
