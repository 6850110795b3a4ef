/** The question with its drawing. */
import { BeamDetails } from "../plan-figures/BeamDetails.tsx";
import { distanceText } from "#src/lib/format/plan-quantities.ts";
import { PlanQuestionSection } from "./question/index.ts";
import type { PlanState } from "./usePlan.ts";

export function PlanQuestion({ plan }: { plan: PlanState }) {
  const { shown, chosen } = plan;
  return (
    <PlanQuestionSection
      question={plan.question}
      faults={plan.view.faults}
      known={plan.known}
      change={plan.change}
      learn={plan.learn}
    >
      {shown ? (
        <BeamDetails
          {...shown.beam}
          technique={chosen?.candidate.technique ?? "phase"}
          distanceM={chosen?.candidate.distanceM ?? null}
          distanceWords={chosen ? distanceText(chosen.candidate.distanceM) : "no distance is allowed"}
        />
      ) : null}
    </PlanQuestionSection>
  );
}
