/** Materials by name, composition and density; on a phone a name and one line of the rest. */
import { Scripts } from "#src/components/ui/Scripts.tsx";
import { formatGiven } from "#src/lib/format/numbers.ts";
import { compositionParts, type ListedMaterial } from "./listing.ts";

const OTHER_NAMES_SHOWN = 4;

export function MaterialTable({ caption, items }: { caption: string; items: readonly ListedMaterial[] }) {
  return (
    <table className="list list-brief list-tight material-table">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">Name</th>
          <th scope="col">Composition</th>
          <th scope="col" className="num">
            g/cm³
          </th>
        </tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <tr key={item.id}>
            <td>
              <a href={`/materials/${item.id}`}>{item.name}</a>
              {item.alsoKnownAs.length > 0 && <small>{item.alsoKnownAs.slice(0, OTHER_NAMES_SHOWN).join(", ")}</small>}
            </td>
            <td>
              <Scripts parts={compositionParts(item)} />
            </td>
            <td className="num">
              {formatGiven(item.densityGCm3)}
              <span className="phone-only">{"\u00a0g/cm³"}</span>
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
