/** The start page's look-up: sentence, the values people come for, the curve. */
import { EnergyChart } from "#src/components/features/chart/EnergyChart.tsx";
import { ResponsiveChart } from "#src/components/features/chart/ResponsiveChart.tsx";
import { ValueGroup } from "#src/components/ui/ValueList.tsx";
import { methodTopicHref } from "#src/lib/format/method-links.ts";
import { formatGiven, formatPercent, significantText } from "#src/lib/format/numbers.ts";
import { readableLength } from "#src/lib/format/units.ts";
import { curvesOf } from "#src/lib/lookup/curves.ts";
import { writeQuestion } from "#src/lib/lookup/question.ts";
import type { RowView, View } from "#src/lib/lookup/view.ts";
import { spreadShare } from "./AnswerSection.tsx";
import { Queries } from "./Queries.tsx";
import { QuestionSentence } from "./QuestionSection.tsx";
import { type Lookup, type LookupStart, useLookup } from "./useLookup.ts";

/** Materials to begin with, one a field of work. */
const CHIPS = [
  { id: "water", words: "Water" },
  { id: "hydroxyapatite", words: "Hydroxyapatite" },
  { id: "silica-fused", words: "Fused silica" },
  { id: "aluminium", words: "Aluminium" },
  { id: "titanium", words: "Titanium" },
];

export default function StartIsland({ start }: { start: LookupStart }) {
  return (
    <Queries>
      <Start start={start} />
    </Queries>
  );
}

function Start({ start }: { start: LookupStart }) {
  const lookup = useLookup(start);
  const { view, question, change, stale } = lookup;
  const row = view.main?.row ?? null;
  return (
    <div className="stack start">
      <div>
        <QuestionSentence lookup={lookup} plainAction="/" />
        <p className="chips start-chips">
          <span className="note">Or try</span>
          {CHIPS.map(({ id, words }) => (
            <a
              key={id}
              className="chip"
              href={`/?material=${id}`}
              aria-current={view.main?.keptId === id ? "true" : undefined}
              onClick={(event) => {
                event.preventDefault();
                change({ material: id, density: "", parts: "" });
              }}
            >
              {words}
            </a>
          ))}
        </p>
      </div>
      <div className="cols">
        <div className={stale ? "stack chart-stale" : "stack"} aria-busy={stale}>
          {row?.values && view.main ? (
            <StartValues row={row} view={view} />
          ) : (
            <p className="lead">There is no answer yet: a blank above needs mending.</p>
          )}
          <p className="actions">
            <a className="btn btn-go" href={`/constants?${writeQuestion(question)}`}>
              All constants
            </a>
          </p>
        </div>
        <StartChart lookup={lookup} />
      </div>
    </div>
  );
}

function StartValues({ row, view }: { row: RowView; view: View }) {
  const { values } = row;
  if (!values) return null;
  const length = readableLength(values.attenuationLengthMm);
  const half = readableLength(values.halfValueMm);
  const endless = "endless: nothing attenuates";
  return (
    <>
      <ValueGroup
        technique="phase"
        items={[
          { quantity: "delta", value: values.delta },
          { quantity: "phasePerMicrometreRad", value: values.phasePerMicrometreRad },
          { quantity: "criticalAngleMrad", value: values.criticalAngleMrad, missing: "none: δ is negative" },
          { quantity: "deltaOverBeta", value: values.deltaOverBeta, missing: "none" },
        ]}
      />
      <ValueGroup
        technique="absorption"
        items={[
          { quantity: "beta", value: values.beta },
          { quantity: "muTotalPerCm", value: values.muTotalPerCm },
          { quantity: "attenuationLengthMm", value: length.value, unit: length.unit, missing: endless },
          { quantity: "halfValueThicknessMm", value: half.value, unit: half.unit, missing: endless },
        ]}
      />
      <p className="note">
        {`Values from EPDL97${row.spread ? `; the tables differ by ${formatPercent(spreadShare(row.spread.delta, values.delta))} in δ and ${formatPercent(spreadShare(row.spread.beta, values.beta))} in β` : ""}${row.edgeNear ? `. Near the edge ${row.edgeNear.element} ${row.edgeNear.shell} at ${formatGiven(row.edgeNear.energyKeV)} keV` : ""}. `}
        <a href={methodTopicHref("tables")}>{`Tables ${view.tableVersion}`}</a>
      </p>
    </>
  );
}

function StartChart({ lookup }: { lookup: Lookup }) {
  const { view, change, stale } = lookup;
  const curves = curvesOf(view, "delta-beta");
  const cursorKeV =
    view.energyKeV !== null && view.energyKeV >= view.rangeKeV[0] && view.energyKeV <= view.rangeKeV[1]
      ? view.energyKeV
      : null;
  const readings = curves
    .map((curve) => `${curve.name} ${significantText(cursorKeV === null ? null : curve.atEnergy)}`)
    .join("; ");
  return (
    <ResponsiveChart
      stale={stale}
      served={{ wide: 600, narrow: 358 }}
      draw={(width) => (
        <EnergyChart
          width={width}
          rangeKeV={view.rangeKeV}
          curves={curves}
          edges={view.edges}
          strip={null}
          cursorKeV={cursorKeV}
          cursorText={cursorKeV === null ? "" : `${formatGiven(cursorKeV)} keV; ${readings}`}
          title="δ and β over photon energy, logarithmic"
          onMove={(energyKeV) => change({ energy: `${energyKeV} keV` })}
        />
      )}
    />
  );
}
