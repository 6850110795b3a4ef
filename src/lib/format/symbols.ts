/** Symbols of quantities and constants with their indices. */
import type { ScriptPart } from "./units.ts";

/** Symbol as parts, the letters or digits after `_` as a subscript: `β_eff`, `δ/β_eff`, `m_e c²`. */
export function symbolParts(symbol: string): ScriptPart[] {
  return symbol
    .split(/_([A-Za-z0-9]+)/)
    .map((text, place) => ({ text, script: place % 2 === 1 ? ("sub" as const) : ("base" as const) }))
    .filter(({ text }) => text !== "");
}
