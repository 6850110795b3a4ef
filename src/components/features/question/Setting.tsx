/** A line of an editor: what it sets at left, a sentence with fields at right, and below it what cannot be read. */
import type { ReactNode } from "react";
import { Fault } from "#src/components/ui/Messages.tsx";
import type { Reading } from "./ReadField.tsx";

/** The id of what is wrong with a field of an open editor; one editor is open at a time. */
const faultId = (field: string): string => `edit-${field}-fault`;

interface SettingProps {
  readonly label: string;
  /** Readings of the fields in the sentence, by their names. */
  readonly readings?: Readonly<Record<string, Reading | null>>;
  readonly note?: ReactNode;
  readonly children: ReactNode;
}

export function Setting({ label, readings = {}, note, children }: SettingProps) {
  return (
    <div className="setting">
      <b>{label}</b>
      <div className="setting-body">
        <div className="setting-line">{children}</div>
        <div aria-live="polite">
          {Object.entries(readings).map(([field, reading]) =>
            reading?.ok === false ? (
              <Fault key={field} id={faultId(field)}>
                {reading.words}
              </Fault>
            ) : null,
          )}
        </div>
        {note === undefined ? null : <p className="note">{note}</p>}
      </div>
    </div>
  );
}

interface FieldProps {
  readonly field: string;
  readonly label: string;
  readonly value: string;
  readonly reading?: Reading | null;
  /** In characters. */
  readonly width?: number;
  readonly placeholder?: string;
  /** Takes the focus when its panel opens. */
  readonly isFirst?: boolean;
  readonly onChange: (text: string) => void;
}

/** A field inside a sentence. */
export function InlineField({
  field,
  label,
  value,
  reading = null,
  width = 8,
  placeholder,
  isFirst = false,
  onChange,
}: FieldProps) {
  const invalid = reading?.ok === false;
  return (
    <input
      className="input-inline figures"
      style={{ width: `${width}ch` }}
      type="text"
      data-first={isFirst ? "" : undefined}
      aria-label={label}
      aria-invalid={invalid ? "true" : undefined}
      aria-describedby={invalid ? faultId(field) : undefined}
      value={value}
      maxLength={64}
      placeholder={placeholder}
      autoComplete="off"
      spellCheck={false}
      onFocus={(event) => event.currentTarget.select()}
      onChange={(event) => onChange(event.currentTarget.value)}
    />
  );
}
