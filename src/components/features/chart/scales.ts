/** Scales, ticks and paths of the energy charts: log photon energy across, log or linear values up. */
import { scaleLinear, scaleLog } from "d3-scale";
import { line } from "d3-shape";

export interface Frame {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export type Scale = (value: number) => number;

export interface Tick {
  readonly value: number;
  readonly at: number;
  /** Null: a small tick without a label. */
  readonly label: string | null;
}

/** Photon energy in keV to x, and back. */
export function energyScale(frame: Frame, rangeKeV: readonly [number, number]): { toX: Scale; toKeV: Scale } {
  const scale = scaleLog()
    .domain(rangeKeV)
    .range([frame.left, frame.width - frame.right])
    .clamp(true);
  return { toX: (energyKeV) => scale(energyKeV), toKeV: (x) => scale.invert(x) };
}

/** Labels at 1, 2 and 5 of each decade (at decades alone where they would crowd), small ticks at the other digits. */
export function energyTicks(frame: Frame, rangeKeV: readonly [number, number]): Tick[] {
  const { toX } = energyScale(frame, rangeKeV);
  const decades = Math.log10(rangeKeV[1] / rangeKeV[0]);
  const perDecade = (frame.width - frame.left - frame.right) / decades;
  const labelled = perDecade > 150 ? [1, 2, 5] : perDecade > 100 ? [1, 3] : [1];
  return digitsBetween(rangeKeV).map(({ digit, value }) => ({
    value,
    at: toX(value),
    label: labelled.includes(digit) ? String(value) : null,
  }));
}

function digitsBetween([low, high]: readonly [number, number]): { digit: number; decade: number; value: number }[] {
  const found: { digit: number; decade: number; value: number }[] = [];
  for (let decade = Math.floor(Math.log10(low)); decade <= Math.ceil(Math.log10(high)); decade++) {
    for (let digit = 1; digit <= 9; digit++) {
      const value = Number(`${digit}e${decade}`);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) found.push({ digit, decade, value });
    }
  }
  return found;
}

/** Whole decades around the values given; null where none is positive. */
export function logDomain(columns: readonly (readonly (number | null)[])[]): readonly [number, number] | null {
  let low = Infinity;
  let high = 0;
  for (const column of columns) {
    for (const value of column) {
      const size = value === null ? 0 : Math.abs(value);
      if (size === 0) continue;
      low = Math.min(low, size);
      high = Math.max(high, size);
    }
  }
  if (high === 0) return null;
  const from = Math.floor(Math.log10(low) + 1e-9);
  const to = Math.ceil(Math.log10(high) - 1e-9);
  return [10 ** from, 10 ** Math.max(to, from + 1)];
}

export function logScale(domain: readonly [number, number], fromY: number, toY: number): Scale {
  const scale = scaleLog().domain(domain).range([fromY, toY]).clamp(true);
  return (value) => scale(value);
}

export function linearScale(domain: readonly [number, number], fromY: number, toY: number): Scale {
  const scale = scaleLinear().domain(domain).range([fromY, toY]).clamp(true);
  return (value) => scale(value);
}

/** Exponents of the decades to label, and every small tick between. More than nine decades label every second one. */
export function decadeTicks(
  domain: readonly [number, number],
  toY: Scale,
): { decades: { exponent: number; at: number }[]; small: number[] } {
  const from = Math.round(Math.log10(domain[0]));
  const to = Math.round(Math.log10(domain[1]));
  const step = to - from > 9 ? 2 : 1;
  const decades: { exponent: number; at: number }[] = [];
  const small: number[] = [];
  for (let exponent = from; exponent <= to; exponent++) {
    if ((exponent - from) % step === 0) decades.push({ exponent, at: toY(10 ** exponent) });
    if (exponent < to && step === 1) for (let digit = 2; digit <= 9; digit++) small.push(toY(digit * 10 ** exponent));
  }
  return { decades, small };
}

/** SVG path of values over energies; a null value breaks the line. */
export function curvePath(xs: readonly number[], ys: readonly (number | null)[]): string {
  const draw = line<number>()
    .defined((index) => ys[index] !== null)
    // A tenth of a pixel is plenty, and keeps the served page small.
    .x((index) => Math.round((xs[index] as number) * 10) / 10)
    .y((index) => Math.round((ys[index] as number) * 10) / 10);
  return draw(xs.map((_, index) => index)) ?? "";
}

/** Moves labels apart so that neighbours are at least `gap` px from each other and stay inside; keeps their order. */
export function spreadLabels(wanted: readonly number[], gap: number, top: number, bottom: number): number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => (wanted[a] as number) - (wanted[b] as number));
  const placed = [...wanted];
  let floor = top;
  for (const index of order) {
    placed[index] = Math.max(placed[index] as number, floor);
    floor = (placed[index] as number) + gap;
  }
  let ceiling = bottom;
  for (const index of [...order].reverse()) {
    placed[index] = Math.min(placed[index] as number, ceiling);
    ceiling = (placed[index] as number) - gap;
  }
  return placed;
}
