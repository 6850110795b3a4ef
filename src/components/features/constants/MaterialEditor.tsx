/** Editor of the material blank: the handbook's closest entries, or a formula read as it is typed. */
import { useState } from "react";
import { Formula } from "#src/components/ui/Formula.tsx";
import { Fault } from "#src/components/ui/Messages.tsx";
import { compositionText } from "#src/lib/format/formula.ts";
import { formatGiven } from "#src/lib/format/numbers.ts";
import { compositionOfFormula, elementByNumber, FormulaError, parseFormula } from "#src/lib/physics/index.ts";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import { looksLikeFormula } from "#src/lib/lookup/state-material.ts";
import { BlankPanel } from "./Blank.tsx";
import { MaterialCombobox } from "./MaterialCombobox.tsx";
import type { Lookup } from "./useLookup.ts";

interface Props {
  readonly lookup: Lookup;
  readonly onTake: (fields: Partial<Question>, goOn?: boolean) => void;
  readonly onClose: () => void;
}

export function MaterialEditor({ lookup, onTake, onClose }: Props) {
  const [text, setText] = useState(lookup.view.main?.label ?? lookup.question.material);
  const [typed, setTyped] = useState(false);
  const reading = typed ? readAsFormula(text.trim()) : null;
  const pick = (material: KnownMaterial): void => {
    lookup.learn([material]);
    // A handbook entry brings its density: go on to the energy.
    onTake({ material: material.id, density: "", parts: "" }, false);
  };
  return (
    <BlankPanel
      field="material"
      title="Material"
      takeText={reading && "formula" in reading ? `Take ${reading.formula.text}` : "Take it"}
      canTake={text.trim() !== ""}
      help="↑ ↓ choose from the handbook, Enter takes, Esc keeps the old one."
      onTake={() => onTake({ material: text.trim(), density: "", parts: "" })}
      onClose={onClose}
    >
      <MaterialCombobox
        label="Name or formula"
        value={text}
        invalid={reading !== null && "error" in reading && looksLikeFormula(text)}
        describedBy="material-reading"
        onChange={(next) => {
          setText(next);
          setTyped(true);
        }}
        onPick={pick}
      />
      <div id="material-reading" className="as-formula" aria-live="polite">
        {reading === null ? (
          <p className="note">A name such as kapton, or a formula such as CuSO4·5H2O.</p>
        ) : "formula" in reading ? (
          <p>
            As a formula: <Formula formula={reading.formula.text} />, {formatGiven(reading.formula.molarMassGPerMol, 6)}{" "}
            g/mol, {compositionText(fractionsOf(reading.formula.text), 4)}. Its density is asked next.
          </p>
        ) : !looksLikeFormula(text) ? (
          <p className="note">Not a formula. Choose from the list, or write one such as SiO2.</p>
        ) : (
          <div>
            <p className="note">As a formula:</p>
            <p className="fault-place" aria-hidden="true">
              {`${text.trim()}\n${" ".repeat(Math.max(0, reading.error.position - 1))}^`}
            </p>
            <Fault>{reading.error.message}</Fault>
            <span className="chips">
              {reading.error.suggestions.slice(0, 2).map((suggestion) => (
                <button
                  key={suggestion}
                  type="button"
                  className="chip"
                  onClick={() => setText(mended(text, reading.error, suggestion))}
                >
                  {mended(text, reading.error, suggestion)}
                </button>
              ))}
            </span>
          </div>
        )}
      </div>
    </BlankPanel>
  );
}

function readAsFormula(text: string): { formula: ReturnType<typeof parseFormula> } | { error: FormulaError } | null {
  if (text === "") return null;
  try {
    return { formula: parseFormula(text) };
  } catch (error) {
    if (error instanceof FormulaError) return { error };
    throw error;
  }
}

/** Suggestions are whole formulas, or a symbol for the one at fault. */
function mended(text: string, error: FormulaError, suggestion: string): string {
  if (error.code !== "unknownElement" && error.code !== "foreignLetter") return suggestion;
  const rest = text
    .trim()
    .slice(error.position - 1)
    .replace(/^(?:[A-Z][a-z]?|.)/u, suggestion);
  return text.trim().slice(0, error.position - 1) + rest;
}

function fractionsOf(text: string): Record<string, number> {
  return Object.fromEntries(
    [...compositionOfFormula(parseFormula(text)).massFractions].map(([atomicNumber, share]) => [
      elementByNumber(atomicNumber).symbol,
      share,
    ]),
  );
}
