/** Curves over energy with their reading: δ and β, μ, δ/β, and for two materials their differences. */
import { useRef } from "react";
import { EnergyChart, type SpreadStrip } from "#src/components/features/chart/EnergyChart.tsx";
import { ResponsiveChart } from "#src/components/features/chart/ResponsiveChart.tsx";
import { Mark } from "#src/components/ui/Mark.tsx";
import { Segments } from "#src/components/ui/Segments.tsx";
import { formatGiven, significantText } from "#src/lib/format/numbers.ts";
import { CURVES, type Curve, writeQuestion } from "#src/lib/lookup/question.ts";
import { curvesOf } from "#src/lib/lookup/curves.ts";
import { CommitField } from "./CommitField.tsx";
import { CurveTable } from "./CurveTable.tsx";
import { faultOf } from "./QuestionSection.tsx";
import { savePicture } from "./savePicture.ts";
import type { Lookup } from "./useLookup.ts";

const CURVE_NAMES: Readonly<Record<Curve, string>> = {
  "delta-beta": "δ and β",
  attenuation: "μ",
  ratio: "δ/β",
  "pair-contrast": "Δδ and Δμ",
  "pair-gamma": "γ of the pair",
};

export function CurvesSection({ lookup }: { lookup: Lookup }) {
  const { view, question, change, stale } = lookup;
  const holder = useRef<HTMLDivElement>(null);
  const curves = curvesOf(view, question.curve);
  const strip: SpreadStrip | null =
    question.curve === "delta-beta" && view.main && view.others.length === 0
      ? { energiesKeV: view.main.curve.energiesKeV, ...view.curveSpread }
      : null;
  const cursorKeV =
    view.energyKeV !== null && view.energyKeV >= view.rangeKeV[0] && view.energyKeV <= view.rangeKeV[1]
      ? view.energyKeV
      : null;
  const readings = curves.map((curve) => ({ curve, value: cursorKeV === null ? null : curve.atEnergy }));
  const spoken =
    cursorKeV === null
      ? ""
      : `${formatGiven(cursorKeV)} keV; ${readings.map(({ curve, value }) => `${curve.name} ${view.others.length > 0 ? `${curve.word} ` : ""}${significantText(value)}`).join("; ")}`;
  const options = CURVES.filter((curve) => view.pairCurve || !curve.startsWith("pair")).map((curve) => ({
    value: curve,
    label: CURVE_NAMES[curve],
  }));
  const query = writeQuestion(question).toString();

  return (
    <section className="sec" aria-labelledby="curves-heading">
      <div className="sec-head">
        <h2 id="curves-heading">Over energy</h2>
        <small className="needs-script">Drag the line, or move it with the arrow keys</small>
      </div>
      <div className="sec-body">
        <div className="row row-apart">
          <p className="readout" aria-live="polite">
            <b>{cursorKeV === null ? "Energy outside the curve" : `${formatGiven(cursorKeV)}\u00a0keV`}</b>
            {readings.map(({ curve, value }) => (
              <span key={curve.key}>
                {curve.technique === "ink" ? (
                  <b>{curve.name}</b>
                ) : (
                  <Mark technique={curve.technique}>
                    {view.others.length > 0 ? `${curve.name} ${curve.word}` : curve.name}
                  </Mark>
                )}{" "}
                {significantText(value)}
              </span>
            ))}
          </p>
          <div className="needs-script">
            <Segments
              label="What is drawn"
              name="drawn"
              options={options}
              value={question.curve}
              onChange={(value) => change({ curve: CURVES.find((curve) => curve === value) ?? "delta-beta" })}
            />
          </div>
        </div>
        <div ref={holder}>
          <ResponsiveChart
            stale={stale}
            draw={(width) => (
              <EnergyChart
                width={width}
                rangeKeV={view.rangeKeV}
                curves={curves}
                edges={view.edges}
                strip={strip}
                cursorKeV={cursorKeV}
                cursorText={spoken}
                title={`${CURVE_NAMES[question.curve]} over photon energy, logarithmic`}
                onMove={(energyKeV) => change({ energy: `${energyKeV} keV` })}
              />
            )}
          />
        </div>
        <p className="note chart-note">
          {`Dotted upright lines: absorption edges.${strip ? " Lower strip: largest difference between tables, as a share of the value." : ""}${curves.some((curve) => curve.values.some((value) => value !== null && value < 0)) ? " Dotted stretches of a curve: negative, drawn by size." : ""}`}
        </p>
        <p className="row">
          <span>
            From{" "}
            <CommitField
              field="from"
              label="Curve from"
              value={question.from}
              fault={faultOf(view, "from")}
              onCommit={(from) => change({ from })}
            />{" "}
            to{" "}
            <CommitField
              field="to"
              label="Curve to"
              value={question.to}
              fault={faultOf(view, "to")}
              onCommit={(to) => change({ to })}
            />
          </span>
        </p>
        <div className="actions">
          <a className="btn btn-small" href={`/constants/export.svg?${query}`} download>
            Save SVG
          </a>
          <button
            type="button"
            className="btn btn-small needs-script"
            onClick={() => void savePicture(holder.current, `rimelight-${question.curve}`, view.tableVersion)}
          >
            Save PNG
          </button>
          <a className="btn btn-small" href={`/constants/curves.csv?${query}`} download>
            Save the curve as CSV
          </a>
        </div>
        <CurveTable curves={curves} />
      </div>
    </section>
  );
}
