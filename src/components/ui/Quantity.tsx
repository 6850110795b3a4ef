/** A number with its unit: four significant digits, powers of ten as superscripts, "no value" in words. */
import { DEFAULT_DIGITS, formatSignificant, type NumberParts } from "#src/lib/format/numbers.ts";
import { unitParts } from "#src/lib/format/units.ts";
import { Scripts } from "./Scripts.tsx";

interface QuantityProps {
  value: number | null;
  /** Plain spelling, such as `1/cm` or `g/cm3`. */
  unit?: string | undefined;
  digits?: number | undefined;
  /** Words for a missing value. */
  missing?: string | undefined;
}

export function Quantity({ value, unit = "", digits = DEFAULT_DIGITS, missing = "no value" }: QuantityProps) {
  const parts = formatSignificant(value, digits);
  if (parts === null) return <span className="no-value">{missing}</span>;
  return (
    <>
      <span className="nowrap">
        <NumberText parts={parts} />
      </span>
      {unit !== "" && (
        <>
          {"\u00a0"}
          <Unit unit={unit} />
        </>
      )}
    </>
  );
}

export function NumberText({ parts: { mantissa, exponent } }: { parts: NumberParts }) {
  if (exponent === null) return <>{mantissa}</>;
  return (
    <>
      {mantissa}
      {"\u00a0×\u00a010"}
      <sup>{exponent < 0 ? `−${-exponent}` : exponent}</sup>
    </>
  );
}

export function Unit({ unit }: { unit: string }) {
  return (
    <span className="unit">
      <Scripts parts={unitParts(unit)} />
    </span>
  );
}
