/** The plan page's question: with scripts a sentence whose blanks open editors; without, the same fields as one plain form. */
import { PlanPlainForm } from "./PlanPlainForm.tsx";
import { PlanSentence } from "./PlanSentence.tsx";
import type { PlanQuestionProps } from "./props.ts";

export function PlanQuestionSection(props: PlanQuestionProps) {
  return (
    <section className="sec sec-first" aria-labelledby="question-heading">
      <div className="sec-head">
        <h2 id="question-heading">Question</h2>
      </div>
      <div className="sec-body">
        <div className="needs-script">
          <PlanSentence {...props} />
        </div>
        <div className="without-script">
          <PlanPlainForm question={props.question} faults={props.faults} />
        </div>
        {props.children}
      </div>
    </section>
  );
}
