/** A small field in running text: what is typed counts on Enter or when the field is left. Part of the page's form without scripts. */
import { useId } from "react";
import { Fault } from "#src/components/ui/Messages.tsx";
import type { FieldFault } from "#src/lib/lookup/state-material.ts";
import type { BlankField } from "./Blank.tsx";

export const FORM_ID = "question-form";

interface Props {
  readonly field: BlankField;
  readonly label: string;
  readonly value: string;
  readonly width?: string;
  readonly fault: FieldFault | undefined;
  readonly onCommit: (text: string) => void;
}

export function CommitField({ field, label, value, width = "9ch", fault, onCommit }: Props) {
  const faultId = useId();
  return (
    <>
      <input
        // A new value from elsewhere makes a new field; while typing the field is its own.
        key={value}
        className="input-inline"
        style={{ width }}
        type="text"
        name={field}
        form={FORM_ID}
        aria-label={label}
        aria-invalid={fault ? "true" : undefined}
        aria-describedby={fault ? faultId : undefined}
        defaultValue={value}
        maxLength={64}
        autoComplete="off"
        spellCheck={false}
        onBlur={(event) => {
          if (event.currentTarget.value.trim() !== value) onCommit(event.currentTarget.value.trim());
        }}
        onKeyDown={(event) => {
          if (event.key === "Enter") onCommit(event.currentTarget.value.trim());
          if (event.key === "Escape") event.currentTarget.value = value;
        }}
      />
      {fault ? <FaultWithFixes fault={fault} id={faultId} onFix={onCommit} /> : null}
    </>
  );
}

/** A fault with one button for each text that would be accepted. */
export function FaultWithFixes({
  fault,
  id,
  onFix,
}: {
  fault: FieldFault;
  id?: string;
  onFix: (text: string) => void;
}) {
  return (
    <span className="fault-block" role="alert">
      <Fault id={id}>{fault.message}</Fault>
      {fault.suggestions.length > 0 ? (
        <span className="chips">
          {fault.suggestions.map(({ text, words }) => (
            <button key={words} type="button" className="chip needs-script" onClick={() => onFix(text)}>
              {words}
            </button>
          ))}
        </span>
      ) : null}
    </span>
  );
}
