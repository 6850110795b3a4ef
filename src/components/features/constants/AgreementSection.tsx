/** How far the tables part at the energy, and values at a list of energies. */
import { Quantity } from "#src/components/ui/Quantity.tsx";
import { Mark } from "#src/components/ui/Mark.tsx";
import { formatGiven, formatPercent, formatSignedPercent } from "#src/lib/format/numbers.ts";
import { methodHref } from "#src/lib/format/method-links.ts";
import { TABULATION_NAMES } from "#src/lib/format/tabulations.ts";
import type { Technique } from "#src/lib/format/quantities.ts";
import type { ConstantsValues, RowView } from "#src/lib/lookup/view.ts";
import type { TabulationKey } from "#src/lib/physics/index.ts";
import { spreadShare } from "./AnswerSection.tsx";
import { CommitField } from "./CommitField.tsx";
import { EnergyListEditor } from "./EnergyListEditor.tsx";
import { faultOf } from "./QuestionSection.tsx";
import { SpreadRuler } from "./SpreadRuler.tsx";
import type { Lookup } from "./useLookup.ts";

export function AgreementSection({ lookup }: { lookup: Lookup }) {
  const { view, stale } = lookup;
  const row = view.main?.row;
  return (
    <section className="sec" aria-labelledby="agreement-heading">
      <div className="sec-head">
        <h2 id="agreement-heading">Agreement</h2>
        <small>
          <a href={methodHref("spread")}>Spread between tables</a>
        </small>
      </div>
      <div className={stale ? "sec-body stack chart-stale" : "sec-body stack"}>
        {row?.values ? (
          <Agreement row={row} tabulation={view.tabulation} />
        ) : (
          <p className="note">Values are needed first.</p>
        )}
      </div>
    </section>
  );
}

