/** Where grid points stand in px: log or linear axes of the map, and columns or rows of the strips. */
import { formatGiven, superscriptText } from "#src/lib/format/numbers.ts";
import type { PlaneData } from "./types.ts";

export interface AxisTick {
  readonly at: number;
  /** Null: a small tick without a label. */
  readonly label: string | null;
}

/** Grid indices that may be joined by interpolation, and the px that they reach to. */
interface AxisGroup {
  readonly first: number;
  readonly last: number;
  readonly from: number;
  readonly to: number;
}

export interface AxisLayout {
  /** px of each grid index. */
  readonly at: readonly number[];
  /** px where the cell of each index begins and ends, in the order of the indices. */
  readonly cells: readonly (readonly [number, number])[];
  readonly groups: readonly AxisGroup[];
  /** px of any value. */
  readonly place: (value: number) => number;
  readonly ticks: readonly AxisTick[];
  readonly label: string;
}

export interface PlaneLayout {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: AxisLayout;
  readonly y: AxisLayout;
  readonly kind: "map" | "columns" | "rows";
}

export const PLANE_LEFT = 62;
export const PLANE_RIGHT = 10;
export const AXIS_HEIGHT = 46;
/** Narrower than this, labels are sparse. */
export const NARROW = 420;

/** Coordinates as they are written: a tenth of a pixel, so that server and browser agree. */
export const px = (value: number): number => Math.round(value * 10) / 10;

/** Energy across on a log scale, distance up, log where no distance is 0. `axis` false leaves the energy axis to a strip below. */
export function mapLayout(
  { energiesKeV, distancesM, edges }: Pick<PlaneData, "energiesKeV" | "distancesM" | "edges">,
  width: number,
  axis = true,
): PlaneLayout {
  const [left, right] = [PLANE_LEFT, Math.max(width - PLANE_RIGHT, PLANE_LEFT + 40)];
  const top = edges.length > 0 ? 24 : 10;
  const bottom = top + Math.round(Math.min(420, Math.max(280, (right - left) * 0.86)));
  return {
    width,
    height: bottom + (axis ? AXIS_HEIGHT : 8),
    left,
    right,
    top,
    bottom,
    kind: "map",
    x: energyAxis(energiesKeV, edges, left, right, width < NARROW),
    y: distanceAxis(distancesM, bottom, top, width < NARROW),
  };
}

/** One column an energy where there are five or fewer, otherwise one row a distance; the other axis is shared. */
export function stripsLayout(
  { energiesKeV, distancesM, edges }: Pick<PlaneData, "energiesKeV" | "distancesM" | "edges">,
  width: number,
): PlaneLayout {
  const [left, right] = [PLANE_LEFT, Math.max(width - PLANE_RIGHT, PLANE_LEFT + 40)];
  const narrow = width < NARROW;
  if (energiesKeV.length <= 5) {
    const [top, bottom] = [10, 330];
    const x = stripAxis(energiesKeV, left, right, 104, "Photon energy, keV", formatGivenEnergy);
    const end = x.cells.at(-1)?.[1] ?? right;
    const y = distanceAxis(distancesM, bottom, top, narrow);
    return { width, height: bottom + AXIS_HEIGHT, left, right: end, top, bottom, kind: "columns", x, y };
  }
  const top = 28;
  const bottom = top + distancesM.length * 52;
  const unit = distanceUnit(distancesM);
  const y = stripAxis(distancesM, bottom, top, 44, `Distance, ${unit.name}`, (value) => tickText(value * unit.per));
  const x = energyAxis(energiesKeV, edges, left, right, narrow);
  return { width, height: bottom + AXIS_HEIGHT, left, right, top, bottom, kind: "rows", x, y };
}

const formatGivenEnergy = (value: number): string => formatGiven(value, 4);

/** Photon energy on a log scale; never joined across an edge. */
export function energyAxis(
  energiesKeV: readonly number[],
  edges: PlaneData["edges"],
  from: number,
  to: number,
  narrow: boolean,
): AxisLayout {
  const breaks = edges.map(({ energyKeV }) => energyKeV);
  return {
    ...continuous(energiesKeV, from, to, true, breaks, { narrow, room: 34, per: 1 }),
    label: "Photon energy, keV, log scale",
  };
}

function distanceAxis(distancesM: readonly number[], from: number, to: number, narrow: boolean): AxisLayout {
  const log = distancesM.every((value) => value > 0);
  const unit = distanceUnit(distancesM);
  return {
    ...continuous(distancesM, from, to, log, [], { narrow, room: 20, per: unit.per }),
    label: `Distance, ${unit.name}${log ? ", log scale" : ""}`,
  };
}

/** Millimetres where everything is nearer than 0.1 m. */
const distanceUnit = (distancesM: readonly number[]): { name: string; per: number } =>
  (distancesM.at(-1) ?? 1) < 0.1 ? { name: "mm", per: 1000 } : { name: "m", per: 1 };

