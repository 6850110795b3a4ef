/** The whole question as a plain form, for a page without scripts. What is wrong stands by its field. */
import { Fault } from "#src/components/ui/Messages.tsx";
import type { PlanFault } from "#src/lib/plans/faults.ts";
import { DEFAULT_PLAN, type PlanQuestion } from "#src/lib/plans/question.ts";
import { PLAIN_GROUPS, type PlainField } from "./plain-fields.ts";

interface Props {
  readonly question: PlanQuestion;
  readonly faults: readonly PlanFault[];
}

export function PlanPlainForm({ question, faults }: Props) {
  const field = (plain: PlainField) => (
    <PlainInput
      key={plain.name}
      plain={plain}
      value={question[plain.name]}
      faults={faults.filter((fault) => fault.field === plain.name)}
    />
  );
  const isUsed = ({ name }: PlainField): boolean =>
    question[name] !== DEFAULT_PLAN[name] || faults.some((fault) => fault.field === name);
  return (
    <form method="get" action="/plan" className="plain-plan">
      {PLAIN_GROUPS.map(({ legend, fields, more }) => (
        <fieldset key={legend}>
          <legend>{legend}</legend>
          <div className="plain-fields">{fields.map(field)}</div>
          {more ? (
            <details open={more.fields.some(isUsed) || (legend === "Setup" && question.setup === "own")}>
              <summary>{more.summary}</summary>
              <div className="plain-fields">{more.fields.map(field)}</div>
            </details>
          ) : null}
        </fieldset>
      ))}
      <p className="actions">
        <button type="submit" className="btn btn-go">
          Rank it
        </button>
      </p>
    </form>
  );
}

function PlainInput({ plain, value, faults }: { plain: PlainField; value: string; faults: readonly PlanFault[] }) {
  const { name, label, hint, kind, choices = [] } = plain;
  const id = `plain-${name}`;
  const isFaulty = faults.length > 0;
  const described = [...(hint ? [`${id}-hint`] : []), ...(isFaulty ? [`${id}-fault`] : [])].join(" ");
  const common = {
    id,
    name,
    defaultValue: value,
    "aria-invalid": isFaulty ? ("true" as const) : undefined,
    "aria-describedby": described === "" ? undefined : described,
  };
  return (
    <div className={kind === "lines" ? "field plain-lines" : "field"}>
      <label htmlFor={id}>{label}</label>
      {kind === "choice" ? (
        <select className="input" {...common}>
          {choices.some((choice) => choice.value === value) ? null : <option value={value}>{value}</option>}
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value}>
              {choice.words}
            </option>
          ))}
        </select>
      ) : kind === "lines" ? (
        <textarea className="input" rows={3} {...common} />
      ) : (
        <input className="input" type="text" autoComplete="off" {...common} />
      )}
      {hint ? (
        <p className="note" id={`${id}-hint`}>
          {hint}
        </p>
      ) : null}
      {isFaulty ? (
        <div id={`${id}-fault`}>
          {faults.map((fault) => (
            <div key={fault.message}>
              <Fault>{fault.message}</Fault>
              {fault.suggestions.length > 0 ? (
                <p className="note">{`Accepted instead: ${fault.suggestions.map(({ words }) => words).join("; ")}.`}</p>
              ) : null}
            </div>
          ))}
        </div>
      ) : null}
    </div>
  );
}
