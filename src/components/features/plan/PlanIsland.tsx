/** The Plan page's island: the same sections on the server and in the browser, from one view. */
import { memo, useDeferredValue, useMemo } from "react";
import { Queries } from "../constants/Queries.tsx";
import { Notice } from "#src/components/ui/Messages.tsx";
import { AnswerSection } from "./AnswerSection.tsx";
import { CompareSection } from "./CompareSection.tsx";
import { PickBar } from "./PickBar.tsx";
import { PlanQuestion } from "./PlanQuestion.tsx";
import { ShortlistSection } from "./ShortlistSection.tsx";
import { type PlanStart, type PlanState, usePlan } from "./usePlan.ts";
import { WorkingSection } from "./WorkingSection.tsx";

/** @param start the page's state as one JSON text, a quarter of what it would be as a property of parts */
export default function PlanIsland({ start }: { start: string }) {
  const read = useMemo(() => JSON.parse(start) as PlanStart, [start]);
  return (
    <Queries>
      <Sections start={read} />
    </Queries>
  );
}

function Sections({ start }: { start: PlanStart }) {
  const plan = usePlan(start);
  // The figures are drawn in slices between what a person does: typing and pressing never wait for them.
  const later = useDeferredValue(plan);
  return (
    <>
      <PlanQuestion plan={plan} />
      <State plan={plan} />
      <Figures plan={later} />
    </>
  );
}

const Figures = memo(function Figures({ plan }: { plan: PlanState }) {
  return (
    <>
      <AnswerSection plan={plan} />
      <ShortlistSection plan={plan} />
      <WorkingSection result={plan.shown} stale={plan.stale} />
      <CompareSection plan={plan} />
      <PickBar plan={plan} />
    </>
  );
});

/** What is going on: a ranking under way, an answer to an older question, trouble. */
function State({ plan }: { plan: PlanState }) {
  const { progress, trouble, stale, shown, view } = plan;
  if (progress !== null) {
    return (
      <div className="plan-state" role="status">
        <progress max={1} value={progress} aria-label="Ranking" />
        <span className="note">{`Ranking ${shown ? `${shown.points} points` : ""}: ${Math.round(progress * 100)} % done. The answer below is to the question before.`}</span>
        <button type="button" className="btn btn-small" onClick={plan.stop}>
          Stop
        </button>
      </div>
    );
  }
  if (trouble !== null)
    return (
      <div className="plan-state" role="alert">
        <Notice>
          <p>{trouble}</p>
        </Notice>
      </div>
    );
  if (stale && shown && view.faults.length > 0)
    return (
      <div className="plan-state">
        <Notice>
          <p>{`The question cannot be answered as it stands. The answer below is for ${shown.beam.feature.label} in ${shown.beam.host.thicknessMm} mm of ${shown.beam.host.label}.`}</p>
        </Notice>
      </div>
    );
  return null;
}
