/** Thickness, transmission and energy, each from the other two. */
import { formatGiven, formatPercent, significantText } from "#src/lib/format/numbers.ts";
import { methodHref } from "#src/lib/format/method-links.ts";
import { readableLength } from "#src/lib/format/units.ts";
import type { View } from "#src/lib/lookup/view.ts";
import { CommitField } from "./CommitField.tsx";
import { faultOf } from "./QuestionSection.tsx";
import type { Lookup } from "./useLookup.ts";

export function ThicknessSection({ lookup }: { lookup: Lookup }) {
  const { view, question, change, stale } = lookup;
  const { thickness } = view;
  if (!view.main || !thickness) return null;
  const length = readableLength(thickness.thicknessForTransmissionMm);
  const thicknessField = (
    <CommitField
      field="thickness"
      label="Thickness"
      value={question.thickness}
      fault={faultOf(view, "thickness")}
      onCommit={(text) => change({ thickness: text })}
    />
  );
  const passField = (
    <CommitField
      field="pass"
      label="Wanted transmission"
      width="7ch"
      value={question.pass}
      fault={faultOf(view, "pass")}
      onCommit={(text) => change({ pass: text })}
    />
  );
  const at = view.energyKeV === null ? "" : ` at ${formatGiven(view.energyKeV)} keV`;
  return (
    <section className="sec" aria-labelledby="thickness-heading">
      <div className="sec-head">
        <h2 id="thickness-heading">Thickness</h2>
        <small>
          By the <a href={methodHref("transmission")}>total attenuation</a>
        </small>
      </div>
      <div className={stale ? "sec-body stack chart-stale" : "sec-body stack"}>
        <p className="lead">
          {thicknessField} of it lets{" "}
          <b>{thickness.transmission === null ? "an unknown share" : transmissionText(thickness.transmission)}</b> of
          the beam pass{at}.
        </p>
        <p className="lead">
          {passField} of the beam passes{at} through{" "}
          <b>{length.value === null ? "any thickness" : `${significantText(length.value)} ${length.unit}`}</b>.
        </p>
        <p className="lead">{energySentence(view, question.thickness, question.pass)}</p>
        <p className="without-script">
          <button type="submit" form="question-form" className="btn btn-small">
            Show
          </button>
        </p>
      </div>
    </section>
  );
}

/** Nearly all and nearly nothing keep enough digits to tell them from all and nothing. */
function transmissionText(share: number): string {
  if (share > 0.999 && share < 1) return `all but ${formatPercent(1 - share, 2)}`;
  return share < 1e-4 ? `${significantText(share * 100)}\u00a0%` : formatPercent(share, 4);
}

function energySentence(view: View, thickness: string, pass: string): string {
  const energies = view.thickness?.energies;
  if (!energies || view.thickness?.thicknessMm == null) return "At which energy that share passes cannot be said yet.";
  const range = `${formatGiven(view.rangeKeV[0])} and ${formatGiven(view.rangeKeV[1])} keV`;
  if (energies.length === 0) return `No energy between ${range} lets ${pass} pass through ${thickness}.`;
  const words = energies.map(
    ({ energyKeV, atEdge }) => `${formatGiven(energyKeV, 4)} keV${atEdge ? " (the jump of an edge)" : ""}`,
  );
  const list = words.length === 1 ? words[0] : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`;
  return `Between ${range}, ${thickness} lets ${pass} pass at ${list}.`;
}