function Agreement({ row, tabulation }: { row: RowView; tabulation: TabulationKey }) {
  const others = (Object.keys(TABULATION_NAMES) as TabulationKey[]).filter((key) => key !== tabulation);
  const lines: {
    name: string;
    technique: Technique;
    value: number;
    pick: (values: { delta: number; beta: number; muTotalPerCm: number }) => number;
    span: readonly [number, number] | undefined;
  }[] = [
    {
      name: "δ",
      technique: "phase",
      value: row.values?.delta ?? 0,
      pick: (values) => values.delta,
      span: row.spread?.delta,
    },
    {
      name: "β",
      technique: "absorption",
      value: row.values?.beta ?? 0,
      pick: (values) => values.beta,
      span: row.spread?.beta,
    },
    {
      name: "μ",
      technique: "absorption",
      value: row.values?.muTotalPerCm ?? 0,
      pick: (values) => values.muTotalPerCm,
      span: row.spread?.muTotalPerCm,
    },
  ];
  const deviations = lines.map(({ value, pick }) =>
    others.map((key) => (row.tabulations[key] && value !== 0 ? pick(row.tabulations[key]) / value - 1 : null)),
  );
  const most = Math.max(0.01, ...deviations.flat().map((value) => Math.abs(value ?? 0)));
  const missing = others.filter((key) => row.tabulations[key] === null).map((key) => TABULATION_NAMES[key]);
  return (
    <div>
      <h3 className="sub">{`How far the tables part at ${formatGiven(row.energyKeV)} keV`}</h3>
      <table className="list list-flow agreement">
        <caption className="sr-only">{`Values of the other tables against ${TABULATION_NAMES[tabulation]}`}</caption>
        <thead>
          <tr>
            <th scope="col">Quantity</th>
            {others.map((key) => (
              <th key={key} scope="col" className="num">
                {TABULATION_NAMES[key]}
              </th>
            ))}
            <th scope="col" className="wide-only">{`−${formatPercent(most)} to +${formatPercent(most)}`}</th>
            <th scope="col" className="num">
              Spread
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map((line, index) => (
            <tr key={line.name}>
              <td>
                <Mark technique={line.technique}>{line.name}</Mark>
              </td>
              {others.map((key, at) => {
                const deviation = deviations[index]?.[at] ?? null;
                return (
                  <td key={key} className="num" data-label={TABULATION_NAMES[key]}>
                    {deviation === null ? "not covered" : formatSignedPercent(deviation)}
                  </td>
                );
              })}
              <td className="wide-only">
                <SpreadRuler deviations={deviations[index]?.filter((value) => value !== null) ?? []} most={most} />
              </td>
              <td className="num" data-label="Spread">
                {line.span && line.value !== 0 ? formatPercent(spreadShare(line.span, line.value)) : "one table"}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="note">{`Against ${TABULATION_NAMES[tabulation]}, which gives the values above. β leaves scattering out, μ keeps it.${missing.length > 0 ? ` Not covered here: ${missing.join(", ")}.` : ""}`}</p>
    </div>
  );
}

export function ListSection({ lookup }: { lookup: Lookup }) {
  const { view, question, change, stale } = lookup;
  const fault = faultOf(view, "list");
  return (
    <section className="sec" aria-labelledby="list-heading">
      <div className="sec-head">
        <h2 id="list-heading">At a list</h2>
        <small>List, pasted column or range</small>
      </div>
      <div className={stale ? "sec-body stack chart-stale" : "sec-body stack"}>
        <div className="row">
          <span className="without-script">
            Energies{" "}
            <CommitField
              field="list"
              label="List of energies"
              width="32ch"
              value={question.list}
              fault={fault}
              onCommit={(list) => change({ list })}
            />
          </span>
          <EnergyListEditor value={question.list} fault={fault} onCommit={(list) => change({ list })} />
        </div>
        {view.list.length > 0 ? <ListTable rows={view.list} /> : null}
      </div>
    </section>
  );
}

const LONG_LIST = 60;

/** Columns of the list; on a phone the first four stand. */
const LIST_COLUMNS = [
  { head: "δ", pick: (values: ConstantsValues) => values.delta, phone: true },
  { head: "β", pick: (values: ConstantsValues) => values.beta, phone: true },
  { head: "μ, cm⁻¹", pick: (values: ConstantsValues) => values.muTotalPerCm, phone: true },
  { head: "1/μ, mm", pick: (values: ConstantsValues) => values.attenuationLengthMm, phone: false },
  { head: "μ_en, cm⁻¹", pick: (values: ConstantsValues) => values.muEnergyAbsorptionPerCm, phone: false },
  { head: "δ/β", pick: (values: ConstantsValues) => values.deltaOverBeta, phone: false },
] as const;

function ListTable({ rows }: { rows: readonly RowView[] }) {
  const shown = rows.slice(0, LONG_LIST);
  return (
    <div>
      <table className="list list-tight list-keep">
        <caption className="sr-only">Values at the listed energies</caption>
        <thead>
          <tr>
            <th scope="col" className="num">
              keV
            </th>
            {LIST_COLUMNS.map(({ head, phone }) => (
              <th key={head} scope="col" className={phone ? "num" : "num wide-only"}>
                {head === "μ_en, cm⁻¹" ? (
                  <>
                    μ<sub>en</sub>, cm⁻¹
                  </>
                ) : (
                  head
                )}
              </th>
            ))}
            <th scope="col" className="wide-only">
              Notes
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.map((row, index) => (
            <tr key={index}>
              <td className="num">{formatGiven(row.energyKeV)}</td>
              {LIST_COLUMNS.map(({ head, pick, phone }) => (
                <td key={head} className={phone ? "num" : "num wide-only"}>
                  <Quantity value={row.values ? pick(row.values) : null} missing={row.values ? "none" : "no value"} />
                </td>
              ))}
              <td className="wide-only">{noteWords(row)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {rows.length > shown.length ? (
        <p className="note">{`The first ${LONG_LIST} of ${rows.length} energies; the CSV has them all.`}</p>
      ) : null}
    </div>
  );
}

function noteWords(row: RowView): string {
  if (row.edgeNear) return `near ${row.edgeNear.element} ${row.edgeNear.shell}`;
  if (row.notes.includes("belowOneKeV")) return "below 1 keV";
  return row.values ? "" : "not in the table";
}
