/** Shape and size of the feature: one editor for both blanks. */
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { Choice } from "#src/components/features/question/Choice.tsx";
import { InlineField, Setting } from "#src/components/features/question/Setting.tsx";
import type { Shape } from "#src/lib/plans/question.ts";
import type { LiveField } from "#src/lib/plans/read-live.ts";
import type { EditorProps } from "./props.ts";
import { useDraft } from "./useDraft.ts";

const DRAWINGS: Readonly<Record<Shape, string>> = {
  sphere: "M33 22a15 15 0 1 0 30 0a15 15 0 1 0 -30 0z",
  fibre: "M4 30L84 6l6 9L10 39z",
  layer: "M24 8h48v28H24z",
};
const SHAPES = (
  [
    { value: "sphere", label: "Sphere", about: "a grain, a pore, a bubble" },
    { value: "fibre", label: "Fibre", about: "a long rod, a wire, a crack tip" },
    { value: "layer", label: "Layer", about: "a film or wall seen edge on" },
  ] as const
).map((option) => ({
  ...option,
  drawing: (
    <svg className="shape-drawing" viewBox="0 0 96 44" width="96" height="44" aria-hidden="true">
      <path d={DRAWINGS[option.value]} />
    </svg>
  ),
}));

/** Fields that a shape has. */
const FIELDS: Readonly<Record<Shape, readonly LiveField[]>> = {
  sphere: ["size"],
  fibre: ["size", "length"],
  layer: ["size", "width", "length"],
};

export function ShapeEditor({ field, question, onTake, onClose }: EditorProps) {
  const draft = useDraft(question);
  const { shape } = draft.question;
  const fields = FIELDS[shape];
  const input = (name: "size" | "length" | "width", label: string, placeholder?: string) => (
    <InlineField
      field={name}
      label={label}
      value={draft.text(name)}
      reading={draft.reading(name)}
      placeholder={placeholder ?? ""}
      isFirst={name === "size" && field === "size"}
      onChange={draft.type(name)}
    />
  );
  return (
    <BlankPanel
      field={field}
      title="Shape and size of what you look for"
      takeText="Take it"
      help="Enter takes it and opens the next blank. Esc keeps the old value."
      width="medium"
      canTake={draft.reads(...fields)}
      onTake={() => onTake(draft.taken("shape", "size", "length", "width"))}
      onClose={onClose}
    >
      <Choice
        inRow
        label="Shape"
        name="plan-shape"
        options={SHAPES}
        value={shape}
        onChange={(value) => draft.set({ shape: value })}
      />
      <Setting
        label={shape === "layer" ? "Layer" : shape === "fibre" ? "Fibre" : "Sphere"}
        readings={Object.fromEntries(fields.map((name) => [name, draft.reading(name)]))}
        note={
          shape === "layer"
            ? "Five depths of its length if left empty. “20um”, “0.02 mm” and “20000 nm” are all read."
            : `Diameter, not radius.${shape === "fibre" ? " Five diameters of its length if left empty." : ""} “20um”, “0.02 mm” and “20000 nm” are all read.`
        }
      >
        {shape === "sphere" ? <span>{input("size", "Diameter of the sphere")} across.</span> : null}
        {shape === "fibre" ? (
          <span>
            {input("size", "Diameter of the fibre")} across, {input("length", "Length of the fibre used", "5 ×")} of its
            length seen at once.
          </span>
        ) : null}
        {shape === "layer" ? (
          <span>
            {input("size", "Depth along the beam")} along the beam, {input("width", "Width across the beam")} across it,{" "}
            {input("length", "Length of the layer used", "5 ×")} long.
          </span>
        ) : null}
      </Setting>
    </BlankPanel>
  );
}
