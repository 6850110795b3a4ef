/** Why phase needs less dose, or more: steps whose factors multiply to the ratio of the doses. */
import { Mark } from "#src/components/ui/Mark.tsx";
import { doseText, energyText, lengthText, percentText, ratioText, rounded } from "#src/lib/format/plan-quantities.ts";
import { METHOD_PATH } from "#src/lib/format/method-links.ts";
import type { PlanResult } from "#src/lib/plans/view.ts";
import { FactorBar } from "./FactorBar.tsx";

interface Step {
  readonly name: string;
  readonly phase: string;
  readonly absorption: string;
  /** Times less dose with phase; null for what the rest builds on. */
  readonly factor: number | null;
  readonly words: string;
  readonly formula: string;
  readonly anchor: string;
}

export function WorkingSection({ result, stale }: { result: PlanResult | null; stale: boolean }) {
  if (!result?.working) return null;
  const { working, picks, absorptionId } = result;
  const alone = picks.find(({ id }) => id === absorptionId);
  const steps = stepsOf(result);
  // log₁₀ of the product before each step; the last is that of all.
  const logs = steps.reduce((before, { factor }) => [...before, before.at(-1)! + Math.log10(factor ?? 1)], [0]);
  const [low, high] = [Math.min(...logs), Math.max(...logs)];
  return (
    <section className="sec" aria-labelledby="working-heading">
      <div className="sec-head">
        <h2 id="working-heading">Working</h2>
        <small>{working.ratio >= 1 ? "Why phase wins, step by step" : "Why phase does not win, step by step"}</small>
      </div>
      <div className={stale ? "sec-body chart-stale" : "sec-body"}>
        <table className="list list-flow working">
          <thead>
            <tr>
              <th scope="col">Step</th>
              <th scope="col">
                <Mark technique="phase">Phase, pick 1</Mark>
              </th>
              <th scope="col">
                <Mark technique="absorption">{`Absorption${alone ? `, pick ${alone.id}` : ""}`}</Mark>
              </th>
              <th scope="col">Effect on dose, running</th>
            </tr>
          </thead>
          <tbody>
            {steps.map((step, index) => (
              <tr key={step.name}>
                <th scope="row">
                  {step.name}
                  <details className="step-more">
                    <summary>How</summary>
                    <p className="note">
                      {step.formula} <a href={`${METHOD_PATH}#${step.anchor}`}>Method</a>
                    </p>
                  </details>
                </th>
                <td data-label="Phase">{step.phase}</td>
                <td data-label="Absorption">{step.absorption}</td>
                <td className="text">
                  {step.factor === null ? (
                    <small>{step.words}</small>
                  ) : (
                    <>
                      <FactorBar from={logs[index]!} by={Math.log10(step.factor)} low={low} high={high} />
                      <small>{`${step.words}: ${effect(step.factor)}`}</small>
                    </>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr className="sum">
              <th scope="row">Together</th>
              <td data-label="Phase">{doseText(working.phase.doseGy)}</td>
              <td data-label="Absorption">{doseText(working.absorption.doseGy)}</td>
              <td>{`${effect(working.ratio)} dose with phase`}</td>
            </tr>
          </tfoot>
        </table>
      </div>
    </section>
  );
}

const effect = (factor: number): string =>
  Math.abs(factor - 1) < 0.005
    ? "as much"
    : factor >= 1
      ? `${ratioText(factor)}\u00a0× less`
      : `${ratioText(1 / factor)}\u00a0× more`;

function stepsOf({ working, use, picks, absorptionId }: PlanResult): Step[] {
  if (!working) return [];
  const { phase, absorption, factors } = working;
  const energies = [picks[0], picks.find(({ id }) => id === absorptionId)].map((pick) =>
    pick ? ` at ${energyText(pick.candidate.energyKeV)}` : "",
  );
  const side = (contrast: number): string => percentText(contrast, 2);
  const removed = -Math.expm1(-Math.abs(absorption.opticalDepth));
  const steps: Step[] = [
    {
      name: "The feature acts on the beam",
      phase: `shifts phase by ${rounded(-phase.phaseShiftRad, 2)} rad`,
      absorption: `${absorption.opticalDepth >= 0 ? "removes" : "lets through"} ${percentText(removed, 2)}${absorption.opticalDepth >= 0 ? "" : " more"}`,
      factor: null,
      words: "what the rest builds on",
      formula: "Phase −2πΔδ d/λ, absorption 1 − exp(−Δμ d), through the middle of the feature.",
      anchor: "contrast-of-a-feature",
    },
    {
      name: "What reaches the detector",
      phase: `fringe, ${side(phase.contrast)}`,
      absorption: `shadow, ${side(absorption.contrast)}`,
      factor: factors.contrast,
      words: `${effectOfContrast(phase.contrast / absorption.contrast)}, squared`,
      formula: "Largest |C| of the blurred image by linear theory; detectability goes with its square.",
      anchor: "contrast-of-a-feature",
    },
    {
      name: "How much image carries it",
      phase: areaText(phase.carriedByM2),
      absorption: areaText(absorption.carriedByM2),
      factor: factors.area,
      words: factors.area < 1 ? "less of the image" : "more of the image",
      formula: "S over the square of the largest contrast: the area that would carry it at full strength.",
      anchor: "detectability",
    },
  ];
  if (use === "retrieval" || use === "tomography") {
    steps.push({
      name: use === "tomography" ? "How the volume is read" : "How the retrieved image is read",
      phase: `${rounded(phase.readShare, 2)} of S`,
      absorption: `${rounded(absorption.readShare, 2)} of S`,
      factor: factors.reading,
      words: "coarse noise of the filter",
      formula: "What the observer of the retrieved image or volume keeps of the ideal observer’s S.",
      anchor: use === "tomography" ? "tomography-plan" : "retrieval",
    });
  }
  steps.push(
    {
      name: "What is let through and counted",
      phase: `${percentText(phase.transmission, 2)} through, ${percentText(phase.efficiency, 2)} counted${energies[0]}`,
      absorption: `${percentText(absorption.transmission, 2)} through, ${percentText(absorption.efficiency, 2)} counted${energies[1]}`,
      factor: factors.through,
      words: factors.through >= 1 ? "more photons counted" : "fewer photons counted",
      formula: "Transmission of all layers times the detector’s efficiency.",
      anchor: "efficiency",
    },
    {
      name: "Dose each photon leaves",
      phase: `${rounded(1 / factors.dosePerPhoton, 2)} of absorption’s`,
      absorption: "1",
      factor: factors.dosePerPhoton,
      words: "per photon at the first layer",
      formula: "E μ_en/ρ behind the layers before the sample.",
      anchor: "dose-of-a-plan",
    },
  );
  if (Math.abs(factors.counts - 1) > 1e-6) {
    steps.push({
      name: "Counts asked for in a pixel",
      phase: `${rounded(phase.countsFactor, 2)}\u00a0× what visibility needs`,
      absorption: `${rounded(absorption.countsFactor, 2)}\u00a0× what visibility needs`,
      factor: factors.counts,
      words: "the floor of counts",
      formula: "Where the floor of counts decides, more photons are taken than visibility needs.",
      anchor: "detectability",
    });
  }
  return steps;
}

const effectOfContrast = (ratio: number): string =>
  ratio >= 1 ? `${ratioText(ratio)} times stronger` : `${ratioText(1 / ratio)} times weaker`;

/** An area as the side of a square that has it. */
const areaText = (areaM2: number): string => `a square of ${lengthText(Math.sqrt(areaM2), 2)}`;
