/** The table beside a chart: every point drawn, read in steps so that it stays short enough to read. */
import { type ChartCurve, valueAt } from "#src/components/features/chart/EnergyChart.tsx";
import { Quantity } from "#src/components/ui/Quantity.tsx";
import { formatGiven } from "#src/lib/format/numbers.ts";

const ROWS = 24;

export function CurveTable({ curves }: { curves: readonly ChartCurve[] }) {
  const first = curves[0];
  if (!first) return null;
  const step = Math.max(1, Math.ceil(first.energiesKeV.length / ROWS));
  const rows = first.energiesKeV
    .map((_, index) => index)
    .filter((index) => index % step === 0 || index === first.energiesKeV.length - 1);
  return (
    <details className="as-table">
      <summary>As a table</summary>
      <div className="scroll" tabIndex={0} role="region" aria-label="Curve as a table">
        <table className="list list-tight">
          <caption className="sr-only">The curves above, every {step}th point; the CSV has them all</caption>
          <thead>
            <tr>
              <th scope="col" className="num">
                keV
              </th>
              {curves.map((curve) => (
                <th key={curve.key} scope="col" className="num">{`${curve.name} ${curve.word}`}</th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((index) => (
              <tr key={index}>
                <td className="num">{formatGiven(first.energiesKeV[index] ?? 0, 5)}</td>
                {curves.map((curve) => (
                  <td key={curve.key} className="num">
                    <Quantity value={valueAt(curve, first.energiesKeV[index] ?? 0)} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
