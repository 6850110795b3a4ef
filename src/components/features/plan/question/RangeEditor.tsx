/** Energies or distances: what the setup offers, from one end to the other, or only those written. */
import { useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { InlineField, Setting } from "#src/components/features/question/Setting.tsx";
import { Segments } from "#src/components/ui/Segments.tsx";
import { liveReading } from "#src/lib/plans/read-live.ts";
import type { EditorProps } from "./props.ts";
import { endsOf, rangeOf } from "./range-text.ts";

const KINDS = [
  { value: "offered", label: "all the setup offers" },
  { value: "range", label: "any from, to" },
  { value: "list", label: "only these" },
] as const;
type Kind = (typeof KINDS)[number]["value"];

interface Props extends EditorProps {
  readonly field: "energies" | "distances";
  readonly title: string;
  readonly unit: string;
  /** Of the setup, in words and as text that a range begins with. */
  readonly offered: { readonly words: string; readonly text: string };
  readonly listLabel: string;
  readonly rangeNote: string;
  readonly help: string;
}

export function RangeEditor(props: Props) {
  const { field, question, unit, offered } = props;
  const written = question[field];
  const [kind, setKind] = useState<Kind>(written === "" ? "offered" : endsOf(written) ? "range" : "list");
  const [ends, setEnds] = useState(endsOf(written) ?? endsOf(offered.text) ?? { from: "", to: "" });
  const [list, setList] = useState(written === "" ? offered.text : written);
  const text = kind === "offered" ? "" : kind === "range" ? rangeOf(ends, unit) : list.trim();
  const reading = kind === "offered" ? null : liveReading({ ...question, [field]: text }, field);
  const understood = reading?.ok ? ` Read as ${reading.words}.` : "";
  const end = (which: "from" | "to", label: string) => (
    <InlineField
      field={field}
      label={label}
      width={10}
      value={ends[which]}
      reading={reading}
      onChange={(next) => setEnds((before) => ({ ...before, [which]: next }))}
    />
  );
  return (
    <BlankPanel
      field={field}
      title={props.title}
      takeText={kind === "offered" ? "Take all it offers" : "Take these"}
      width="medium"
      help={kind === "list" ? "Esc keeps the old value." : props.help}
      canTake={kind === "offered" || reading?.ok === true}
      onTake={() => props.onTake({ [field]: text })}
      onClose={props.onClose}
    >
      <Setting
        label="Rank"
        readings={{ [field]: reading }}
        note={
          kind === "range"
            ? `${props.rangeNote}${understood}`
            : kind === "list"
              ? `Commas or line ends part them.${understood}`
              : undefined
        }
      >
        <Segments
          label={props.title}
          name={`plan-${field}`}
          options={KINDS}
          value={kind}
          onChange={(value) => setKind(KINDS.find((choice) => choice.value === value)?.value ?? "offered")}
        />
        {kind === "offered" ? <span>{`${offered.words}.`}</span> : null}
        {kind === "range" ? (
          <span>
            {end("from", "From")} to {end("to", "To")}
          </span>
        ) : null}
        {kind === "list" ? (
          <span className="field">
            <label htmlFor={`plan-${field}-list`}>{props.listLabel}</label>
            <textarea
              id={`plan-${field}-list`}
              className="input"
              rows={3}
              value={list}
              aria-invalid={reading?.ok === false ? "true" : undefined}
              aria-describedby={reading?.ok === false ? `edit-${field}-fault` : undefined}
              onChange={(event) => setList(event.currentTarget.value)}
            />
          </span>
        ) : null}
      </Setting>
      <p className="note">{`The setup offers ${offered.words}.`}</p>
    </BlankPanel>
  );
}
