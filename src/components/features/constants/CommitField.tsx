/** A small field in running text: what is typed counts on Enter or when the field is left. Part of the page's form without scripts. */
import { useId } from "react";
import { FaultWithFixes } from "#src/components/features/question/FaultWithFixes.tsx";
import type { FieldFault, QuestionField } from "#src/lib/lookup/state-material.ts";

export const FORM_ID = "question-form";

interface Props {
  readonly field: QuestionField;
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
