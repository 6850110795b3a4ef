/** Absorption edges of a material, lowest first. */
import { methodHref } from "#src/lib/format/method-links.ts";
import { formatGiven } from "#src/lib/format/numbers.ts";
import type { EdgeView } from "#src/lib/lookup/view.ts";

export function EdgeTable({ edges, from, to }: { edges: readonly EdgeView[]; from: number; to: number }) {
  const range = `${from} to ${to} keV`;
  if (edges.length === 0) {
    return (
      <p>
        No <a href={methodHref("edges")}>absorption edge</a> between {range}.
      </p>
    );
  }
  return (
    <table className="list list-keep list-tight">
      <caption>Absorption edges, {range}</caption>
      <thead>
        <tr>
          <th scope="col">Element</th>
          <th scope="col">Shell</th>
          <th scope="col" className="num">
            keV
          </th>
        </tr>
      </thead>
      <tbody>
        {edges.map(({ element, shell, energyKeV }) => (
          <tr key={element + shell}>
            <td>{element}</td>
            <td>{shell}</td>
            <td className="num">{formatGiven(energyKeV)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
