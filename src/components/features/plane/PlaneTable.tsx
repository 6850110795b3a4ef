/** The table beside the plane: at most twelve energies and twelve distances, those of the picks among them. */
import { formatGiven } from "#src/lib/format/numbers.ts";
import { distanceText } from "#src/lib/format/plan-quantities.ts";
import { nearestIndex } from "./keys.ts";
import type { PlaneData } from "./types.ts";
import { forbiddenShort } from "./words.ts";

const MOST = 12;

interface Props {
  readonly data: PlaneData;
  /** Given, the table is opened and closed from outside. */
  readonly open?: boolean;
  readonly onToggle?: (open: boolean) => void;
}

export function PlaneTable({ data, open, onToggle }: Props) {
  const { energiesKeV, distancesM, values, forbidden, quantity, picks } = data;
  const places = picks.map((pick) => ({
    id: pick.id,
    i: nearestIndex(energiesKeV, pick.energyKeV),
    j: nearestIndex(distancesM, pick.distanceM),
  }));
  const rows = chosenRows(
    energiesKeV.length,
    places.map(({ i }) => i),
  );
  const columns = chosenRows(
    distancesM.length,
    places.map(({ j }) => j),
  );
  const name = `${quantity.label} by photon energy and distance`;
  return (
    <details
      className="as-table"
      {...(open === undefined ? {} : { open })}
      onToggle={(event) => onToggle?.(event.currentTarget.open)}
    >
      <summary data-shortcut="t">As a table</summary>
      <div className="scroll" tabIndex={0} role="region" aria-label={name}>
        <table className="list list-tight plane-table">
          <caption className="sr-only">{`${name}; ${rows.length} of ${energiesKeV.length} energies, ${columns.length} of ${distancesM.length} distances`}</caption>
          <thead>
            <tr>
              <th scope="col">Energy, keV</th>
              {columns.map((j) => (
                <th key={j} scope="col" className="num">
                  {distanceText(distancesM[j]!)}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((i) => (
              <tr key={i}>
                <th scope="row">{formatGiven(energiesKeV[i]!, 4)}</th>
                {columns.map((j) => {
                  const value = values[i]?.[j] ?? null;
                  const code = forbidden[i]?.[j] ?? null;
                  const here = places.filter((place) => place.i === i && place.j === j);
                  return (
                    <td key={j} className="num">
                      {value === null ? (code === null ? "no value" : null) : quantity.format(value)}
                      {here.map(({ id }) => (
                        <small key={id}>{`pick ${id}`}</small>
                      ))}
                      {code === null ? null : <small>{forbiddenShort(code)}</small>}
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

/** At most twelve of `count` indices: those asked for first, then both ends, then the middle of the widest gap, again and again. */
export function chosenRows(count: number, asked: readonly number[], most = MOST): number[] {
  if (count <= most) return Array.from({ length: count }, (_, index) => index);
  const kept = new Set<number>();
  for (const index of [...asked, 0, count - 1]) if (kept.size < most) kept.add(index);
  while (kept.size < most) {
    const inOrder = [...kept].sort((a, b) => a - b);
    let [widest, from] = [0, 0];
    inOrder.slice(1).forEach((index, order) => {
      const gap = index - inOrder[order]!;
      if (gap > widest) [widest, from] = [gap, inOrder[order]!];
    });
    if (widest < 2) break;
    kept.add(from + Math.floor(widest / 2));
  }
  return [...kept].sort((a, b) => a - b);
}
