/** One layer, or the host, as a table row. */
import type { KeyboardEvent, ReactNode } from "react";
import { MaterialCombobox } from "#src/components/features/question/MaterialCombobox.tsx";
import { Fault } from "#src/components/ui/Messages.tsx";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import type { LayerFields, LayerRow, RowFault } from "./layer-rows.ts";

interface Props {
  readonly row: LayerRow;
  readonly index: number;
  readonly isLast: boolean;
  readonly fault: RowFault | null;
  readonly onChange: (fields: LayerFields) => void;
  readonly onPick: (material: KnownMaterial) => void;
  readonly onMove: (step: -1 | 1) => void;
  readonly onRemove: () => void;
}

export function LayerRowFields({ row, index, isLast, fault, onChange, onPick, onMove, onRemove }: Props) {
  const named = row.material || `layer ${index + 1}`;
  const faultId = fault === null ? undefined : `layer-${row.id}-fault`;
  // A field that is still empty is asked for, not wrong.
  const isWrong = (field: keyof LayerFields): boolean => fault?.field === field && row[field].trim() !== "";
  const onKeyDown = (event: KeyboardEvent): void => {
    if (!event.altKey || (event.key !== "ArrowUp" && event.key !== "ArrowDown")) return;
    // Before the material field takes the key for its list.
    event.preventDefault();
    event.stopPropagation();
    onMove(event.key === "ArrowUp" ? -1 : 1);
  };
  const input = (field: "density" | "thickness", label: string, placeholder?: string): ReactNode => (
    <input
      className="input-inline figures"
      style={{ width: "8ch" }}
      type="text"
      aria-label={label}
      aria-invalid={isWrong(field) ? "true" : undefined}
      aria-describedby={faultId}
      value={row[field]}
      maxLength={32}
      placeholder={placeholder}
      autoComplete="off"
      onFocus={(event) => event.currentTarget.select()}
      onChange={(event) => onChange({ [field]: event.currentTarget.value })}
    />
  );
  return (
    <tr onKeyDownCapture={onKeyDown}>
      <td className="layer-order">{index + 1}</td>
      <td className="layer-material">
        <MaterialCombobox
          floating
          inputClass="input-inline"
          label={`Material of layer ${index + 1}`}
          value={row.material}
          invalid={isWrong("material")}
          describedBy={faultId}
          onChange={(material) => onChange({ material })}
          onPick={onPick}
        />
        <div id={faultId} aria-live="polite">
          {fault === null ? null : isWrong(fault.field) ? (
            <Fault>{fault.message}</Fault>
          ) : (
            <p className="note">{fault.message}</p>
          )}
        </div>
      </td>
      <td data-label="Thickness">{input("thickness", `Thickness of ${named}`)}</td>
      <td data-label="Density, g/cm³">{input("density", `Density of ${named}, empty for the handbook’s`)}</td>
      <td className="recipe-tools">
        <button
          type="button"
          className="btn btn-small"
          aria-label={`Move ${named} towards the source`}
          aria-disabled={index === 0}
          onClick={() => onMove(-1)}
        >
          <span aria-hidden="true">↑</span>
        </button>
        <button
          type="button"
          className="btn btn-small"
          aria-label={`Move ${named} towards the detector`}
          aria-disabled={isLast}
          onClick={() => onMove(1)}
        >
          <span aria-hidden="true">↓</span>
        </button>
        <button type="button" className="btn btn-small" aria-label={`Take out ${named}`} onClick={onRemove}>
          Take out
        </button>
      </td>
    </tr>
  );
}
