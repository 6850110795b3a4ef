/** A faulty formula with a suggestion put in: suggestions are whole formulas, or a symbol for the one at fault. */
import type { FormulaError } from "#src/lib/physics/index.ts";

export function mendedFormula(text: string, error: FormulaError, suggestion: string): string {
  if (error.code !== "unknownElement" && error.code !== "foreignLetter") return suggestion;
  const plain = text.trim();
  const rest = plain.slice(error.position - 1).replace(/^(?:[A-Z][a-z]?|.)/u, suggestion);
  return plain.slice(0, error.position - 1) + rest;
}
