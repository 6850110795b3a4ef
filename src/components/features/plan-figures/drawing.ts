/** Small parts of drawing that every figure of a plan shares. */
import { formatGiven } from "#src/lib/format/numbers.ts";
import { readableLength } from "#src/lib/format/units.ts";
import type { Box } from "./place.ts";

const SPACE = "\u00a0";

/** A tenth of a pixel: the same text in the markup of server and browser. */
export function tenth(value: number): number {
  return Math.round(value * 10) / 10;
}

/** Lines at 45° that fill a box, as one path: no pattern, so no id, and nothing to lose in a file of its own. */
export function hatchPath({ x, y, width, height }: Box, shift = 0, pitch = 10): string {
  const lines: string[] = [];
  // Each line keeps x + y; its grid is the page's, so that neighbouring boxes hatch on.
  const first = Math.ceil((x + y - shift) / pitch) * pitch + shift;
  for (let sum = first; sum < x + y + width + height; sum += pitch) {
    const from = Math.max(x, sum - (y + height));
    const to = Math.min(x + width, sum - y);
    if (to > from) lines.push(`M${tenth(from)} ${tenth(sum - from)}L${tenth(to)} ${tenth(sum - to)}`);
  }
  return lines.join("");
}

/** A length in the unit that reads best, at most three significant digits. */
export function lengthText(lengthMm: number): string {
  const { value, unit } = readableLength(lengthMm);
  return `${formatGiven(value ?? 0, 3)}${SPACE}${unit}`;
}

/** Value and unit with a no-break space; no unit, no space. */
export function withUnit(value: string, unit: string): string {
  return unit === "" ? value : `${value}${SPACE}${unit}`;
}
