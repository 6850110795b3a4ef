/** The list of energies as text of several lines: numbers, a pasted column, or a range. */
import { useState } from "react";
import type { FieldFault } from "#src/lib/lookup/state-material.ts";
import { FaultWithFixes } from "#src/components/features/question/FaultWithFixes.tsx";

export function EnergyListEditor({
  value,
  fault,
  onCommit,
}: {
  value: string;
  fault: FieldFault | undefined;
  onCommit: (text: string) => void;
}) {
  const [editing, setEditing] = useState(false);
  const [text, setText] = useState(value);
  if (!editing) {
    return (
      <div className="needs-script stack">
        <p>
          <span className="figures">
            {value === "" ? "No energies" : value.length > 90 ? `${value.slice(0, 88)} …` : value.replace(/\n/g, ", ")}
          </span>{" "}
          <button
            type="button"
            className="btn-text"
            onClick={() => {
              setText(value);
              setEditing(true);
            }}
          >
            Edit list
          </button>
        </p>
        {fault ? <FaultWithFixes fault={fault} onFix={onCommit} /> : null}
      </div>
    );
  }
  return (
    <form
      className="needs-script stack list-editor"
      onSubmit={(event) => {
        event.preventDefault();
        onCommit(text.trim());
        setEditing(false);
      }}
    >
      <div className="field">
        <label htmlFor="energy-list">
          Energies or wavelengths, such as 8, 12, 20 keV, or 5 to 60 keV in 50 steps, or a pasted column
        </label>
        <textarea
          id="energy-list"
          className="input"
          rows={5}
          value={text}
          onChange={(event) => setText(event.currentTarget.value)}
          autoFocus
        />
      </div>
      <div className="actions">
        <button type="submit" className="btn btn-go">
          Take the list
        </button>
        <button type="button" className="btn" onClick={() => setEditing(false)}>
          Close
        </button>
      </div>
    </form>
  );
}
