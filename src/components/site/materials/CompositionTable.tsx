/** Elements of a material by mass, largest first, with a bar each. */
import { ShareBar } from "#src/components/ui/ShareBar.tsx";
import { significantText } from "#src/lib/format/numbers.ts";
import { elementBySymbol } from "#src/lib/physics/index.ts";

export function CompositionTable({ massFractions }: { massFractions: readonly (readonly [string, number])[] }) {
  return (
    <table className="list list-keep list-tight">
      <caption>Elements, by mass</caption>
      <thead>
        <tr>
          <th scope="col">Symbol</th>
          <th scope="col">Element</th>
          <th scope="col" className="num">
            Share
          </th>
          <th scope="col">
            <span className="sr-only">Bar</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {massFractions.map(([symbol, share]) => (
          <tr key={symbol}>
            <td>{symbol}</td>
            <td>{elementBySymbol(symbol)?.name}</td>
            <td className="num">{`${significantText(share * 100)}\u00a0%`}</td>
            <td>
              <ShareBar share={share} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
