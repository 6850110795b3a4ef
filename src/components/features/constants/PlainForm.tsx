/** The whole question as a plain form, for a page without scripts: text fields in a sentence, the rest below, one button. */
import { Fault } from "#src/components/ui/Messages.tsx";
import { MIXTURE_BASES, type Question } from "#src/lib/lookup/question.ts";
import type { View } from "#src/lib/lookup/view.ts";
import { FORM_ID } from "./CommitField.tsx";

const BASIS_WORDS: Readonly<Record<(typeof MIXTURE_BASES)[number], string>> = {
  mass: "mass, in %",
  volume: "volume, in %",
  mole: "mole, in %",
  concentration: "concentration, in mg/mL",
};

export function PlainForm({ question, view, action }: { question: Question; view: View; action: string }) {
  const faults = new Set(view.faults.map((fault) => fault.field));
  const input = (name: keyof Question, label: string, size: number) => (
    <input
      className="slot-field"
      name={name}
      aria-label={label}
      defaultValue={question[name]}
      size={size}
      aria-invalid={faults.has(name) ? "true" : undefined}
    />
  );
  return (
    <form id={FORM_ID} method="get" action={action} className="stack">
      <p className="ask">
        What does {input("material", "Material: name or formula", 14)} of density{" "}
        {input("density", "Density, empty for the handbook's", 9)} do at{" "}
        {input("energy", "Photon energy or wavelength", 8)}?
      </p>
      <details open={question.parts.trim() !== "" || faults.has("parts")}>
        <summary>Compose a mixture</summary>
        <div className="stack">
          <div className="field">
            <label htmlFor="plain-parts">
              One part a line: share; material; density. Parts of a part begin with a dash.
            </label>
            <textarea
              id="plain-parts"
              className="input"
              name="parts"
              rows={5}
              defaultValue={question.parts}
              placeholder={"95; water\n5; KI; 3.12"}
            />
          </div>
          <p>
            Counted by{" "}
            <select className="slot-field" name="by" defaultValue={question.by} aria-label="Shares counted by">
              {MIXTURE_BASES.map((basis) => (
                <option key={basis} value={basis}>
                  {BASIS_WORDS[basis]}
                </option>
              ))}
            </select>
            , solid share of the volume {input("solid", "Solid share of the volume", 5)}
          </p>
        </div>
      </details>
      <details open={question.with.trim() !== "" || faults.has("with")}>
        <summary>More materials beside it</summary>
        <div className="field">
          <label htmlFor="plain-with">One a line: name; formula; density. Or a handbook name.</label>
          <textarea
            id="plain-with"
            className="input"
            name="with"
            rows={4}
            defaultValue={question.with}
            placeholder={"water\nGlass bead; SiO2; 2.2"}
          />
        </div>
      </details>
      {view.faults.length > 0 ? (
        <div role="alert">
          {view.faults.map((fault) => (
            <div key={fault.field + fault.message}>
              <Fault>{fault.message}</Fault>
              {fault.suggestions.length > 0 ? (
                <p className="note">{`Accepted instead: ${fault.suggestions.map(({ words }) => words).join("; ")}.`}</p>
              ) : null}
            </div>
          ))}
        </div>
      ) : null}
      <p className="actions">
        <button type="submit" className="btn btn-go">
          Show
        </button>
      </p>
    </form>
  );
}