function continuous(
  values: readonly number[],
  from: number,
  to: number,
  log: boolean,
  breaks: readonly number[],
  ticks: { narrow: boolean; room: number; per: number },
): Omit<AxisLayout, "label"> {
  const [low, high] = [values[0] ?? 1, values.at(-1) ?? 1];
  const share = (value: number): number => {
    if (!(high > low)) return 0.5;
    const part = log ? Math.log(Math.max(value, low) / low) / Math.log(high / low) : (value - low) / (high - low);
    return Math.min(1, Math.max(0, part));
  };
  const place = (value: number): number => from + share(value) * (to - from);
  const at = values.map(place);
  const ends = values.slice(0, -1).map((value, index) => {
    const edge = breaks.find((each) => each > value && each <= values[index + 1]!);
    return edge === undefined
      ? { border: (at[index]! + at[index + 1]!) / 2, split: false }
      : { border: place(edge), split: true };
  });
  const cells = values.map((_, index) => [ends[index - 1]?.border ?? from, ends[index]?.border ?? to] as const);
  const firsts = values.map((_, index) => index).filter((index) => index === 0 || ends[index - 1]!.split);
  const groups = firsts.map((first, order) => {
    const last = (firsts[order + 1] ?? values.length) - 1;
    return { first, last, from: cells[first]![0], to: cells[last]![1] };
  });
  const shown = [low * ticks.per, high * ticks.per] as const;
  const drawn = (value: number): number => place(value / ticks.per);
  return { at, cells, groups, place, ticks: axisTicks(shown, drawn, log, ticks) };
}

/** Strips of equal breadth with 8 px between them, at most `most` px broad. */
function stripAxis(
  values: readonly number[],
  from: number,
  to: number,
  most: number,
  label: string,
  text: (value: number) => string,
): AxisLayout {
  const side = Math.sign(to - from);
  const pitch = Math.min(most + 8, (Math.abs(to - from) + 8) / Math.max(values.length, 1));
  const cells = values.map((_, index) => {
    const start = from + side * index * pitch;
    return [start, start + side * (pitch - 8)] as const;
  });
  const at = cells.map(([start, end]) => (start + end) / 2);
  const nearest = (value: number): number => {
    const [best = 0] = values
      .map((_, index) => index)
      .sort((a, b) => away(values[a]!, value) - away(values[b]!, value));
    return at[best] ?? from;
  };
  return {
    at,
    cells,
    groups: cells.map(([start, end], index) => ({ first: index, last: index, from: start, to: end })),
    place: nearest,
    ticks: values.map((value, index) => ({ at: at[index]!, label: text(value) })),
    label,
  };
}

const away = (a: number, b: number): number => Math.abs(a - b);

/**
 * Labels at 1, 2 and 5 of each decade, on narrow charts at decades; finer ones where that would leave fewer than three
 * (narrow: two). Small ticks at the other digits. Labels that would touch are left out.
 */
function axisTicks(
  [low, high]: readonly [number, number],
  place: (value: number) => number,
  log: boolean,
  { narrow, room }: { narrow: boolean; room: number },
): AxisTick[] {
  if (!(high > low)) return [{ at: place(low), label: tickText(low) }];
  const wanted = narrow ? 2 : 3;
  const sets = log
    ? [[1], [1, 2, 5], [1, 1.5, 2, 3, 4, 5, 6, 8], [1, 1.2, 1.4, 1.6, 1.8, 2, 2.5, 3, 3.5, 4, 5, 6, 7, 8, 9]].map(
        (digits) => digitSteps(low, high, digits),
      )
    : [];
  const labelled =
    sets.slice(narrow ? 0 : 1).find((steps) => steps.length >= wanted) ?? evenTicks(low, high, narrow ? 4 : 6);
  const ticks: AxisTick[] = [];
  for (const value of labelled) {
    const at = place(value);
    if (ticks.every((tick) => Math.abs(tick.at - at) >= room)) ticks.push({ at, label: tickText(value) });
  }
  const small = log ? digitSteps(low, high, [1, 2, 3, 4, 5, 6, 7, 8, 9]).map(place) : [];
  return [
    ...ticks,
    ...small.filter((at) => ticks.every((tick) => Math.abs(tick.at - at) > 2)).map((at) => ({ at, label: null })),
  ];
}

function digitSteps(low: number, high: number, digits: readonly number[]): number[] {
  const steps: number[] = [];
  for (let power = Math.floor(Math.log10(low)) - 1; power <= Math.ceil(Math.log10(high)); power++) {
    for (const digit of digits) steps.push(Number(`${digit}e${power}`));
  }
  return steps.filter((value) => value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9));
}

function evenTicks(low: number, high: number, most: number): number[] {
  const power = Math.floor(Math.log10((high - low) / most));
  const step =
    [1, 2, 5, 10].map((digit) => Number(`${digit}e${power}`)).find((each) => (high - low) / each <= most) ?? high - low;
  const first = Math.ceil(low / step - 1e-9);
  const count = Math.floor(high / step + 1e-9) - first + 1;
  return Array.from({ length: Math.max(count, 0) }, (_, index) => Number(((first + index) * step).toPrecision(12)));
}

/** Plain from 0.001 to 100 000, else a power of ten, with the digits before it unless they are 1: 10⁶, 5·10⁻⁴. */
export function tickText(value: number): string {
  const size = Math.abs(value);
  if (size === 0 || (size >= 1e-3 && size < 1e5)) return formatGiven(value, 4);
  const [digits = "1", power = "0"] = Number(value.toPrecision(2)).toExponential().split("e");
  return `${digits === "1" ? "" : `${digits}·`}10${superscriptText(Number(power))}`;
}
