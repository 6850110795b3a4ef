/**
 * The band of spatial frequencies that a point of a plan is summed over, cut so that the sums are quick and exact.
 *
 * In v = u² the phase χ = πλR'v grows evenly: on even steps in v its sines follow from a two-term recurrence. The band 0 … u_N
 * is cut at u_N/2, u_N/4, …; each piece has even steps in v. What lies below the last cut is summed by Gauss's rule in u, where
 * all factors are smooth. Cuts depend on geometry and shape alone, so that one point gives the same number alone and in a plane.
 */
import { type Geometry, systemTransfer } from "./geometry.ts";
import { gaussLegendre } from "./numerics/gauss.ts";
import { acrossM, layerRingPower, type Shape, transformSquared } from "./shapes.ts";

/**
 * What is summed. `signal`: 2π∫…u du or 2ℓ∫…du (PHYSICS 5); `neighbourhood`: the same from 1/(4 d) up (retrieval, PHYSICS 8);
 * `volume`: the two sums of tomography, 4π∫u² and π³∫u³ (sphere), 2π∫u and 2π²∫u² (fibre), ∬ and π∬u_r (layer).
 */
export type BandKind = "signal" | "neighbourhood" | "volume";

export interface Piece {
  /** v of the first node and the step, 1/m². */
  readonly startPerM2: number;
  readonly stepPerM2: number;
  /** Even. */
  readonly intervals: number;
  /** |t̂|² MTF² with the measure of dv, at each node. */
  readonly first: Float64Array;
  /** The same with the second measure; the first again where there is one only. */
  readonly second: Float64Array;
  /** Simpson's sums of both. */
  readonly firstSum: number;
  readonly secondSum: number;
}

/** Gauss's nodes below a cut; weights hold the rule's and the measure of du. */
export interface Foot {
  readonly squaresPerM2: Float64Array;
  readonly first: Float64Array;
  readonly second: Float64Array;
}

export interface Band {
  readonly kind: BandKind;
  readonly geometry: Geometry;
  readonly shape: Shape;
  /** Fixed number of pieces, or null where the band reaches down to 0 and is cut as deep as needed. */
  readonly pieces: number | null;
  /** From the top down. */
  readonly piece: (index: number) => Piece;
  /** What lies below the piece of that index. */
  readonly foot: (index: number) => Foot;
}

/** Steps of a piece at least, even. Simpson's rule then keeps 4e-5 of v⁻² over a factor of 4. */
const LEAST_INTERVALS = 24;
/** Steps for each period of the transform's ripple, at the piece's lower end where they are widest. */
const STEPS_PER_RIPPLE = 16;
/** Pieces' intervals stay below this however large the feature: beyond RIPPLES (shapes.ts) there is no ripple. */
const MOST_INTERVALS = 4000;
const FOOT_NODES = 8;

/** The band, or null where its lower bound is not below u_N. `ring` is shared by the distances of a plane (layerRingPower). */
export function frequencyBand(
  kind: BandKind,
  shape: Shape,
  geometry: Geometry,
  ring?: (frequencyPerM: number) => number,
): Band | null {
  const { nyquistPerM, sigmaM, pixelM } = geometry;
  const measures = measuresOf(kind, shape);
  const ringPower =
    kind === "volume" && shape.kind === "layer" ? (ring ?? layerRingPower(shape.sizeM, shape.widthM)) : null;
  const rippleM = ringPower && shape.kind === "layer" ? Math.max(shape.sizeM, shape.widthM) : acrossM(shape);
  const powerAt = (u: number): number => {
    const transfer = systemTransfer(u, sigmaM, pixelM);
    return (ringPower ? ringPower(u) : transformSquared(shape, u)) * transfer * transfer;
  };
  const bottomPerM = kind === "neighbourhood" ? 1 / (4 * acrossM(shape)) : 0;
  if (bottomPerM >= nyquistPerM) return null;
  const octaves = bottomPerM > 0 ? Math.log2(nyquistPerM / bottomPerM) : 0;
  const pieces = bottomPerM > 0 ? Math.max(1, Math.ceil(octaves)) : null;
  const ratio = pieces === null ? 2 : (nyquistPerM / bottomPerM) ** (1 / pieces);
  const cut = (index: number): number => (index === pieces ? bottomPerM : nyquistPerM / ratio ** index);

  const known: Piece[] = [];
  const feet: Foot[] = [];
  return {
    kind,
    geometry,
    shape,
    pieces,
    piece: (index) => (known[index] ??= makePiece(cut(index + 1), cut(index), rippleM, powerAt, measures)),
    foot: (index) => (feet[index] ??= makeFoot(cut(index + 1), powerAt, measures)),
  };
}

type Measure = (u: number) => number;

/** Measures of du. */
function measuresOf(kind: BandKind, shape: Shape): readonly [Measure, Measure | null] {
  if (kind !== "volume") {
    if (shape.kind === "sphere") return [(u) => 2 * Math.PI * u, null];
    const { lengthM } = shape;
    return [() => 2 * lengthM, null];
  }
  if (shape.kind === "sphere") return [(u) => 4 * Math.PI * u * u, (u) => (Math.PI * u) ** 3];
  if (shape.kind === "fibre") return [(u) => 2 * Math.PI * u, (u) => 2 * (Math.PI * u) ** 2];
  return [(u) => u, (u) => Math.PI * u * u];
}

function makePiece(
  low: number,
  high: number,
  rippleM: number,
  powerAt: (u: number) => number,
  [first, second]: readonly [Measure, Measure | null],
): Piece {
  const startPerM2 = low * low;
  const span = high * high - startPerM2;
  const ripples = rippleM * low > 100 ? 0 : (0.5 * STEPS_PER_RIPPLE * rippleM * span) / low;
  const intervals = 2 * Math.ceil(Math.min(MOST_INTERVALS, Math.max(LEAST_INTERVALS, ripples)) / 2);
  const stepPerM2 = span / intervals;
  const firsts = new Float64Array(intervals + 1);
  const seconds = second ? new Float64Array(intervals + 1) : firsts;
  for (let k = 0; k <= intervals; k++) {
    const u = Math.sqrt(startPerM2 + k * stepPerM2);
    // du = dv/(2u).
    const power = powerAt(u) / (2 * u);
    firsts[k] = power * first(u);
    if (second) seconds[k] = power * second(u);
  }
  return {
    startPerM2,
    stepPerM2,
    intervals,
    first: firsts,
    second: seconds,
    firstSum: simpson(firsts, stepPerM2),
    secondSum: simpson(seconds, stepPerM2),
  };
}

function simpson(values: Float64Array, step: number): number {
  const last = values.length - 1;
  let odd = 0;
  let even = 0;
  for (let k = 1; k < last; k += 2) odd += values[k]!;
  for (let k = 2; k < last; k += 2) even += values[k]!;
  return (step / 3) * (values[0]! + 4 * odd + 2 * even + values[last]!);
}

function makeFoot(
  top: number,
  powerAt: (u: number) => number,
  [first, second]: readonly [Measure, Measure | null],
): Foot {
  const { nodes, weights } = gaussLegendre(FOOT_NODES);
  const us = nodes.map((node) => node * top);
  const rule = us.map((u, k) => weights[k]! * top * powerAt(u));
  const firsts = rule.map((weight, k) => weight * first(us[k]!));
  return {
    squaresPerM2: us.map((u) => u * u),
    first: firsts,
    second: second ? rule.map((weight, k) => weight * second(us[k]!)) : firsts,
  };
}
