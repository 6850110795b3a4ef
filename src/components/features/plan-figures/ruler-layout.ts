/** Where everything on the ruler stands: axis, marks, limit, bracket and the words beside them. Pure; px. */
import { logScale, type Scale } from "../chart/scales.ts";
import { axisRange, axisTicks, type AxisTick } from "./log-axis.ts";
import { type Box, firstFree, overlap } from "./place.ts";
import { RULER, type RulerMark, type RulerProps, SIZE } from "./ruler.ts";
import { layWords, type Words } from "./ruler-words.ts";
import { textWidth } from "./text-width.ts";

/** From the first phase mark to the best of absorption. */
export interface Bracket {
  readonly from: number;
  readonly to: number;
  /** Middle of the words. */
  readonly words: Words | null;
  readonly box: Box | null;
  /** Whether the words stand in a gap of its bar. */
  readonly gap: boolean;
}

export interface RulerLayout {
  readonly range: readonly [number, number];
  readonly left: number;
  readonly right: number;
  readonly toX: Scale;
  readonly ticks: readonly AxisTick[];
  readonly first: RulerMark | null;
  readonly best: RulerMark | null;
  /** Which side of the axis the limit has left, if any. */
  readonly limitSide: "on" | "below" | "above" | null;
  readonly limitX: number;
  readonly limitTop: number;
  readonly limitWords: Words | null;
  readonly bracket: Bracket | null;
  readonly words: readonly Words[];
}

export function layRuler(props: RulerProps): RulerLayout {
  const { phase, absorption, limit, width } = props;
  const range = axisRange(
    [...phase, ...absorption].map(({ value }) => value),
    limit?.value ?? null,
    props.interval ?? null,
  );
  const left = Math.ceil(Math.max(textWidth("Absorption", SIZE, "bold"), textWidth(props.label, SIZE)) + 22);
  const right = Math.max(left + 40, width - 22);
  const toX = logScale(range, left, right);
  const first = phase[0] ?? null;
  const best = absorption.reduce<RulerMark | null>((low, mark) => (low && low.value <= mark.value ? low : mark), null);
  const limitSide = !limit ? null : limit.value < range[0] ? "below" : limit.value > range[1] ? "above" : "on";
  const limitX = limit ? toX(limit.value) : right;

  const area: Box = { x: 0, y: 0, width, height: RULER.height };
  const lineX = limitSide === "on" ? limitX : null;
  const bracket =
    props.ratioWords === null || !first || !best
      ? null
      : layBracket(props.ratioWords, toX(first.value), toX(best.value), lineX, area);
  // The line begins under the bracket's words where they stand across it.
  const crossed = bracket?.box && lineX !== null && overlap(bracket.box, limitLine(lineX, RULER.limit.top));
  const limitTop = crossed ? RULER.limit.topUnderWords : RULER.limit.top;
  const taken: Box[] = lineX === null ? [] : [limitLine(lineX, limitTop)];
  if (bracket?.box) taken.push(bracket.box);
  if (bracket) taken.push({ x: bracket.to - 2, y: RULER.bracket.y, width: 4, height: RULER.axis - RULER.bracket.y });
  const limitWords = limit && limitSide ? layLimit(limit.words, limitSide, limitX, area, taken) : null;
  return {
    range,
    left,
    right,
    toX,
    ticks: axisTicks(range, (right - left) / Math.log10(range[1] / range[0])),
    first,
    best,
    limitSide,
    limitX,
    limitTop,
    limitWords,
    bracket,
    words: layWords(props, toX, best, area, taken),
  };
}

/** What the words keep clear of a leg, px. */
const CLEAR = 12;

/**
 * Words on the bracket: within its legs, clear of the limit's line where they can be; else outside them; on the top row at
 * last.
 */
function layBracket(text: string, a: number, b: number, limitX: number | null, area: Box): Bracket {
  const { text: baseline, size } = RULER.bracket;
  const from = Math.min(a, b);
  const to = Math.max(a, b);
  const width = textWidth(text, size, "bold");
  const box = (x: number, base: number): Box => ({ x, y: base - 13, width, height: 17 });
  const between = (low: number, high: number): Box[] =>
    high - low >= width + 2 * CLEAR ? [box((low + high - width) / 2, baseline)] : [];
  const inside = [
    ...between(from, to),
    ...(limitX === null ? [] : [...between(from, limitX), ...between(limitX, to)]),
  ].filter(({ x }) => x >= from + CLEAR && x + width <= to - CLEAR);
  const outside = [to + 10, from - 10 - width].map((x) => box(x, baseline));
  const middle = Math.min(Math.max(0, (from + to - width) / 2), area.width - width);
  const above = [middle, 0, area.width - width].map((x) => box(x, RULER.limit.text));
  const line = limitX === null ? [] : [limitLine(limitX, RULER.limit.top)];
  const found =
    firstFree([...inside, ...outside], area, line) ?? firstFree([...inside, ...outside, ...above], area, []);
  const words = found && { text, x: found.x + width / 2, y: found.y + 13 };
  return { from: a, to: b, words, box: found, gap: found !== null && inside.includes(found) };
}

function limitLine(x: number, top: number): Box {
  return { x: x - 4, y: top, width: 8, height: RULER.limit.bottom - top };
}

function layLimit(text: string, side: "on" | "below" | "above", at: number, area: Box, taken: Box[]): Words | null {
  const said = side === "above" ? `${text} →` : side === "below" ? `← ${text}` : text;
  const width = textWidth(said, SIZE);
  const starts = { on: [at + 4, at - width / 2, at - width - 4], above: [at - width], below: [at] }[side];
  const boxes = [...starts, area.width - width].map((x) => ({ x, y: RULER.limit.text - 12, width, height: 15 }));
  const found = firstFree(boxes, area, taken);
  if (found) taken.push(found);
  return found && { text: said, x: found.x, y: RULER.limit.text };
}
