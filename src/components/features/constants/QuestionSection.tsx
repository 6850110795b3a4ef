/** The question as a sentence with blanks. With scripts each blank opens its editor; without, the same fields are one plain form. */
import { type ReactNode, useState } from "react";
import { Blank } from "#src/components/features/question/Blank.tsx";
import { FaultWithFixes } from "#src/components/features/question/FaultWithFixes.tsx";
import { RecipeEditor } from "#src/components/features/question/RecipeEditor.tsx";
import { Formula } from "#src/components/ui/Formula.tsx";
import { formatGiven } from "#src/lib/format/numbers.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import type { FieldFault, QuestionField } from "#src/lib/lookup/state-material.ts";
import type { View } from "#src/lib/lookup/view.ts";
import { DensityEditor, EnergyEditor } from "./QuantityEditors.tsx";
import { MaterialEditor } from "./MaterialEditor.tsx";
import { PlainForm } from "./PlainForm.tsx";
import type { Lookup } from "./useLookup.ts";

export const faultOf = (view: View, field: QuestionField): FieldFault | undefined =>
  view.faults.find((fault) => fault.field === field);

/** The order in which Enter goes on. */
const NEXT: Partial<Record<QuestionField, QuestionField>> = { material: "density", density: "energy" };

export function QuestionSection({ lookup }: { lookup: Lookup }) {
  return (
    <section className="sec sec-first" aria-labelledby="question-heading">
      <div className="sec-head">
        <h2 id="question-heading">Question</h2>
      </div>
      <div className="sec-body">
        <QuestionSentence lookup={lookup} plainAction="/constants" />
      </div>
    </section>
  );
}

/** The sentence, the editor of the blank that is open, and what the material is made of. */
export function QuestionSentence({ lookup, plainAction }: { lookup: Lookup; plainAction: string }) {
  const { question, view, change } = lookup;
  const [open, setOpen] = useState<QuestionField | null>(null);
  const toggle = (field: QuestionField) => () => setOpen((before) => (before === field ? null : field));
  const take = (field: QuestionField, fields: Partial<Question>, goOn = true): void => {
    change(fields);
    setOpen(goOn ? (NEXT[field] ?? null) : null);
  };
  const materialField = question.parts.trim() === "" ? "material" : "parts";
  const common = { lookup, onClose: () => setOpen(null) };
  return (
    <>
      <div className="needs-script">
        <p className="ask">
          What does{" "}
          <Blank field={materialField} label="material" open={open === materialField} onToggle={toggle(materialField)}>
            {materialWords(lookup)}
          </Blank>{" "}
          of density{" "}
          <Blank
            field="density"
            label="density"
            open={open === "density"}
            unset={view.main === null && question.density === ""}
            onToggle={toggle("density")}
          >
            {densityWords(lookup)}
          </Blank>{" "}
          do at{" "}
          <Blank field="energy" label="photon energy" open={open === "energy"} onToggle={toggle("energy")}>
            {view.energyKeV === null ? question.energy || "energy" : `${formatGiven(view.energyKeV)}\u00a0keV`}
          </Blank>
          ?
        </p>
        {open === "material" ? (
          <MaterialEditor {...common} onTake={(fields, goOn) => take("material", fields, goOn)} />
        ) : null}
        {open === "parts" ? (
          <RecipeEditor
            field="parts"
            recipe={question}
            whole={view.main?.keptId ? view.main.label : (view.main?.formula ?? question.material)}
            known={lookup.known}
            learn={lookup.learn}
            onTake={(fields) => take("parts", fields, false)}
            onClose={common.onClose}
          />
        ) : null}
        {open === "density" ? <DensityEditor {...common} onTake={(fields) => take("density", fields)} /> : null}
        {open === "energy" ? <EnergyEditor {...common} onTake={(fields) => take("energy", fields)} /> : null}
        <p className="facts-line question-facts">
          <MadeOf view={view} />
          {materialField === "parts" ? (
            <button type="button" className="btn-text" onClick={() => change({ parts: "", density: "" })}>
              Take one material instead
            </button>
          ) : null}
          <button
            type="button"
            className="btn-text"
            onClick={toggle("parts")}
            data-blank={materialField === "parts" ? undefined : "parts"}
          >
            {materialField === "parts" ? "Edit mixture" : "Compose a mixture"}
          </button>
        </p>
        {(["material", "parts", "density", "solid", "energy"] as const).map((field) => {
          const fault = open === field ? undefined : faultOf(view, field);
          return fault ? (
            <FaultWithFixes key={field} fault={fault} onFix={(text) => change({ [field]: text })} />
          ) : null;
        })}
        {lookup.trouble ? (
          <p className="notice" role="status">
            {lookup.trouble}
          </p>
        ) : null}
      </div>
      <div className="without-script">
        <PlainForm question={question} view={view} action={plainAction} />
      </div>
    </>
  );
}

function materialWords({ question, view }: Lookup): ReactNode {
  if (view.main === null) return question.parts.trim() === "" ? question.material || "a material" : "a mixture";
  return view.main.formula === view.main.label ? <Formula formula={view.main.label} /> : view.main.label;
}

function densityWords({ question, view }: Lookup): string {
  if (view.main === null) return question.density || "density";
  return `${formatGiven(view.main.densityGCm3, 5)}\u00a0g/cm³${view.main.densityEstimated ? " (estimate)" : ""}`;
}

function MadeOf({ view }: { view: View }) {
  const { main } = view;
  if (!main) return null;
  return (
    <>
      {main.formula && main.formula !== main.label ? (
        <span>
          <Formula formula={main.formula} />
        </span>
      ) : null}
      <span>
        {main.massFractions.length === 0
          ? "No matter"
          : `By mass ${main.massFractions
              .slice(0, 6)
              .map(([symbol, share]) => `${symbol} ${formatGiven(share * 100, 4)} %`)
              .join(", ")}${main.massFractions.length > 6 ? " …" : ""}`}
      </span>
      {main.scaledFromPercent !== null ? (
        <span>{`Shares of ${formatGiven(main.scaledFromPercent, 4)} in all are scaled to 100 %`}</span>
      ) : null}
      {main.keptId ? <a href={`/materials/${main.keptId}`}>Handbook entry</a> : null}
    </>
  );
}
