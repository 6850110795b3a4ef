/** Composer of mixtures: one row a part, shares that add up to 100 %, or milligrams per millilitre in a solvent. */
import { useDeferredValue, useState } from "react";
import { Segments } from "#src/components/ui/Segments.tsx";
import { Fault } from "#src/components/ui/Messages.tsx";
import { formatGiven } from "#src/lib/format/numbers.ts";
import { DEFAULT_QUESTION, MIXTURE_BASES, type MixtureBasisChoice, type Question } from "#src/lib/lookup/question.ts";
import { readRecipe, type RecipeLine, writeRecipe } from "#src/lib/lookup/recipe.ts";
import { QuestionError, statedMaterial } from "#src/lib/lookup/state-material.ts";
import { type KnownMaterial, materialFinder } from "#src/lib/lookup/finder.ts";
import { BlankPanel } from "./Blank.tsx";
import { RecipeRow } from "./RecipeRow.tsx";
import { useNamedMaterials } from "./useNamedMaterials.ts";

/** What a recipe is made of, and how its shares are counted. */
export type Recipe = Pick<Question, "parts" | "by" | "density">;

interface Props {
  /** The blank that it hangs from. */
  readonly field: string;
  readonly recipe: Recipe;
  /** The material that a new recipe begins with. */
  readonly whole: string;
  readonly known: readonly KnownMaterial[];
  readonly learn: (materials: readonly KnownMaterial[]) => void;
  readonly onTake: (fields: Recipe) => void;
  /** Where the page offers to take one material instead inside the panel. */
  readonly onOneMaterial?: () => void;
  readonly onClose: () => void;
}

const BASIS_OPTIONS: readonly { value: MixtureBasisChoice; label: string }[] = [
  { value: "mass", label: "Mass" },
  { value: "volume", label: "Volume" },
  { value: "mole", label: "Mole" },
  { value: "concentration", label: "mg/mL" },
];

const BLANK_LINE: RecipeLine = { depth: 0, share: "", material: "", density: "", basis: "" };

function startLines(recipe: Recipe, whole: string): RecipeLine[] {
  const lines = readRecipe(recipe.parts);
  return lines.length > 0 ? lines : [{ ...BLANK_LINE, share: "100", material: whole }, BLANK_LINE];
}

