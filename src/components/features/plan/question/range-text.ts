import { splitRange } from "#src/lib/quantities/index.ts";

/** The two ends of a range as they stand in its fields; an empty beginning is "up to". */
export interface Ends {
  readonly from: string;
  readonly to: string;
}

const printed = (text: string): string => text.trim().replace(/(\d\s*)um\b/g, "$1µm");

/** Null for a list, and for a range with steps, which is written as text. */
export function endsOf(text: string): Ends | null {
  const upTo = /^\s*(?:up\s+to|to)\s+(\S.*)$/i.exec(text);
  if (upTo) return { from: "", to: printed(upTo[1] as string) };
  const range = splitRange(text);
  if (!range || range.steps || range.step) return null;
  return { from: printed(range.from.text), to: printed(range.to.text) };
}

/** The unit of the second end holds for both; `unit` where neither has one. */
export function rangeOf({ from, to }: Ends, unit: string): string {
  const hasUnit = /[a-zµμÅ]\s*$/i;
  const end = to.trim() === "" || hasUnit.test(to) || hasUnit.test(from) ? to.trim() : `${to.trim()} ${unit}`;
  const text = from.trim() === "" ? `up to ${end}` : `${from.trim()} to ${end}`;
  return text.replace(/[µμ]m/g, "um");
}
