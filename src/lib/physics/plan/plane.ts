/** The whole plane of a plan: the objective at every energy and distance, what forbids each point, and absorption's own best. */
import type { Edge } from "../edges.ts";
import type { ScatteringTables, TabulationKey } from "../scattering.ts";
import { type Beam, beamsOf } from "./beam.ts";
import { edgeNear } from "./grid.ts";
import {
  absorptionSignalM2,
  type Forbidden,
  forbiddenByLimits,
  forbiddenByPlace,
  forbiddenByUse,
  type Lane,
  laneMaker,
  needOf,
  objectiveOf,
  rankedSignalM2,
} from "./point.ts";
import type { PlanTask } from "./task.ts";

export interface Grid {
  /** Ascending. */
  readonly energiesEv: readonly number[];
  readonly distancesM: readonly number[];
  /** Edges around the energies. */
  readonly edges: readonly Edge[];
}

export interface Plane {
  readonly grid: Grid;
  readonly beams: readonly (Beam | null)[];
  readonly lanes: readonly Lane[];
  readonly nearEdges: readonly (Edge | null)[];
  /** Row by row, energy × distances: NaN where it cannot be computed. */
  readonly objective: Float64Array;
  /** The objective of absorption alone at the same points. */
  readonly absorption: Float64Array;
  readonly forbidden: readonly (Forbidden | null)[];
  /** Photons per m² of the whole measurement; NaN where there is none. */
  readonly fluencePerM2: Float64Array;
  /** Place of the least absorption objective that geometry, pixels and edges allow, or −1. */
  readonly absorptionBest: number;
}

export interface PlaneOptions {
  readonly tabulation?: TabulationKey;
  /** Called after each distance with the share done; false stops, and what is done stays. */
  readonly onProgress?: (share: number) => boolean;
}

/** True where the point may be taken: nothing forbids it and its objective is known. */
export const isAllowed = (plane: Plane, place: number): boolean =>
  plane.forbidden[place] === null && !Number.isNaN(plane.objective[place]!);

/** Every point of the grid. Cost: about a microsecond a point for one energy, ten for a band of energies. */
export function computePlane(
  task: PlanTask,
  grid: Grid,
  tables: ScatteringTables,
  { tabulation = task.tabulation, onProgress }: PlaneOptions = {},
): Plane {
  const { energiesEv, distancesM, edges } = grid;
  const beams = beamsOf(task, energiesEv, tables, tabulation);
  const nearEdges = energiesEv.map((energyEv) => edgeNear(edges, energyEv, task.setup.bandwidth));
  const laneAt = laneMaker(task);
  const width = distancesM.length;
  const count = energiesEv.length * width;
  const objective = new Float64Array(count).fill(Number.NaN);
  const absorption = new Float64Array(count).fill(Number.NaN);
  const fluencePerM2 = new Float64Array(count).fill(Number.NaN);
  const forbidden: (Forbidden | null)[] = new Array<Forbidden | null>(count).fill(null);
  const lanes: Lane[] = [];
  let absorptionBest = -1;
  for (let j = 0; j < width; j++) {
    const lane = laneAt(distancesM[j]!);
    lanes.push(lane);
    for (let i = 0; i < energiesEv.length; i++) {
      const place = i * width + j;
      const beam = beams[i] ?? null;
      const byPlace = forbiddenByPlace(lane, beam, nearEdges[i] !== null);
      if (beam === null) {
        forbidden[place] = byPlace;
        continue;
      }
      const need = needOf(task, lane, beam, rankedSignalM2(task, lane, beam));
      forbidden[place] = byPlace ?? forbiddenByUse(task, lane, beam) ?? forbiddenByLimits(task, beam, need);
      objective[place] = objectiveOf(task, beam, need) ?? Number.NaN;
      fluencePerM2[place] = need?.fluencePerM2 ?? Number.NaN;
      const alone = objectiveOf(task, beam, needOf(task, lane, beam, absorptionSignalM2(lane, beam)));
      if (alone === null) continue;
      absorption[place] = alone;
      if (byPlace === null && !(absorptionBest >= 0 && alone >= absorption[absorptionBest]!)) absorptionBest = place;
    }
    if (onProgress && !onProgress((j + 1) / width)) break;
  }
  return { grid, beams, lanes, nearEdges, objective, absorption, forbidden, fluencePerM2, absorptionBest };
}

/** Place of the least objective among allowed points, or −1. */
export function bestPlace(plane: Plane): number {
  let best = -1;
  for (let place = 0; place < plane.objective.length; place++) {
    if (!isAllowed(plane, place)) continue;
    if (best < 0 || plane.objective[place]! < plane.objective[best]!) best = place;
  }
  return best;
}
