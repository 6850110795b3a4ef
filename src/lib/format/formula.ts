/** Chemical formulas set with subscripts, and compositions in words. Takes formulas the parser has accepted. */
import { formatPercent } from "./numbers.ts";
import type { ScriptPart } from "./units.ts";

/**
 * Formula to parts: numbers after an element or a closing bracket are subscripts, numbers that lead a group after the dot
 * of a hydrate stay on the line. `*` and `·` both give the dot.
 * @example formatFormula("CuSO4·5H2O") // C u S O ₄ · 5 H ₂ O
 */
export function formatFormula(formula: string): ScriptPart[] {
  const parts: ScriptPart[] = [];
  let counts = false;
  for (const [token] of withPlainDigits(formula).matchAll(/\d+(?:\.\d+)?|\.\d+|[^\d]/g)) {
    if (/^\.?\d/.test(token) && counts) {
      parts.push({ text: token, script: "sub" });
      counts = false;
      continue;
    }
    const text = token === "*" ? "·" : token;
    const last = parts.at(-1);
    if (last?.script === "base") parts[parts.length - 1] = { text: last.text + text, script: "base" };
    else parts.push({ text, script: "base" });
    counts = /[A-Za-z)\]]/.test(token);
  }
  return parts;
}

/** Formula as one line of text with Unicode subscripts where they are whole numbers: `C₅H₈O₂`, `Ni₀.₈` keeps its point. */
export function formulaText(formula: string): string {
  return formatFormula(formula)
    .map(({ text, script }) =>
      script === "sub" ? text.replace(/\d/g, (digit) => "₀₁₂₃₄₅₆₇₈₉"[Number(digit)] ?? digit) : text,
    )
    .join("");
}

/** Mass fractions in words, largest first: `O 88.8 %, H 11.2 %`. */
export function compositionText(massFractions: Readonly<Record<string, number>>, digits: number = 3): string {
  return Object.entries(massFractions)
    .sort(([, first], [, second]) => second - first)
    .map(([symbol, share]) => `${symbol}\u00a0${formatPercent(share, digits)}`)
    .join(", ");
}

function withPlainDigits(formula: string): string {
  return formula.replace(/[₀-₉]/g, (digit) => String("₀₁₂₃₄₅₆₇₈₉".indexOf(digit)));
}