export function RecipeEditor({ field, recipe, whole, known, learn, onTake, onOneMaterial, onClose }: Props) {
  const [lines, setLines] = useState(() => startLines(recipe, whole));
  const [by, setBy] = useState<MixtureBasisChoice>(recipe.by);
  const [density, setDensity] = useState(recipe.parts.trim() === "" ? "" : recipe.density);
  const [asText, setAsText] = useState(false);
  const text = writeRecipe(lines.filter((line) => line.material !== "" || line.share !== ""));
  const named = useNamedMaterials(
    useDeferredValue(lines).map((line) => line.material),
    known,
  );
  const fault = readingFault({ parts: text, by, density: density.trim() }, [...known, ...named.found]);

  const update = (index: number, fields: Partial<RecipeLine>): void =>
    setLines((before) => before.map((line, at) => (at === index ? { ...line, ...fields } : line)));
  const changeBasis = (value: string): void => {
    const next = MIXTURE_BASES.find((basis) => basis === value) ?? "mass";
    if (next === "concentration" && by !== "concentration" && lines[0]) update(0, { share: "" });
    setBy(next);
  };
  const remove = (index: number): void =>
    setLines((before) => {
      const depth = before[index]?.depth ?? 0;
      let end = index + 1;
      while ((before[end]?.depth ?? -1) > depth) end++;
      return [...before.slice(0, index), ...before.slice(end)];
    });
  const addInside = (index: number): void =>
    setLines((before) => [
      ...before.slice(0, index + 1),
      { ...BLANK_LINE, depth: (before[index]?.depth ?? 0) + 1 },
      ...before.slice(index + 1),
    ]);

  return (
    <BlankPanel
      field={field}
      title="Mixture"
      width="medium"
      takeText="Take this mixture"
      canTake={fault === null}
      help="Shares that add up to less than 100 % are scaled, and the answer says so."
      onTake={() => onTake({ parts: text, by, density: density.trim() })}
      onClose={onClose}
    >
      <div className="stack">
        <div className="row">
          <span>Counted by</span>
          <Segments label="Counted by" name="recipe-basis" options={BASIS_OPTIONS} value={by} onChange={changeBasis} />
        </div>
        {asText ? (
          <div className="field">
            <label htmlFor="recipe-text">
              One part a line: share; material; density. Parts of a part begin with a dash.
            </label>
            <textarea
              id="recipe-text"
              className="input"
              rows={6}
              defaultValue={text}
              onChange={(event) => setLines(readRecipe(event.currentTarget.value))}
            />
          </div>
        ) : (
          <table className="list list-tight recipe">
            <caption className="sr-only">Parts of the mixture</caption>
            <thead>
              <tr>
                <th scope="col">Part</th>
                <th scope="col">{by === "concentration" ? "mg/mL (solvent: empty)" : "Share, %"}</th>
                <th scope="col">Density, g/cm³</th>
                <th scope="col">
                  <span className="sr-only">Change</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {lines.map((line, index) => (
                <RecipeRow
                  key={index}
                  line={line}
                  number={index + 1}
                  onChange={(fields) => update(index, fields)}
                  onPick={(material) => {
                    learn([material]);
                    update(index, { material: material.name });
                  }}
                  onRemove={() => remove(index)}
                  onAddInside={() => addInside(index)}
                />
              ))}
            </tbody>
          </table>
        )}
        <div className="actions">
          {asText ? null : (
            <button
              type="button"
              className="btn btn-small"
              onClick={() => setLines((before) => [...before, BLANK_LINE])}
            >
              Add a part
            </button>
          )}
          <button type="button" className="btn btn-small" onClick={() => setAsText((before) => !before)}>
            {asText ? "Show as rows" : "Write as text"}
          </button>
          {onOneMaterial ? (
            <button type="button" className="btn btn-small" onClick={onOneMaterial}>
              One material instead
            </button>
          ) : null}
          {by === "concentration" || asText ? null : (
            <SumLine lines={lines} onGive={(index, share) => update(index, { share })} />
          )}
        </div>
        <label className="row" htmlFor="recipe-density">
          <span>Density of the whole, empty to estimate it</span>
          <input
            id="recipe-density"
            className="input-inline figures"
            style={{ width: "10ch" }}
            value={density}
            maxLength={64}
            placeholder="g/cm³"
            onChange={(event) => setDensity(event.currentTarget.value)}
          />
        </label>
        <div aria-live="polite">{fault !== null && text !== "" ? <Fault>{fault}</Fault> : null}</div>
      </div>
    </BlankPanel>
  );
}

/** What is left to 100 %, with an offer to give it to the first part. */
function SumLine({ lines, onGive }: { lines: readonly RecipeLine[]; onGive: (index: number, share: string) => void }) {
  const sum = lines.filter((line) => line.depth === 0).reduce((total, line) => total + (Number(line.share) || 0), 0);
  const left = Number((100 - sum).toPrecision(6));
  const first = lines.findIndex((line) => line.depth === 0);
  if (Math.abs(left) < 1e-6 || first < 0) return <span className="note">{`Sum ${formatGiven(sum)} %`}</span>;
  const given = Number(((Number(lines[first]?.share) || 0) + left).toPrecision(6));
  return (
    <span className="note">
      {left > 0
        ? `Sum ${formatGiven(sum)} %, ${formatGiven(left)} % left. `
        : `Sum ${formatGiven(sum)} %, ${formatGiven(-left)} % too much. `}
      {given > 0 ? (
        <button type="button" className="btn-text" onClick={() => onGive(first, String(given))}>
          {left > 0
            ? `Give it to ${lines[first]?.material || "the first part"}`
            : `Take it from ${lines[first]?.material || "the first part"}`}
        </button>
      ) : null}
    </span>
  );
}

/** What keeps the mixture from being taken; null when it can be. */
function readingFault(recipe: Recipe, known: readonly KnownMaterial[]): string | null {
  if (recipe.parts === "") return "The recipe has no parts.";
  try {
    statedMaterial({ ...DEFAULT_QUESTION, ...recipe }, materialFinder(known));
    return null;
  } catch (error) {
    if (error instanceof QuestionError) return error.message;
    throw error;
  }
}
