/** Units as they are written on pages: text with real exponents, split so that exponents can stand as superscripts. */

export type ScriptPart = { readonly text: string; readonly script: "base" | "sup" | "sub" };

/**
 * Unit in plain spelling to parts: a trailing integer after a letter is an exponent, `1/x` becomes `x⁻¹`.
 * @example unitParts("1/cm") // cm with superscript −1; unitParts("g/cm3") // g/cm with superscript 3
 */
export function unitParts(unit: string): ScriptPart[] {
  const reciprocal = /^1\/([a-zA-ZµÅ]+)(\d?)$/.exec(unit);
  if (reciprocal !== null) {
    return [
      { text: reciprocal[1] ?? "", script: "base" },
      { text: `−${reciprocal[2] || "1"}`, script: "sup" },
    ];
  }
  return [...unit.matchAll(/([^\d]+)(\d+)?/g)].flatMap(([, text = "", power]) => [
    { text, script: "base" } as const,
    ...(power === undefined ? [] : [{ text: power, script: "sup" } as const]),
  ]);
}

/** The same as one line of text: `cm⁻¹`, `g/cm³`. */
export function unitText(unit: string): string {
  const superscripts: Record<string, string> = { "−": "⁻", "1": "¹", "2": "²", "3": "³", "4": "⁴" };
  return unitParts(unit)
    .map(({ text, script }) =>
      script === "sup" ? [...text].map((character) => superscripts[character] ?? character).join("") : text,
    )
    .join("");
}

const LENGTH_UNITS = [
  { unit: "m", perMm: 1e-3 },
  { unit: "cm", perMm: 0.1 },
  { unit: "mm", perMm: 1 },
  { unit: "µm", perMm: 1e3 },
] as const;

/**
 * A length in the unit that reads best: metres from 1 m, centimetres from 10 cm, millimetres from 1 mm, else micrometres
 * (nanometres below 0.1 µm). Zero and what has no value keep millimetres.
 */
export function readableLength(lengthMm: number | null): { value: number | null; unit: string } {
  if (lengthMm === null || !Number.isFinite(lengthMm) || lengthMm === 0) return { value: lengthMm, unit: "mm" };
  const size = Math.abs(lengthMm);
  const [metre, centimetre, millimetre, micrometre] = LENGTH_UNITS;
  if (size < 1e-4) return { value: lengthMm * 1e6, unit: "nm" };
  const chosen = size >= 1000 ? metre : size >= 100 ? centimetre : size >= 1 ? millimetre : micrometre;
  return { value: lengthMm * chosen.perMm, unit: chosen.unit };
}
