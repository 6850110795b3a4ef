/** A chemical formula with subscripts. */
import { formatFormula } from "#src/lib/format/formula.ts";
import { Scripts } from "./Scripts.tsx";

export function Formula({ formula }: { formula: string }) {
  return (
    <span className="formula">
      <Scripts parts={formatFormula(formula)} />
    </span>
  );
}
