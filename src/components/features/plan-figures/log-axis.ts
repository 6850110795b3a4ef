/** The log axis of the ruler: from where to where it runs, and its ticks. */
import { formatGiven, superscriptText } from "#src/lib/format/numbers.ts";

export interface AxisTick {
  readonly value: number;
  /** Null: a small tick. */
  readonly label: string | null;
  /** Digit 1: a long tick. */
  readonly decade: boolean;
}

/** Over this many decades only decades are labelled. */
export const DECADES_WITH_DIGITS = 3;
/** A mark stands at least this factor inside the axis. */
const MARGIN = 1.12;
/** What may lie outside (a limit, an interval) stretches the axis by no more than this factor. */
const REACH = { limit: 100, interval: 5 };
/** Beyond these a double has no neighbours left to put ticks on. */
const LEAST = 1e-300;
const MOST = 1e300;

/** 1, 2 or 5 times a power of ten at or below the value, or at or above it; whole decades where asked. */
function niceStep(value: number, up: boolean, digits: readonly number[]): number {
  const exponent = Math.floor(Math.log10(value));
  const steps = [exponent - 1, exponent, exponent + 1].flatMap((power) => digits.map((d) => Number(`${d}e${power}`)));
  return (up ? steps.find((step) => step >= value) : steps.findLast((step) => step <= value)) ?? value;
}

const usable = (value: number): boolean => value > 0 && Number.isFinite(value);
const within = (value: number): number => Math.min(Math.max(value, LEAST), MOST);

/**
 * Ends of the axis: all marks inside with a little room, a limit or interval where it lies near them, at least one decade,
 * ends at 1, 2 or 5, or at whole decades where it is long.
 */
export function axisRange(
  marks: readonly number[],
  limit: number | null,
  interval: readonly [number, number] | null,
): readonly [number, number] {
  const held = marks.filter(usable).map(within);
  if (held.length === 0 && limit !== null && usable(limit)) held.push(within(limit));
  if (held.length === 0) return [0.1, 10];
  const low = Math.min(...held);
  const high = Math.max(...held);
  const near = (value: number, reach: number): boolean => value >= low / reach && value <= high * reach;
  if (limit !== null && near(limit, REACH.limit)) held.push(limit);
  for (const end of interval ?? []) if (near(end, REACH.interval)) held.push(end);
  let from = Math.min(...held) / MARGIN;
  let to = Math.max(...held) * MARGIN;
  if (to < from * 10) {
    const middle = Math.sqrt(from) * Math.sqrt(to);
    [from, to] = [middle / Math.sqrt(10), middle * Math.sqrt(10)];
  }
  const digits = to / from > 10 ** DECADES_WITH_DIGITS ? [1] : [1, 2, 5];
  return [niceStep(from, false, digits), niceStep(to, true, digits)];
}

/** Ticks at every digit, labelled at 1, 2 and 5 or at decades alone; small ticks only where a decade has room for them. */
export function axisTicks([low, high]: readonly [number, number], pxPerDecade: number): AxisTick[] {
  const decades = Math.log10(high / low);
  // A short axis may hold one decade or none: then the digits are needed, however narrow it is.
  const digits = decades <= DECADES_WITH_DIGITS + 1e-9 && (pxPerDecade >= 120 || decades < 1.7) ? [1, 2, 5] : [1];
  // A tick named with a power of ten takes up to 50 px.
  const every = [1, 2, 3, 5, 10, 20, 50].find((step) => step * pxPerDecade >= 50) ?? 100;
  const ticks: AxisTick[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (let digit = 1; digit <= (pxPerDecade >= 40 ? 9 : 1); digit++) {
      const value = Number(`${digit}e${power}`);
      if (value < low * (1 - 1e-9) || value > high * (1 + 1e-9)) continue;
      const labelled = digits.includes(digit) && (digits.length > 1 || power % every === 0);
      ticks.push({ value, label: labelled ? tickText(value, digit, power) : null, decade: digit === 1 });
    }
  }
  return ticks;
}

function tickText(value: number, digit: number, power: number): string {
  if (power >= -3 && power <= 4) return formatGiven(value, 2);
  return digit === 1 ? `10${superscriptText(power)}` : `${digit}×10${superscriptText(power)}`;
}
