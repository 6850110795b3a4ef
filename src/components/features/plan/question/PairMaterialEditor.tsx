/** Editor of the feature's or the host's material: the handbook's closest, a formula with its density, or a mixture. */
import { useRef, useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { FormulaReading, isBrokenFormula, readAsFormula } from "#src/components/features/question/FormulaReading.tsx";
import { MaterialCombobox } from "#src/components/features/question/MaterialCombobox.tsx";
import { attempt, ReadField, type Reading } from "#src/components/features/question/ReadField.tsx";
import { RecipeEditor } from "#src/components/features/question/RecipeEditor.tsx";
import { significantText } from "#src/lib/format/numbers.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { gCm3FromKgPerM3, MAX_DENSITY_KG_PER_M3 } from "#src/lib/physics/index.ts";
import type { PlanQuestion } from "#src/lib/plans/question.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import type { EditorProps } from "./props.ts";

interface Props extends EditorProps {
  readonly field: "feature" | "host";
}

const TITLES = { feature: "Feature material", host: "Host material" } as const;

export function PairMaterialEditor(props: Props) {
  const { field, question, known, learn, onTake, onClose } = props;
  const [composing, setComposing] = useState(question[`${field}Parts`].trim() !== "");
  if (!composing) return <OneMaterialEditor {...props} onCompose={() => setComposing(true)} />;
  return (
    <RecipeEditor
      field={field}
      recipe={{
        parts: question[`${field}Parts`],
        by: question[`${field}By`],
        density: question[`${field}Density`],
      }}
      whole={materialFinder(known).find(question[field])?.name ?? question[field]}
      known={known}
      learn={learn}
      onTake={({ parts, by, density }) => onTake(fieldsOf(field, { parts, by, density }))}
      onOneMaterial={() => setComposing(false)}
      onClose={onClose}
    />
  );
}

/** A material's fields under the names of the feature or the host. */
function fieldsOf(
  field: "feature" | "host",
  { parts, by, density, material }: { material?: string; parts: string; by?: PlanQuestion["hostBy"]; density: string },
): Partial<PlanQuestion> {
  return {
    ...(material === undefined ? {} : { [field]: material }),
    ...(by === undefined ? {} : { [`${field}By`]: by }),
    [`${field}Parts`]: parts,
    [`${field}Density`]: density,
  };
}

function OneMaterialEditor({
  field,
  question,
  known,
  learn,
  onTake,
  onClose,
  onCompose,
}: Props & { onCompose: () => void }) {
  const finder = materialFinder(known);
  const [text, setText] = useState(() => finder.find(question[field])?.name ?? question[field]);
  const [density, setDensity] = useState(question[`${field}Parts`] === "" ? question[`${field}Density`] : "");
  const [typed, setTyped] = useState(false);
  const densityField = useRef<HTMLInputElement>(null);
  const kept = finder.find(text);
  const reading = typed || !kept ? readAsFormula(text) : null;
  const isFormula = reading !== null && "formula" in reading && !kept;
  const densityReading = readDensity(density, isFormula);
  return (
    <BlankPanel
      field={field}
      title={TITLES[field]}
      takeText={isFormula ? `Take ${reading.formula.text}` : "Take it"}
      canTake={text.trim() !== ""}
      help="↑ ↓ choose from the handbook, Enter takes and opens the next blank, Esc keeps the old value."
      onTake={() => {
        // A formula without its density cannot be ranked: ask for it here rather than as a fault below.
        if (!densityReading.ok) densityField.current?.focus();
        else onTake(fieldsOf(field, { material: kept?.id ?? text.trim(), parts: "", density: density.trim() }));
      }}
      onClose={onClose}
    >
      <div className="stack">
        <div>
          <MaterialCombobox
            label="Name or formula"
            value={text}
            invalid={!kept && isBrokenFormula(reading, text)}
            describedBy="pair-material-reading"
            onChange={(next) => {
              // The density belonged to what stood here.
              if (!typed) setDensity("");
              setText(next);
              setTyped(true);
            }}
            onPick={(material) => {
              learn([material]);
              onTake(fieldsOf(field, { material: material.id, parts: "", density: "" }));
            }}
          />
          <div id="pair-material-reading" className="as-formula" aria-live="polite">
            {kept && !typed ? null : (
              <FormulaReading
                text={text}
                reading={reading}
                then="A formula has no density of its own: write it below."
                onMend={setText}
              />
            )}
          </div>
        </div>
        <ReadField
          ref={densityField}
          label={isFormula ? "Density, in g/cm³ or with a unit" : "Density, empty for the handbook’s"}
          value={density}
          reading={isFormula && density === "" ? null : densityReading}
          onChange={setDensity}
        />
        <p>
          <button type="button" className="btn btn-small" onClick={onCompose}>
            Compose a mixture
          </button>
        </p>
      </div>
    </BlankPanel>
  );
}

function readDensity(text: string, needed: boolean): Reading {
  if (text.trim() === "")
    return needed
      ? { ok: false, words: "A formula needs its density. Write it as 2.65 g/cm3." }
      : { ok: true, words: "Left empty: the handbook’s density." };
  return attempt(() => {
    const density = parseQuantity(text, "density", { defaultUnit: "g/cm3" });
    if (!(density > 0) || density > MAX_DENSITY_KG_PER_M3)
      throw new QuantityError({
        code: "outOfRange",
        message: "Densities from above 0 to 50 g/cm³ are accepted.",
        position: 1,
      });
    return `${significantText(gCm3FromKgPerM3(density), 5)} g/cm³.`;
  });
}
