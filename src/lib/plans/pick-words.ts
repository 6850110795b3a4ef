/** Words of a pick: where it stands, why it is on the list, what it needs. */
import { distanceText, doseText, energyText, fluenceText, timeText } from "#src/lib/format/plan-quantities.ts";
import type { WhyCode } from "#src/lib/schemas/plan-answer.ts";
import type { Objective } from "./question.ts";
import type { PickView, PlanResult } from "./view.ts";

export const WHY_WORDS: Readonly<Record<WhyCode, string>> = {
  leastDose: "least dose",
  leastFluence: "fewest photons",
  shortestTime: "fastest",
  shortestDistance: "shortest distance",
  mostTransmitted: "most let through",
  besideEdge: "beside an edge",
  nextBest: "next best",
};

/** "20 keV, 0.3 m". */
export const pickPlace = ({ candidate, inContact }: PickView): string =>
  `${energyText(candidate.energyKeV)}, ${inContact ? "in contact" : distanceText(candidate.distanceM)}`;

/** A free pick has no reason of the list; absorption's best says so. */
export function pickWhy(pick: PickView, absorptionId: string | null): string {
  if (pick.id === absorptionId) return "best by absorption";
  const words = pick.candidate.why.map((code) => WHY_WORDS[code]);
  return words.length > 0 ? words.join(", ") : "picked from the plane";
}

/** The objective's value in words. */
export function needText(objective: Objective, value: number | null): string {
  if (value === null) return "no value";
  if (objective === "dose") return doseText(value);
  return objective === "time" ? timeText(value) : fluenceText(value);
}

export const OBJECTIVE_NAMES: Readonly<Record<Objective, string>> = {
  dose: "Dose needed",
  time: "Time needed",
  fluence: "Fluence needed",
};

/** The answer as one sentence with its source, for copies. */
export function copiedSentence(result: PlanResult): string {
  const { feature, host } = result.beam;
  return `${feature.label} in ${host.label}: ${result.sentences.whole} ${result.citation}.`;
}
