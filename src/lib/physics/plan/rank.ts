/** Ranking of a plan: the plane, its shortlist, absorption's own best, and the verdict between them. */
import { type ScatteringTables, TABULATION_KEYS } from "../scattering.ts";
import { beamsOf } from "./beam.ts";
import { pointFigures, type PointFigures, type Technique } from "./figures.ts";
import { edgeNear, planEdges } from "./grid.ts";
import { computePlane, type Grid, type Plane, type PlaneOptions } from "./plane.ts";
import { laneMaker } from "./point.ts";
import { agreesInAllTables, densitySensitivity, verdictOfPlane } from "./robustness.ts";
import { chooseCandidates, LEAST_OF, type Plateau, plateauOf, type Why } from "./select.ts";
import { countsFeatureDose, type PlanTask } from "./task.ts";

/** A listed point. */
export interface PlanPick {
  readonly figures: PointFigures;
  readonly why: readonly Why[];
  readonly densitySensitivity: number | null;
  readonly agreesInAllTables: boolean | null;
  readonly plateau: Plateau | null;
}

export type Choice = "phase" | "absorption" | "either" | "none";

export interface RankedPlan {
  readonly task: PlanTask;
  readonly plane: Plane;
  /** At most twelve, by the objective. */
  readonly candidates: readonly PlanPick[];
  readonly absorptionBest: PlanPick | null;
  readonly choice: Choice;
  /** Entrance dose (the feature's in gas) of absorption's best over the first candidate's; null without both. */
  readonly doseAdvantage: number | null;
  /** The same ratio of the request's objective. */
  readonly objectiveAdvantage: number | null;
}

/** Within this ratio of the objectives neither technique is ahead. */
export const EITHER_BETWEEN = [0.8, 1.25] as const;

/** One point, for the stated use, also where the use or a limit forbids it. Null where a material has no values there. */
export function evaluatePoint(
  task: PlanTask,
  energyEv: number,
  distanceM: number,
  tables: ScatteringTables,
): PlanPick | null {
  const technique: Technique = task.use === "absorption" ? "absorption" : "phase";
  const beam = beamsOf(task, [energyEv], tables, task.tabulation)[0];
  if (!beam) return null;
  const lane = laneMaker(task)(distanceM);
  const edges = planEdges(task, tables, [energyEv / 2, energyEv * 2]);
  return {
    figures: pointFigures(task, lane, beam, edgeNear(edges, energyEv, task.setup.bandwidth), technique),
    why: [],
    densitySensitivity: densitySensitivity(task, lane, energyEv, technique, tables, task.tabulation),
    agreesInAllTables: null,
    plateau: null,
  };
}

/** Ranks the whole grid. Stopping by `onProgress` keeps what is done. */
export function rankPlan(task: PlanTask, grid: Grid, tables: ScatteringTables, options: PlaneOptions = {}): RankedPlan {
  // One plane for each tabulation: the task's own first, then the others for their verdicts.
  const planes = TABULATION_KEYS.length;
  const partOf = (index: number): PlaneOptions => {
    const { onProgress } = options;
    return onProgress ? { onProgress: (share) => onProgress((index + share) / planes) } : {};
  };
  const plane = computePlane(task, grid, tables, partOf(0));
  const others = TABULATION_KEYS.filter((tabulation) => tabulation !== task.tabulation);
  const verdicts = [
    verdictOfPlane(task.tabulation, plane),
    ...others.map((tabulation, index) =>
      verdictOfPlane(tabulation, computePlane(task, grid, tables, { ...partOf(index + 1), tabulation })),
    ),
  ];
  const pickAt = (place: number, technique: Technique, why: readonly Why[], ranked: boolean): PlanPick => {
    const row = Math.floor(place / grid.distancesM.length);
    const lane = plane.lanes[place % grid.distancesM.length]!;
    const beam = plane.beams[row]!;
    return {
      figures: pointFigures(task, lane, beam, plane.nearEdges[row]!, technique),
      why,
      densitySensitivity: densitySensitivity(task, lane, beam.energyEv, technique, tables, task.tabulation),
      agreesInAllTables: agreesInAllTables(task, lane, beam.energyEv, technique, tables, verdicts),
      plateau: ranked ? plateauOf(plane, place) : null,
    };
  };
  const technique: Technique = task.use === "absorption" ? "absorption" : "phase";
  const candidates = chooseCandidates(plane, task.objective).map(({ place, why }) =>
    pickAt(place, technique, why, true),
  );
  const absorptionBest =
    plane.absorptionBest < 0 ? null : pickAt(plane.absorptionBest, "absorption", [LEAST_OF[task.objective]], false);
  return { task, plane, candidates, absorptionBest, ...verdictOf(task, candidates[0] ?? null, absorptionBest) };
}

/** The dose that limits and verdict speak of: the host's at its entrance, the feature's own in gas or vacuum. */
export const countedDoseGy = (task: PlanTask, { figures }: PlanPick): number | null =>
  countsFeatureDose(task.sample) ? figures.featureDoseGy : figures.entranceDoseGy;

function verdictOf(
  task: PlanTask,
  first: PlanPick | null,
  absorption: PlanPick | null,
): Omit<RankedPlan, "task" | "plane" | "candidates" | "absorptionBest"> {
  if (!first) return { choice: "none", doseAdvantage: null, objectiveAdvantage: null };
  if (task.use === "absorption") return { choice: "absorption", doseAdvantage: null, objectiveAdvantage: null };
  const ratio = (above: number | null, below: number | null): number | null =>
    above === null || below === null || !(below > 0) ? null : above / below;
  const objectiveAdvantage = ratio(absorption?.figures.objective ?? null, first.figures.objective);
  const doseAdvantage = absorption && ratio(countedDoseGy(task, absorption), countedDoseGy(task, first));
  const choice: Choice =
    objectiveAdvantage === null || objectiveAdvantage > EITHER_BETWEEN[1]
      ? "phase"
      : objectiveAdvantage < EITHER_BETWEEN[0]
        ? "absorption"
        : "either";
  return { choice, doseAdvantage, objectiveAdvantage };
}
