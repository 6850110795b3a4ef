/** How sure a candidate is: its dose under the stated uncertainties of the densities, and what the other tabulations say. */
import type { ScatteringTables, TabulationKey } from "../scattering.ts";
import { beamsOf } from "./beam.ts";
import { bestPlace, type Plane } from "./plane.ts";
import { absorptionSignalM2, doseGy, type Lane, needOf, objectiveOf, rankedSignalM2 } from "./point.ts";
import type { Technique } from "./figures.ts";
import type { PlanTask, StatedDensity } from "./task.ts";

/** No density is taken lower than this share of the stated one, however uncertain. */
const LOWEST_DENSITY = 1e-3;

/**
 * Relative change of the required dose for one stated uncertainty of the densities: the larger change of + and − for feature and
 * for host, in quadrature. Null where no dose is known, or where the contrast vanishes within the uncertainty.
 */
export function densitySensitivity(
  task: PlanTask,
  lane: Lane,
  energyEv: number,
  technique: Technique,
  tables: ScatteringTables,
  tabulation: TabulationKey,
): number | null {
  const needed = (changed: PlanTask): number | null => {
    const beam = beamsOf(changed, [energyEv], tables, tabulation)[0];
    if (!beam) return null;
    const signal = technique === "absorption" ? absorptionSignalM2(lane, beam) : rankedSignalM2(changed, lane, beam);
    const need = needOf(changed, lane, beam, signal);
    return need && (doseGy(changed, beam, need.fluencePerM2) ?? need.fluencePerM2);
  };
  const stated = needed(task);
  if (stated === null) return null;
  const changeOf = (which: "feature" | "host"): number | null => {
    const changes = [1, -1].map((sign) => needed(withDensityChange(task, which, sign)));
    if (changes.some((change) => change === null)) return null;
    return Math.max(...changes.map((change) => Math.abs((change as number) / stated - 1)));
  };
  const [feature, host] = [changeOf("feature"), changeOf("host")];
  if (feature === null || host === null) return null;
  const both = Math.hypot(feature, host);
  return Number.isFinite(both) ? both : null;
}

function withDensityChange(task: PlanTask, which: "feature" | "host", sign: number): PlanTask {
  const changed = ({ material, densityUncertainty }: StatedDensity): StatedDensity => ({
    densityUncertainty,
    material: {
      ...material,
      densityKgPerM3: material.densityKgPerM3 * Math.max(LOWEST_DENSITY, 1 + sign * densityUncertainty),
    },
  });
  return { ...task, sample: { ...task.sample, [which]: changed(task.sample[which]) } };
}

/** What one tabulation finds best. */
export interface TabulationVerdict {
  readonly tabulation: TabulationKey;
  /** Objective of the best allowed point, and of absorption's best; null where it finds none. */
  readonly best: number | null;
  readonly absorptionBest: number | null;
}

/** What a plane computed with one tabulation finds best. */
export function verdictOfPlane(tabulation: TabulationKey, plane: Plane): TabulationVerdict {
  const best = bestPlace(plane);
  return {
    tabulation,
    best: best < 0 ? null : plane.objective[best]!,
    absorptionBest: plane.absorptionBest < 0 ? null : plane.absorption[plane.absorptionBest]!,
  };
}

/** A tabulation agrees where the objective there is at most so many times its best. */
const AGREES_WITHIN = 1.2;

/**
 * True where in each tabulation that covers the energy the same technique wins and the point needs at most 20 % more than that
 * tabulation's best; null where only one covers it.
 */
export function agreesInAllTables(
  task: PlanTask,
  lane: Lane,
  energyEv: number,
  technique: Technique,
  tables: ScatteringTables,
  verdicts: readonly TabulationVerdict[],
): boolean | null {
  const own = verdicts.find(({ tabulation }) => tabulation === task.tabulation);
  const covering = verdicts.flatMap((verdict) => {
    const beam = beamsOf(task, [energyEv], tables, verdict.tabulation)[0];
    return beam ? [{ verdict, beam }] : [];
  });
  if (!own || covering.length < 2) return null;
  return covering.every(({ verdict, beam }) => {
    const signal = technique === "absorption" ? absorptionSignalM2(lane, beam) : rankedSignalM2(task, lane, beam);
    const needed = objectiveOf(task, beam, needOf(task, lane, beam, signal));
    const best = technique === "absorption" ? verdict.absorptionBest : verdict.best;
    return needed !== null && best !== null && needed <= AGREES_WITHIN * best && winner(verdict) === winner(own);
  });
}

function winner({ best, absorptionBest }: TabulationVerdict): Technique | null {
  if (best === null || absorptionBest === null) return best === null ? null : "phase";
  return best <= absorptionBest ? "phase" : "absorption";
}
