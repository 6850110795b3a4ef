/** Values at the question's energy in two groups, phase and absorption, with what the tables say of each other. */
import { useCopy } from "#src/components/ui/useCopy.ts";
import { ValueGroup } from "#src/components/ui/ValueList.tsx";
import { methodHref, NOTE_EXPLANATIONS } from "#src/lib/format/method-links.ts";
import { formatGiven, formatPercent, significantText } from "#src/lib/format/numbers.ts";
import { TABULATION_NAMES } from "#src/lib/format/tabulations.ts";
import { readableLength } from "#src/lib/format/units.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import { writeQuestion } from "#src/lib/lookup/question.ts";
import type { ConstantsValues, MaterialView, RowView, View } from "#src/lib/lookup/view.ts";

export function AnswerSection({ view, question, stale }: { view: View; question: Question; stale: boolean }) {
  const { main } = view;
  const row = main?.row ?? null;
  return (
    <section className="sec" aria-labelledby="answer-heading">
      <div className="sec-head">
        <h2 id="answer-heading">Answer</h2>
        <small>{`Values from ${TABULATION_NAMES[view.tabulation]}`}</small>
      </div>
      <div className={stale ? "sec-body chart-stale" : "sec-body"} aria-busy={stale}>
        {main && row?.values ? (
          <>
            <Values values={row.values} main={main} />
            <SpreadSentence row={row} />
            <Notes row={row} main={main} />
            <AnswerActions main={main} row={row} values={row.values} question={question} version={view.tableVersion} />
          </>
        ) : (
          <p className="lead">
            {row
              ? `${TABULATION_NAMES[view.tabulation]} has no values of ${main?.missing.join(", ") ?? "this material"} at this energy.`
              : "There is no answer yet: a blank above needs mending."}
          </p>
        )}
      </div>
    </section>
  );
}

export function Values({
  values,
  main,
}: {
  values: ConstantsValues;
  main: Pick<MaterialView, "electronDensityPerA3">;
}) {
  const length = readableLength(values.attenuationLengthMm);
  const half = readableLength(values.halfValueMm);
  const endless = "endless: nothing attenuates";
  return (
    <div className="values-pair">
      <ValueGroup
        technique="phase"
        items={[
          { quantity: "delta", value: values.delta },
          { quantity: "phasePerMicrometreRad", value: values.phasePerMicrometreRad },
          { quantity: "twoPiMicrometre", value: values.twoPiMicrometre, missing: "none" },
          { quantity: "criticalAngleMrad", value: values.criticalAngleMrad, missing: "none: δ is negative" },
          { quantity: "electronDensityPerA3", value: main.electronDensityPerA3 },
          { quantity: "deltaOverBeta", value: values.deltaOverBeta, missing: "none" },
          { quantity: "deltaOverBetaEffective", value: values.deltaOverBetaEffective, missing: "none" },
        ]}
      />
      <ValueGroup
        technique="absorption"
        items={[
          { quantity: "beta", value: values.beta },
          { quantity: "betaEffective", value: values.betaEffective },
          { quantity: "muTotalPerCm", value: values.muTotalPerCm },
          { quantity: "muPhotoPerCm", value: values.muPhotoPerCm },
          { quantity: "muCoherentPerCm", value: values.muCoherentPerCm },
          { quantity: "muIncoherentPerCm", value: values.muIncoherentPerCm },
          { quantity: "muEnergyAbsorptionPerCm", value: values.muEnergyAbsorptionPerCm },
          { quantity: "attenuationLengthMm", value: length.value, unit: length.unit, missing: endless },
          { quantity: "halfValueThicknessMm", value: half.value, unit: half.unit, missing: endless },
        ]}
      />
    </div>
  );
}

/** Greatest difference between two tables, as a share of the value shown. */
export const spreadShare = (span: readonly [number, number], value: number): number =>
  (span[1] - span[0]) / Math.abs(value);

function SpreadSentence({ row }: { row: RowView }) {
  const { values, spread, tabulations } = row;
  if (!values) return null;
  const covering = Object.entries(tabulations).filter(([, value]) => value !== null).length;
  return (
    <p className="note answer-note">
      {spread ? (
        <>
          {`${covering === 3 ? "The three" : "The two"} tables that cover this energy differ by ${formatPercent(spreadShare(spread.delta, values.delta))} in δ, ${formatPercent(spreadShare(spread.beta, values.beta))} in β and ${formatPercent(spreadShare(spread.muTotalPerCm, values.muTotalPerCm))} in μ. `}
          <a href={methodHref("spread")}>What that means</a>
        </>
      ) : (
        "Only one table covers this energy, so no spread can be given."
      )}
    </p>
  );
}

function Notes({ row, main }: { row: RowView; main: MaterialView }) {
  const { edgeNear } = row;
  return (
    <>
      {row.notes.map((note) => (
        <p key={note} className="note">
          {note === "nearEdge" && edgeNear
            ? `Within ${formatGiven(Math.abs(row.energyKeV - edgeNear.energyKeV) * 1000, 3)} eV of ${edgeNear.element} ${edgeNear.shell} (${formatGiven(edgeNear.energyKeV)} keV). `
            : ""}
          {NOTE_EXPLANATIONS[note].text} <a href={`/method#${NOTE_EXPLANATIONS[note].anchor}`}>More on this</a>
        </p>
      ))}
      <p className="note">{`Density adds ± ${formatGiven(main.densityUncertaintyPercent)} % to each of δ, β and μ${main.densityUncertaintyPercent === 1 ? ", unless it is known better" : ""}.`}</p>
    </>
  );
}

function AnswerActions({
  main,
  row,
  values,
  question,
  version,
}: {
  main: MaterialView;
  row: RowView;
  values: ConstantsValues;
  question: Question;
  version: string;
}) {
  const query = writeQuestion(question).toString();
  const sentence = `${main.label}, ${formatGiven(main.densityGCm3)} g/cm³${main.densityEstimated ? " (estimate)" : ""}, at ${formatGiven(row.energyKeV)} keV: δ ${significantText(values.delta)}, β ${significantText(values.beta)}, μ ${significantText(values.muTotalPerCm)} cm⁻¹ (total), δ/β ${significantText(values.deltaOverBeta)}. Rimelight tables ${version}, EPDL97 (Cullen, Hubbell, Kissel 1997), ${new Date().toISOString().slice(0, 10)}.`;
  const { copy, said } = useCopy(sentence);
  return (
    <div className="actions">
      <button type="button" className="btn btn-go needs-script" onClick={copy}>
        Copy as a sentence
      </button>
      <a className="btn" href={`/constants/export.csv?${query}`} download>
        Save CSV
      </a>
      <a className="btn" href={`/constants/export.json?${query}`} download>
        Save JSON
      </a>
      <span className="note" role="status">
        {said}
      </span>
    </div>
  );
}
