/** The verdict of a plan as a sentence built from its numbers, and nothing else. */
import { FORBIDDEN_REASONS } from "./forbidden-words.ts";
import type { ForbiddenCode } from "#src/lib/schemas/plan-answer.ts";
import {
  countedDoseGy,
  type Choice,
  EITHER_BETWEEN,
  type PlanPick,
  type PlanTask,
  type RankedPlan,
} from "#src/lib/physics/index.ts";
import {
  distanceText,
  doseText,
  energyText,
  fluenceText,
  ratioText,
  timeText,
} from "#src/lib/format/plan-quantities.ts";

type Objective = PlanTask["objective"];

export const OBJECTIVE_WORDS: Readonly<Record<Objective, string>> = { dose: "dose", time: "time", fluence: "fluence" };

/** Objective in words: "0.31 Gy", "1.4 s", "41 per µm²". */
export function objectiveText(objective: Objective, value: number): string {
  if (objective === "dose") return doseText(value);
  return objective === "time" ? timeText(value) : fluenceText(value * 1e-12);
}

/** "20 keV, 0.3 m" or, at the shortest allowed distance, "20 keV, in contact". */
export function placeText(pick: PlanPick, contactM: number | null): string {
  const { energyEv, geometry } = pick.figures;
  const distance =
    contactM !== null && geometry.distanceM <= contactM * (1 + 1e-9) ? "in contact" : distanceText(geometry.distanceM);
  return `${energyText(energyEv / 1000)}, ${distance}`;
}

/** Shortest distance of the plane outside the sample, where it is close enough that no propagation is meant; else null. */
export function contactDistanceM(ranked: RankedPlan): number | null {
  const { plane } = ranked;
  const shortest = plane.lanes.find((lane) => !lane.insideSample);
  // In a cone beam magnification counts at any distance: "contact" means a parallel beam, and no blur by the source.
  return shortest && shortest.geometry.magnification < 1.01 ? shortest.geometry.distanceM : null;
}

/** One headline: what to use, where. */
export function headline(ranked: RankedPlan): string {
  const { choice, candidates, absorptionBest, task } = ranked;
  const [first] = candidates;
  const contact = contactDistanceM(ranked);
  if (choice === "none" || !first) return noneHeadline(task);
  if (choice === "absorption") {
    const best = task.use === "absorption" ? first : absorptionBest;
    return best ? `Use absorption at ${placeText(best, contact)}.` : noneHeadline(task);
  }
  if (choice === "either") {
    if (Math.abs((ranked.objectiveAdvantage ?? 1) - 1) < 0.005)
      return `Either works: phase and absorption need the same ${OBJECTIVE_WORDS[task.objective]}.`;
    return `Either works: phase needs ${ratioText(1 / (ranked.objectiveAdvantage ?? 1))}\u00a0× the ${OBJECTIVE_WORDS[task.objective]} of absorption.`;
  }
  return `Use phase contrast at ${placeText(first, contact)}.`;
}

function noneHeadline({ limits }: PlanTask): string {
  const stated = [
    ...(limits.doseGy === null ? [] : [doseText(limits.doseGy)]),
    ...(limits.timeS === null ? [] : [timeText(limits.timeS)]),
  ];
  return stated.length > 0 ? `No choice stays within ${stated.join(" and ")}.` : "No point of the plane is allowed.";
}

/** The whole verdict: headline, what it needs, what the other technique needs, and where dose and objective disagree. */
export function verdictSummary(ranked: RankedPlan): string {
  const { task, candidates, absorptionBest, choice, doseAdvantage, objectiveAdvantage } = ranked;
  const [first] = candidates;
  const sentences = [headline(ranked)];
  const contact = contactDistanceM(ranked);
  if (first)
    sentences.push(
      needSentence(
        task,
        first,
        choice === "absorption" && task.use !== "absorption" ? "Phase at its best" : null,
        contact,
      ),
    );
  if (first && absorptionBest && task.use !== "absorption")
    sentences.push(absorptionSentence(ranked, absorptionBest, contact));
  if (
    task.objective !== "dose" &&
    doseAdvantage !== null &&
    objectiveAdvantage !== null &&
    disagrees(doseAdvantage, objectiveAdvantage)
  ) {
    sentences.push(
      `By ${OBJECTIVE_WORDS[task.objective]} ${winnerText(objectiveAdvantage)}, by dose ${winnerText(doseAdvantage)}: absorption’s best needs ${ratioText(doseAdvantage)}\u00a0× the dose.`,
    );
  }
  return sentences.join(" ");
}

function needSentence(task: PlanTask, pick: PlanPick, who: string | null, contact: number | null): string {
  const dose = countedDoseGy(task, pick);
  const { fluencePerM2, timeS } = pick.figures;
  const amount = dose === null ? (fluencePerM2 === null ? null : fluenceText(fluencePerM2 * 1e-12)) : doseText(dose);
  const needs = `${amount ?? "an unknown dose"}${timeS === null ? "" : ` in ${timeText(timeS)}`}`;
  const whole = task.use === "tomography" ? " for all projections" : "";
  return who === null ? `It needs ${needs}${whole}.` : `${who}, ${placeText(pick, contact)}, needs ${needs}${whole}.`;
}

function absorptionSentence(ranked: RankedPlan, best: PlanPick, contact: number | null): string {
  const { task, doseAdvantage, choice } = ranked;
  const dose = countedDoseGy(task, best);
  const who = choice === "absorption" ? "Absorption" : `Absorption at its best, ${placeText(best, contact)},`;
  const amount = dose === null ? "an unknown dose" : doseText(dose);
  const ratio =
    doseAdvantage === null || Math.abs(doseAdvantage - 1) < 0.005
      ? ""
      : `, ${ratioText(doseAdvantage)}\u00a0× the dose of phase`;
  const allowed = best.figures.forbiddenBy === null ? "" : ", beyond a limit";
  return `${who} needs ${amount}${ratio}${allowed}.`;
}

const sideOf = (advantage: number): Choice =>
  advantage > EITHER_BETWEEN[1] ? "phase" : advantage < EITHER_BETWEEN[0] ? "absorption" : "either";
const disagrees = (dose: number, objective: number): boolean => sideOf(dose) !== sideOf(objective);
const winnerText = (advantage: number): string =>
  ({ phase: "phase is ahead", absorption: "absorption is ahead", either: "neither is ahead", none: "" })[
    sideOf(advantage)
  ];

/** The answer in parts, as the page sets them. */
export interface AnswerSentences {
  readonly headline: string;
  /** What the first pick needs, what the other technique needs, where dose and objective disagree. */
  readonly lead: readonly string[];
  readonly reason: string | null;
  readonly whole: string;
}

export function answerSentences(ranked: RankedPlan): AnswerSentences {
  const whole = verdictSummary(ranked);
  const head = headline(ranked);
  const rest = whole.slice(head.length).trim();
  return { headline: head, lead: rest === "" ? [] : [rest], reason: reasonOf(ranked), whole };
}

/** Why the objective is not met anywhere: the commonest reason on the plane. */
function reasonOf({ candidates, plane }: RankedPlan): string | null {
  if (candidates.length > 0) return null;
  const counts = new Map<ForbiddenCode, number>();
  for (const code of plane.forbidden) if (code !== null) counts.set(code, (counts.get(code) ?? 0) + 1);
  const [most] = [...counts].sort((a, b) => b[1] - a[1]);
  if (!most) return "The two materials show no contrast here.";
  return `${FORBIDDEN_REASONS[most[0]].note} at ${most[1]} of ${plane.forbidden.length} points.`;
}
