/** One part of a mixture as a table row. */
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { RecipeLine } from "#src/lib/lookup/recipe.ts";
import { MaterialCombobox } from "./MaterialCombobox.tsx";

interface Props {
  readonly line: RecipeLine;
  readonly number: number;
  readonly onChange: (fields: Partial<RecipeLine>) => void;
  readonly onPick: (material: KnownMaterial) => void;
  readonly onRemove: () => void;
  readonly onAddInside: () => void;
}

/** Deepest indentation; the limit of nesting counts the whole as the first level. */
const MAX_DEPTH = 3;

export function RecipeRow({ line, number, onChange, onPick, onRemove, onAddInside }: Props) {
  const named = line.material || `part ${number}`;
  return (
    <tr
      style={{ "--depth": line.depth } as React.CSSProperties}
      className={line.depth > 0 ? "recipe-inside" : undefined}
    >
      <td>
        <MaterialCombobox
          floating
          inputClass="input-inline"
          label={`Material of part ${number}`}
          value={line.material}
          onChange={(material) => onChange({ material })}
          onPick={onPick}
        />
      </td>
      <td>
        <input
          className="input-inline figures"
          style={{ width: "8ch" }}
          inputMode="decimal"
          aria-label={`Share of ${named}`}
          value={line.share}
          maxLength={16}
          onChange={(event) => onChange({ share: event.currentTarget.value })}
        />
      </td>
      <td>
        <input
          className="input-inline figures"
          style={{ width: "8ch" }}
          inputMode="decimal"
          aria-label={`Density of ${named}, empty for the handbook's`}
          value={line.density}
          maxLength={16}
          onChange={(event) => onChange({ density: event.currentTarget.value })}
        />
      </td>
      <td className="recipe-tools">
        {line.depth < MAX_DEPTH ? (
          <button type="button" className="btn btn-small" onClick={onAddInside} aria-label={`Add inside ${named}`}>
            Add inside
          </button>
        ) : null}
        <button type="button" className="btn btn-small" onClick={onRemove} aria-label={`Take out ${named}`}>
          Take out
        </button>
      </td>
    </tr>
  );
}
