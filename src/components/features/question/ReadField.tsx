/** A field whose text is read as it is typed: the value as understood, or what keeps it from being read. */
import { type Ref, useId } from "react";
import { Fault } from "#src/components/ui/Messages.tsx";
import { QuantityError } from "#src/lib/quantities/index.ts";

/** The value as understood, or what is wrong with it. */
export interface Reading {
  readonly ok: boolean;
  readonly words: string;
}

/** Runs `read`; a text that cannot be read gives its fault. */
export function attempt(read: () => string): Reading {
  try {
    return { ok: true, words: read() };
  } catch (error) {
    if (error instanceof QuantityError) return { ok: false, words: error.message };
    throw error;
  }
}

export function ReadField({
  ref,
  label,
  value,
  reading,
  onChange,
}: {
  ref?: Ref<HTMLInputElement>;
  label: string;
  value: string;
  reading: Reading | null;
  onChange: (text: string) => void;
}) {
  const id = useId();
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      <input
        ref={ref}
        id={id}
        className="input"
        type="text"
        value={value}
        maxLength={64}
        autoComplete="off"
        spellCheck={false}
        aria-invalid={reading?.ok === false ? "true" : undefined}
        aria-describedby={`${id}-reading`}
        onFocus={(event) => event.currentTarget.select()}
        onChange={(event) => onChange(event.currentTarget.value)}
      />
      <div id={`${id}-reading`} aria-live="polite">
        {reading === null ? null : reading.ok ? (
          <p className="note">{reading.words}</p>
        ) : (
          <Fault>{reading.words}</Fault>
        )}
      </div>
    </div>
  );
}
