/** Which tabulation gives the values; the others stay beside it as spread. */
import { Segments } from "#src/components/ui/Segments.tsx";
import { TABULATION_NAMES } from "#src/lib/format/tabulations.ts";
import { methodTopicHref } from "#src/lib/format/method-links.ts";
import { TABULATION_KEYS } from "#src/lib/physics/index.ts";
import { FORM_ID } from "./CommitField.tsx";
import type { Lookup } from "./useLookup.ts";

const OPTIONS = TABULATION_KEYS.map((key) => ({ value: key, label: TABULATION_NAMES[key] }));

export function TableChoice({ lookup }: { lookup: Lookup }) {
  const { question, change, view } = lookup;
  return (
    <section className="sec" aria-labelledby="table-heading">
      <div className="sec-head">
        <h2 id="table-heading">Table</h2>
        <small>
          <a href={methodTopicHref("tables")}>Where the tables come from</a>
        </small>
      </div>
      <div className="sec-body stack">
        <div className="row">
          <span>Values from</span>
          <span className="needs-script">
            <Segments
              label="Table that gives the values"
              name="table-choice"
              options={OPTIONS}
              value={question.table}
              onChange={(value) => change({ table: TABULATION_KEYS.find((key) => key === value) ?? "epdl97" })}
            />
          </span>
          <span className="without-script">
            <select
              className="slot-field"
              name="table"
              form={FORM_ID}
              defaultValue={question.table}
              aria-label="Table that gives the values"
            >
              {OPTIONS.map((option) => (
                <option key={option.value} value={option.value}>
                  {option.label}
                </option>
              ))}
            </select>
          </span>
        </div>
        <p className="note">{`Tables, version ${view.tableVersion}: EPDL97 (Cullen, Hubbell, Kissel 1997), Henke, Gullikson, Davis 1993, Chantler 1995. Scattering and energy absorption come from EPDL97 for all three.`}</p>
      </div>
    </section>
  );
}
