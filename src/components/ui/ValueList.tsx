/** Named values with dotted leaders; each name links to the paragraph that says how the value is made. */
import type { ReactNode } from "react";
import { methodHref } from "#src/lib/format/method-links.ts";
import { QUANTITIES, type QuantityKey, type Technique } from "#src/lib/format/quantities.ts";
import { symbolParts } from "#src/lib/format/symbols.ts";
import { Mark } from "./Mark.tsx";
import { Quantity } from "./Quantity.tsx";
import { Scripts } from "./Scripts.tsx";

export interface ValueItem {
  quantity: QuantityKey;
  value: number | null;
  /** Where it differs from the quantity's own, for example a length in a better unit. */
  unit?: string | undefined;
  digits?: number | undefined;
  /** Second line under the value: its spread or a note. */
  note?: ReactNode;
  missing?: string | undefined;
}

export function ValueList({ items }: { items: readonly ValueItem[] }) {
  return (
    <dl className="values">
      {items.map((item) => (
        <div key={item.quantity}>
          <dt>
            <span>
              <a href={methodHref(item.quantity)}>{QUANTITIES[item.quantity].name}</a>
              {"\u00a0"}
              <Symbol quantity={item.quantity} />
            </span>
          </dt>
          <dd>
            <Quantity
              value={item.value}
              unit={item.unit ?? QUANTITIES[item.quantity].unit}
              digits={item.digits}
              missing={item.missing}
            />
            {item.note !== undefined && <small>{item.note}</small>}
          </dd>
        </div>
      ))}
    </dl>
  );
}

export function Symbol({ quantity }: { quantity: QuantityKey }) {
  const { symbol } = QUANTITIES[quantity];
  if (symbol === "") return null;
  return (
    <i>
      <Scripts parts={symbolParts(symbol)} />
    </i>
  );
}

const TECHNIQUE_NAMES: Record<Technique, string> = { phase: "Phase", absorption: "Absorption" };

/** A value list under its technique's mark. */
export function ValueGroup({ technique, items }: { technique: Technique; items: readonly ValueItem[] }) {
  return (
    <section>
      <h3 className="sub values-head">
        <Mark technique={technique}>{TECHNIQUE_NAMES[technique]}</Mark>
      </h3>
      <ValueList items={items} />
    </section>
  );
}
