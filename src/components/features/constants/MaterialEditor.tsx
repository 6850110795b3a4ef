/** Editor of the material blank: the handbook's closest entries, or a formula read as it is typed. */
import { useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { FormulaReading, isBrokenFormula, readAsFormula } from "#src/components/features/question/FormulaReading.tsx";
import { MaterialCombobox } from "#src/components/features/question/MaterialCombobox.tsx";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import type { Lookup } from "./useLookup.ts";

interface Props {
  readonly lookup: Lookup;
  readonly onTake: (fields: Partial<Question>, goOn?: boolean) => void;
  readonly onClose: () => void;
}

export function MaterialEditor({ lookup, onTake, onClose }: Props) {
  const [text, setText] = useState(lookup.view.main?.label ?? lookup.question.material);
  const [typed, setTyped] = useState(false);
  const reading = typed ? readAsFormula(text) : null;
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
        invalid={isBrokenFormula(reading, text)}
        describedBy="material-reading"
        onChange={(next) => {
          setText(next);
          setTyped(true);
        }}
        onPick={pick}
      />
      <div id="material-reading" className="as-formula" aria-live="polite">
        <FormulaReading text={text} reading={reading} then="Its density is asked next." onMend={setText} />
      </div>
    </BlankPanel>
  );
}
