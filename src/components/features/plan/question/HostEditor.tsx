/** Thickness of the host and the layers around it: one editor for both blanks, in the order in which the beam meets them. */
import { useDeferredValue, useRef, useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { useNamedMaterials } from "#src/components/features/question/useNamedMaterials.ts";
import { Fault } from "#src/components/ui/Messages.tsx";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { planWords } from "#src/lib/plans/words.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import {
  added,
  type LayerRow,
  layersOf,
  mirrored,
  moved,
  type RowFault,
  rowFault,
  rowsOf,
  wholeText,
} from "./layer-rows.ts";
import { LayerRowFields } from "./LayerRowFields.tsx";
import { LayersStrip } from "./LayersStrip.tsx";
import type { EditorProps } from "./props.ts";
import { useDraft } from "./useDraft.ts";

const FEATURES = { sphere: "sphere", fibre: "fibre", layer: "layer" } as const;

export function HostEditor({ field, question, known, learn, onTake, onClose }: EditorProps) {
  const draft = useDraft(question);
  const [rows, setRows] = useState(() => rowsOf(question.layers));
  const [told, setTold] = useState("");
  const hostField = useRef<HTMLInputElement>(null);
  const named = useNamedMaterials(
    useDeferredValue(rows).flatMap(({ isHost, material }) => (isHost ? [] : [material])),
    known,
  );
  const finder = materialFinder([...known, ...named.found]);
  const { host: hostName } = planWords(draft.question, (words) => finder.find(words));
  const reading = draft.reading("thickness");
  const layers = rows.length - 1;
  const isFull = layers >= PLAN_LIMITS.layers;
  const isOneSided = layers > 0 && (rows[0]?.isHost === true || rows.at(-1)?.isHost === true);
  const mayMirror = isOneSided && layers * 2 <= PLAN_LIMITS.layers;
  const faultOf = (row: LayerRow): RowFault | null => {
    const fault = row.isHost ? null : rowFault(row, finder);
    // A name that is being asked for is not yet unknown.
    return named.pending && fault?.field !== "thickness" ? null : fault;
  };
  const faults = new Map(rows.map((row) => [row.id, faultOf(row)]));
  const whole = wholeText(rows.map((row) => (row.isHost ? draft.question.thickness : row.thickness)));

  const move = (index: number, step: -1 | 1): void => {
    const row = rows[index] as LayerRow;
    const next = moved(rows, index, step);
    setRows(next);
    const at = next.indexOf(row);
    const side = at < next.findIndex(({ isHost }) => isHost) ? "before" : "after";
    setTold(`${row.material || "The layer"} is now number ${at + 1} of ${next.length}, ${side} the host.`);
  };
  const update = (id: number, fields: Partial<LayerRow>): void =>
    setRows((before) => before.map((row) => (row.id === id ? { ...row, ...fields } : row)));

  return (
    <BlankPanel
      field={field}
      title="What the beam passes, in order"
      takeText="Take these layers"
      width="wide"
      help="Layers before the host take photons before they reach it; layers after it take photons that have left their dose. Alt with ↑ or ↓ moves a row."
      canTake={reading?.ok === true && [...faults.values()].every((fault) => fault === null)}
      onTake={() => onTake({ ...draft.taken("thickness"), layers: layersOf(rows) })}
      onClose={onClose}
    >
      <LayersStrip rows={rows} hostThickness={draft.question.thickness} hostName={hostName} />
      <table className="list list-tight layers-table">
        <caption className="sr-only">Layers and host in beam order</caption>
        <thead>
          <tr>
            <th scope="col">Order</th>
            <th scope="col">Material</th>
            <th scope="col">Thickness</th>
            <th scope="col">Density, g/cm³</th>
            <th scope="col">
              <span className="sr-only">Change</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) =>
            row.isHost ? (
              <tr key={row.id} data-chosen>
                <td className="layer-order">{`${index + 1}, host`}</td>
                <td className="layer-material">
                  <b>{hostName}</b> <span className="note">{`holds the ${FEATURES[question.shape]}`}</span>
                </td>
                <td data-label="Thickness">
                  <input
                    ref={hostField}
                    data-first={field === "thickness" ? "" : undefined}
                    className="input-inline figures"
                    style={{ width: "8ch" }}
                    type="text"
                    aria-label="Thickness of the host"
                    aria-invalid={reading?.ok === false ? "true" : undefined}
                    aria-describedby="host-thickness-reading"
                    value={draft.text("thickness")}
                    maxLength={32}
                    autoComplete="off"
                    onFocus={(event) => event.currentTarget.select()}
                    onChange={(event) => draft.type("thickness")(event.currentTarget.value)}
                  />
                </td>
                <td />
                <td>
                  <span className="note">always there</span>
                </td>
              </tr>
            ) : (
              <LayerRowFields
                key={row.id}
                row={row}
                index={index}
                isLast={index === rows.length - 1}
                fault={faults.get(row.id) ?? null}
                onChange={(fields) => update(row.id, fields)}
                onPick={(material) => {
                  learn([material]);
                  update(row.id, { material: material.name, density: "" });
                }}
                onMove={(step) => move(index, step)}
                onRemove={() => {
                  setRows((before) => before.filter(({ id }) => id !== row.id));
                  // The button that had the focus is gone.
                  hostField.current?.focus();
                }}
              />
            ),
          )}
        </tbody>
      </table>
      <div id="host-thickness-reading" aria-live="polite">
        {reading?.ok === false ? (
          <Fault>{reading.words}</Fault>
        ) : (
          <p className="note">{whole === null ? "" : `Together ${whole} along the beam.`}</p>
        )}
      </div>
      <p className="sr-only" role="status">
        {told}
      </p>
      <p className="actions layers-actions">
        {(["before", "after"] as const).map((side) => (
          <button
            key={side}
            type="button"
            className="btn btn-small"
            aria-disabled={isFull}
            onClick={() => (isFull ? undefined : setRows((before) => added(before, side)))}
          >
            {`Add a layer ${side}`}
          </button>
        ))}
        <button
          type="button"
          className="btn btn-small"
          aria-disabled={!mayMirror}
          onClick={() => (mayMirror ? setRows(mirrored) : undefined)}
        >
          Same walls on both sides
        </button>
        {isFull ? <span className="note">{`At most ${PLAN_LIMITS.layers} layers are taken.`}</span> : null}
      </p>
    </BlankPanel>
  );
}
