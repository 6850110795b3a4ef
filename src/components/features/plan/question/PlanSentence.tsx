/** The question as a sentence with blanks, the editor of the one that is open, and what is wrong below. */
import { type ReactNode, useState } from "react";
import { Blank } from "#src/components/features/question/Blank.tsx";
import { FaultWithFixes } from "#src/components/features/question/FaultWithFixes.tsx";
import { capital } from "#src/lib/format/sentence.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import type { PlanQuestion } from "#src/lib/plans/question.ts";
import { planWords } from "#src/lib/plans/words.ts";
import { blankOf, faultIdOf, LABELS, NEXT_BLANK, SECOND_CLAUSE } from "./blanks.ts";
import { OpenEditor } from "./OpenEditor.tsx";
import type { PlanBlank, PlanQuestionProps } from "./props.ts";

export function PlanSentence({ question, words: given, faults, known, change, learn }: PlanQuestionProps) {
  const [open, setOpen] = useState<PlanBlank | null>(null);
  const [unfolded, setUnfolded] = useState(false);
  const finder = materialFinder(known);
  const words = given ?? planWords(question, (named) => finder.find(named));
  const shownFaults = faults.map((fault, index) => ({
    fault,
    blank: blankOf(fault.field),
    id: faultIdOf(fault, index),
  }));
  const show = (blank: PlanBlank | null): void => {
    setOpen(blank);
    // An editor hangs from a blank that can be seen, and gives the focus back to it.
    if (blank && SECOND_CLAUSE.some((other) => other === blank)) setUnfolded(true);
  };
  const take = (blank: PlanBlank, fields: Partial<PlanQuestion>): void => {
    change(fields);
    show(NEXT_BLANK[blank]);
  };
  const blank = (field: PlanBlank): ReactNode => {
    const ids = shownFaults.filter((shown) => shown.blank === field && field !== open).map(({ id }) => id);
    return (
      <Blank
        field={field}
        label={LABELS[field]}
        open={open === field}
        unset={(field === "dose" || field === "time") && question[field] === ""}
        faultIds={ids.length > 0 ? ids.join(" ") : undefined}
        onToggle={() => show(open === field ? null : field)}
      >
        {words[field]}
      </Blank>
    );
  };
  const isFaulty = shownFaults.some((shown) => SECOND_CLAUSE.some((other) => other === shown.blank));
  return (
    <div className={unfolded || isFaulty ? "plan-sentence" : "plan-sentence plan-folded"}>
      <p className="ask">
        Show {blank("size")} {blank("shape")} of {blank("feature")} in {blank("thickness")} of {blank("host")},{" "}
        {words.layersLead} {blank("layers")}
        <span className="ask-more">
          , on {blank("setup")} with {blank("energies")} and {blank("distances")}, {blank("use")}, within{" "}
          {blank("dose")} and {blank("time")}
        </span>
        .
      </p>
      <p className="ask-folded">
        {`On ${words.setup} with ${words.energies} and ${words.distances}, ${words.use}, within ${words.dose} and ${words.time}. `}
        <button type="button" className="btn-text" onClick={() => setUnfolded(true)}>
          {`Show these ${SECOND_CLAUSE.length} blanks`}
        </button>
      </p>
      {open === null ? null : (
        <OpenEditor
          key={open}
          field={open}
          question={question}
          known={known}
          learn={learn}
          onTake={(fields) => take(open, fields)}
          onClose={() => setOpen(null)}
        />
      )}
      {words.also.length > 0 && open !== "dose" && open !== "time" ? (
        <p className="facts-line question-facts">
          <span>{`${capital(words.also.join("; "))}.`}</span>
          <button type="button" className="btn-text" onClick={() => show("dose")}>
            Change limits
          </button>
        </p>
      ) : null}
      {shownFaults.map(({ fault, blank: at, id }) =>
        at === open ? null : (
          <FaultWithFixes key={id} id={id} fault={fault} onFix={(text) => change({ [fault.field]: text })} />
        ),
      )}
    </div>
  );
}
