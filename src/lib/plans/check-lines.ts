/** What was checked of a pick, each with its figure and threshold: holds, check, or fails. */
import { type Check, FWHM_PER_SIGMA, type PlanPick, type PlanTask } from "#src/lib/physics/index.ts";
import { energyText, lengthText, percentText, rounded } from "#src/lib/format/plan-quantities.ts";
import { warningText } from "./warning-words.ts";

export interface CheckLine {
  readonly state: "holds" | "check" | "fails";
  readonly about: string;
  readonly text: string;
}

/** Warnings that forbid a pick of the use fail; the others ask to be checked. */
const FORBIDDING = new Set(["insideSample", "undersampled", "contrastReversal", "nearFieldLeft", "nearEdge"]);

/** @param bestObjective of the shortlist: a pick far from it is not what the other tables are asked about */
export function checkLines(
  pick: PlanPick,
  task: PlanTask,
  names: { feature: string; host: string },
  bestObjective: number | null,
): CheckLine[] {
  const lines = pick.figures.checks.map((check): CheckLine => {
    if (check.holds) return { state: "holds", about: check.code, text: holdsText(check, task) };
    const forbids = FORBIDDING.has(check.code) && pick.figures.technique === "phase";
    return { state: forbids ? "fails" : "check", about: check.code, text: warningText(check, names) };
  });
  const tables: CheckLine[] =
    pick.agreesInAllTables === null || (!pick.agreesInAllTables && isFar(pick, bestObjective))
      ? []
      : pick.agreesInAllTables
        ? [
            {
              state: "holds",
              about: "tables",
              text: "Every table that covers this energy finds the same technique ahead, and this pick within 20 % of its best.",
            },
          ]
        : [
            {
              state: "check",
              about: "tables",
              text: "Not every table finds this pick within 20 % of its best with the same technique ahead. Compare the tables at this energy.",
            },
          ];
  const sensitivity = pick.densitySensitivity;
  const density: CheckLine[] =
    sensitivity === null
      ? []
      : [
          {
            state: sensitivity > 0.5 ? "check" : "holds",
            about: "density",
            text: `One stated uncertainty of the densities changes the dose needed by ${percentText(sensitivity)}.`,
          },
        ];
  const all = [...lines.filter(({ text }) => text !== ""), ...tables, ...density];
  const order = { fails: 0, check: 1, holds: 2 };
  return all.sort((a, b) => order[a.state] - order[b.state]);
}

/** Needs more than 20 % over the best of its own table, and so of every other. */
const isFar = ({ figures: { objective } }: PlanPick, best: number | null): boolean =>
  objective !== null && best !== null && objective > 1.2 * best;

function holdsText({ code, value, limit }: Check, task: PlanTask): string {
  switch (code) {
    case "undersampled":
      return `Sampling: pixels of ${lengthText(value)} in the sample, at most ${lengthText(limit)} allowed.`;
    case "contrastReversal":
      return `No contrast turns over: phase ${rounded(value)} rad at the resolution, first zero at ${rounded(limit)}.`;
    case "nearFieldLeft":
      return `Near field: measure ${rounded(value)}, ${limit} or less needed.`;
    case "linearTheoryLeft":
      return `Linear theory: largest contrast ${percentText(value)}, ${percentText(limit)} or less needed.`;
    case "refractionShift":
      return `Refraction moves edges by ${lengthText(value)}, the blur is ${lengthText(limit)}.`;
    case "thickSample":
      return `Thin sample: waves spread by ${lengthText(value)} within the host, half the resolution is ${lengthText(limit)}.`;
    case "nearlyMatched":
      return `The stated densities move the phase contrast by ${percentText(value)}, ${percentText(limit)} or less asked.`;
    case "transmissionLow":
      return `The sample lets ${percentText(value)} through, ${percentText(limit)} or more asked.`;
    case "sourceBlur":
      return `The source blurs by ${lengthText(value * FWHM_PER_SIGMA)}, the detector by ${lengthText(limit * FWHM_PER_SIGMA)}.`;
    case "belowOneKeV":
      return "";
    case "countFloor":
      return task.minimumCounts > 0
        ? `More than ${rounded(limit)} counts in a pixel: visibility decides the exposure.`
        : "";
    case "fewCountsPerProjection":
      return `${rounded(value)} counts in a pixel of one projection, ${limit} or more asked.`;
    case "phaseWrap":
      return `The feature shifts the phase by ${rounded(value)} rad, less than half a turn.`;
    case "nearEdge":
      return energyText(value);
    case "insideSample":
    case "transmissionHigh":
    case "opposedPair":
      return "";
  }
}
