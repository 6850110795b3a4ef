/** A text field with the handbook's closest materials below it, after the ARIA combobox pattern. Free text (a formula) stands too. */
import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { type KeyboardEvent, useDeferredValue, useId, useState } from "react";
import { Formula } from "#src/components/ui/Formula.tsx";
import { formatGiven } from "#src/lib/format/numbers.ts";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import { searchMaterials } from "#src/lib/lookup/search.client.ts";

interface Props {
  readonly label: string;
  readonly value: string;
  readonly onChange: (text: string) => void;
  readonly onPick: (material: KnownMaterial) => void;
  readonly describedBy?: string | undefined;
  readonly invalid?: boolean;
  /** List under the field as a layer, for fields in a table; otherwise in the flow of a panel. */
  readonly floating?: boolean;
  readonly inputClass?: string;
  readonly placeholder?: string;
  readonly onBlur?: (text: string) => void;
}

const SHOWN = 8;

export function MaterialCombobox(props: Props) {
  const { value, onChange, onPick, floating = false } = props;
  const listId = useId();
  const [open, setOpen] = useState(!floating);
  const [active, setActive] = useState(-1);
  const query = useDeferredValue(value.trim().slice(0, 64));
  const search = useQuery({
    queryKey: ["materials-list", query],
    queryFn: ({ signal }) => searchMaterials(query, SHOWN, signal),
    enabled: open,
    staleTime: Infinity,
    placeholderData: keepPreviousData,
  });
  const items = search.data ?? [];
  const shown = open && items.length > 0;
  const chosen = active >= 0 ? items[Math.min(active, items.length - 1)] : undefined;

  const pick = (material: KnownMaterial): void => {
    onPick(material);
    setActive(-1);
    if (floating) setOpen(false);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === "ArrowDown" || event.key === "ArrowUp") {
      event.preventDefault();
      setOpen(true);
      const last = items.length - 1;
      const step = event.key === "ArrowDown" ? 1 : -1;
      setActive((before) => (last < 0 ? -1 : before + step > last ? 0 : before + step < 0 ? last : before + step));
    } else if (event.key === "Enter" && chosen && shown) {
      event.preventDefault();
      pick(chosen);
    } else if (event.key === "Escape" && floating && open) {
      event.preventDefault();
      setOpen(false);
      setActive(-1);
    }
  };

  return (
    <div className="combo">
      <input
        className={props.inputClass ?? "input"}
        type="text"
        role="combobox"
        aria-label={props.label}
        aria-expanded={shown}
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={chosen && shown ? `${listId}-${chosen.id}` : undefined}
        aria-describedby={props.describedBy}
        aria-invalid={props.invalid === true ? "true" : undefined}
        autoComplete="off"
        autoCapitalize="off"
        spellCheck={false}
        maxLength={256}
        placeholder={props.placeholder}
        value={value}
        onChange={(event) => {
          onChange(event.currentTarget.value);
          setActive(-1);
          setOpen(true);
        }}
        onFocus={(event) => {
          event.currentTarget.select();
        }}
        onBlur={(event) => {
          if (floating) setOpen(false);
          props.onBlur?.(event.currentTarget.value);
        }}
        onKeyDown={onKeyDown}
      />
      <ul
        id={listId}
        role="listbox"
        aria-label="Materials found"
        className={floating ? "options-popup" : "options"}
        hidden={!shown}
      >
        {items.map((material) => (
          <li
            key={material.id}
            id={`${listId}-${material.id}`}
            role="option"
            className="option"
            aria-selected={material === chosen}
            // The field keeps the focus: a press must not take it before the click arrives.
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => pick(material)}
          >
            <span>{material.name}</span>
            <span className="figures">{`${formatGiven(material.densityGCm3)} g/cm³`}</span>
            <small>
              {material.formula ? (
                <Formula formula={material.formula} />
              ) : (
                material.alsoKnownAs.slice(0, 3).join(", ") || material.tags.join(", ")
              )}
            </small>
          </li>
        ))}
      </ul>
      <p className="sr-only" role="status">
        {shown ? `${items.length} materials found.` : ""}
      </p>
    </div>
  );
}
