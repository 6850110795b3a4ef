/** Further materials beside the main one, and what sets the first two apart. */
import { useState } from "react";
import { Quantity } from "#src/components/ui/Quantity.tsx";
import { Mark } from "#src/components/ui/Mark.tsx";
import { formatGiven, significantText } from "#src/lib/format/numbers.ts";
import { methodHref } from "#src/lib/format/method-links.ts";
import type { View } from "#src/lib/lookup/view.ts";
import { FaultWithFixes } from "#src/components/features/question/FaultWithFixes.tsx";
import { MaterialCombobox } from "#src/components/features/question/MaterialCombobox.tsx";
import type { Lookup } from "./useLookup.ts";

export function CompareSection({ lookup }: { lookup: Lookup }) {
  const { view, question, change, stale } = lookup;
  const lines = question.with.split("\n").filter((line) => line.trim() !== "");
  const faults = view.faults.filter((fault) => fault.field === "with");
  return (
    <section className="sec" aria-labelledby="compare-heading">
      <div className="sec-head">
        <h2 id="compare-heading">Beside others</h2>
        <small>Up to eight materials; the first two make a pair</small>
      </div>
      <div className={stale ? "sec-body stack chart-stale" : "sec-body stack"}>
        {view.main && view.others.length > 0 ? (
          <MaterialsTable
            view={view}
            onRemove={(index) => change({ with: lines.filter((_, at) => at !== index).join("\n") })}
          />
        ) : null}
        {view.pair && view.main && view.others[0] ? <PairSentence view={view} /> : null}
        {faults.map((fault) => (
          <FaultWithFixes key={fault.message} fault={fault} onFix={() => undefined} />
        ))}
        <AddMaterials lookup={lookup} lines={lines} />
      </div>
    </section>
  );
}

function AddMaterials({ lookup, lines }: { lookup: Lookup; lines: readonly string[] }) {
  const [text, setText] = useState("");
  const [pasting, setPasting] = useState(false);
  const [rows, setRows] = useState("");
  const { change, learn } = lookup;
  const add = (line: string): void => {
    if (line.trim() !== "") change({ with: [...lines, line.trim()].join("\n") });
    setText("");
  };
  return (
    <div className="needs-script stack">
      <form
        className="row"
        onSubmit={(event) => {
          event.preventDefault();
          add(text);
        }}
      >
        <MaterialCombobox
          floating
          inputClass="input"
          label="Add a material: name, or formula; density"
          placeholder="Name, or formula; density"
          value={text}
          onChange={setText}
          onPick={(material) => {
            learn([material]);
            add(material.name);
          }}
        />
        <button type="submit" className="btn">
          Add beside
        </button>
        <button
          type="button"
          className="btn-text"
          onClick={() => {
            setRows(lines.join("\n"));
            setPasting((before) => !before);
          }}
        >
          Paste rows
        </button>
      </form>
      {pasting ? (
        <form
          className="stack"
          onSubmit={(event) => {
            event.preventDefault();
            change({ with: rows });
            setPasting(false);
          }}
        >
          <div className="field">
            <label htmlFor="pasted-rows">One material a line: name; formula; density. Or a handbook name.</label>
            <textarea
              id="pasted-rows"
              className="input"
              rows={5}
              value={rows}
              onChange={(event) => setRows(event.currentTarget.value)}
              autoFocus
            />
          </div>
          <div className="actions">
            <button type="submit" className="btn btn-go">
              Take the rows
            </button>
            <button type="button" className="btn" onClick={() => setPasting(false)}>
              Close
            </button>
          </div>
        </form>
      ) : null}
    </div>
  );
}

function MaterialsTable({ view, onRemove }: { view: View; onRemove: (index: number) => void }) {
  const materials = view.main ? [view.main, ...view.others] : view.others;
  return (
    <table className="list list-flow">
      <caption>{view.energyKeV === null ? "Materials" : `At ${formatGiven(view.energyKeV)} keV`}</caption>
      <thead>
        <tr>
          <th scope="col">Material</th>
          {["g/cm³", "δ", "β", "μ, cm⁻¹", "1/μ, mm", "δ/β"].map((head) => (
            <th key={head} scope="col" className="num">
              {head}
            </th>
          ))}
          <th scope="col" className="needs-script">
            <span className="sr-only">Change</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {materials.map((material, index) => {
          const values = material.row?.values ?? null;
          return (
            <tr key={index}>
              <td>{material.label}</td>
              <td
                className="num"
                data-label="g/cm³"
              >{`${formatGiven(material.densityGCm3, 5)}${material.densityEstimated ? " (estimate)" : ""}`}</td>
              <td className="num" data-label="δ">
                <Quantity value={values?.delta ?? null} />
              </td>
              <td className="num" data-label="β">
                <Quantity value={values?.beta ?? null} />
              </td>
              <td className="num" data-label="μ, cm⁻¹">
                <Quantity value={values?.muTotalPerCm ?? null} />
              </td>
              <td className="num" data-label="1/μ, mm">
                <Quantity value={values?.attenuationLengthMm ?? null} />
              </td>
              <td className="num" data-label="δ/β">
                <Quantity value={values?.deltaOverBeta ?? null} />
              </td>
              <td className="needs-script">
                {index > 0 ? (
                  <button
                    type="button"
                    className="btn btn-small"
                    onClick={() => onRemove(index - 1)}
                    aria-label={`Take out ${material.label}`}
                  >
                    Take out
                  </button>
                ) : null}
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function PairSentence({ view }: { view: View }) {
  const { pair } = view;
  if (!pair) return null;
  return (
    <p className="lead">
      {`${view.main?.label} less ${view.others[0]?.label}: `}
      <Mark technique="phase">Δδ</Mark> <b>{significantText(pair.deltaDelta)}</b>,{" "}
      <Mark technique="absorption">Δμ</Mark> <b>{`${significantText(pair.deltaMuPerCm)} cm⁻¹`}</b>,{" "}
      <a href={methodHref("gamma")}>γ</a> <b>{significantText(pair.gamma)}</b>
      {pair.gamma !== null && pair.gamma < 0
        ? ". The pair is opposed: one is denser to phase, the other to absorption."
        : "."}
    </p>
  );
}
