/** What is typed, read live as a formula: its mass and shares, or what keeps it from being one. */
import { mendedFormula } from "#src/lib/lookup/mend.ts";
import { Formula } from "#src/components/ui/Formula.tsx";
import { Fault } from "#src/components/ui/Messages.tsx";
import { compositionText } from "#src/lib/format/formula.ts";
import { formatGiven } from "#src/lib/format/numbers.ts";
import { looksLikeFormula } from "#src/lib/lookup/state-material.ts";
import { compositionOfFormula, elementByNumber, FormulaError, parseFormula } from "#src/lib/physics/index.ts";

export type FormulaRead = { readonly formula: ReturnType<typeof parseFormula> } | { readonly error: FormulaError };

/** Null for an empty text. */
export function readAsFormula(text: string): FormulaRead | null {
  if (text.trim() === "") return null;
  try {
    return { formula: parseFormula(text.trim()) };
  } catch (error) {
    if (error instanceof FormulaError) return { error };
    throw error;
  }
}

/** True where the text means to be a formula and is not one. */
export const isBrokenFormula = (reading: FormulaRead | null, text: string): boolean =>
  reading !== null && "error" in reading && looksLikeFormula(text);

interface Props {
  readonly text: string;
  /** Null before anything is typed. */
  readonly reading: FormulaRead | null;
  /** What comes after a formula that was read. */
  readonly then: string;
  readonly onMend: (text: string) => void;
}

export function FormulaReading({ text, reading, then, onMend }: Props) {
  if (reading === null) return <p className="note">A name such as kapton, or a formula such as CuSO4·5H2O.</p>;
  if ("formula" in reading) {
    return (
      <p>
        As a formula: <Formula formula={reading.formula.text} />, {formatGiven(reading.formula.molarMassGPerMol, 6)}{" "}
        g/mol, {compositionText(fractionsOf(reading.formula.text), 4)}. {then}
      </p>
    );
  }
  if (!looksLikeFormula(text))
    return <p className="note">Not a formula. Choose from the list, or write one such as SiO2.</p>;
  return (
    <div>
      <p className="note">As a formula:</p>
      <p className="fault-place" aria-hidden="true">
        {`${text.trim()}\n${" ".repeat(Math.max(0, reading.error.position - 1))}^`}
      </p>
      <Fault>{reading.error.message}</Fault>
      <span className="chips">
        {reading.error.suggestions.slice(0, 2).map((suggestion) => (
          <button
            key={suggestion}
            type="button"
            className="chip"
            onClick={() => onMend(mendedFormula(text, reading.error, suggestion))}
          >
            {mendedFormula(text, reading.error, suggestion)}
          </button>
        ))}
      </span>
    </div>
  );
}

function fractionsOf(text: string): Record<string, number> {
  return Object.fromEntries(
    [...compositionOfFormula(parseFormula(text)).massFractions].map(([atomicNumber, share]) => [
      elementByNumber(atomicNumber).symbol,
      share,
    ]),
  );
}
