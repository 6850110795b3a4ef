/** What to check at a point (PHYSICS 4–6): a code with the figure and the limit that it is held against. */
import { FREE_ATOM_LIMIT_EV, type Edge } from "../edges.ts";
import { FWHM_PER_SIGMA } from "../geometry.ts";
import type { Beam } from "./beam.ts";
import { EARLY_ZERO_BELOW, firstReversal, type Lane } from "./point.ts";
import { largestContrast } from "./profile.ts";
import { DEFAULT_NEAR_FIELD_LIMIT, type PlanTask } from "./task.ts";

export type PlanWarningCode =
  | "transmissionLow"
  | "transmissionHigh"
  | "nearEdge"
  | "belowOneKeV"
  | "nearFieldLeft"
  | "contrastReversal"
  | "linearTheoryLeft"
  | "thickSample"
  | "refractionShift"
  | "nearlyMatched"
  | "opposedPair"
  | "phaseWrap"
  | "sourceBlur"
  | "undersampled"
  | "countFloor"
  | "fewCountsPerProjection"
  | "insideSample";

export interface Warning {
  readonly code: PlanWarningCode;
  /** What was found, and what it should stay within; in the unit that the code implies (SI). */
  readonly value: number;
  readonly limit: number;
  /** The edge, for nearEdge. */
  readonly edge?: Edge;
}

/** Thresholds. Transmission, counts and linear theory: PHYSICS 5 and 6; the share of Δδ that densities may move: ours. */
export const WARNING_LIMITS = {
  transmissionLow: 0.1,
  transmissionHigh: 0.9,
  linearContrast: 0.3,
  nearlyMatched: 0.2,
  countsPerProjection: 20,
} as const;

interface Point {
  readonly task: PlanTask;
  readonly lane: Lane;
  readonly beam: Beam;
  readonly nearEdge: Edge | null;
  readonly measure: number;
  readonly countsPerPixel: number | null;
  readonly countsDecide: boolean;
}

/** Relative change of Δδ for one stated uncertainty of both densities, in quadrature; infinite for a perfect match. */
export function contrastUncertainty({ sample }: PlanTask, beam: Beam): number {
  const moved = Math.hypot(
    beam.featureDelta * sample.feature.densityUncertainty,
    beam.hostDelta * sample.host.densityUncertainty,
  );
  return moved === 0 ? 0 : moved / Math.abs(beam.deltaDelta);
}

export function warningsOf(point: Point): Warning[] {
  const { task, lane, beam, nearEdge, countsPerPixel } = point;
  const { geometry } = lane;
  const found: Warning[] = [];
  const warn = (code: PlanWarningCode, value: number, limit: number, holds: boolean): void => {
    if (!holds) found.push({ code, value, limit });
  };
  const { transmission } = beam;
  const withPhase = task.use !== "absorption";
  const filtered = task.use === "retrieval" || task.use === "tomography";
  if (lane.insideSample)
    found.push({ code: "insideSample", value: geometry.distanceM, limit: task.sample.hostThicknessM / 2 });
  if (nearEdge)
    found.push({ code: "nearEdge", value: Math.abs(beam.energyEv - nearEdge.energyEv), limit: 0, edge: nearEdge });
  warn("belowOneKeV", beam.energyEv, FREE_ATOM_LIMIT_EV, beam.energyEv >= FREE_ATOM_LIMIT_EV);
  if (lane.undersampled || lane.ranked === null)
    found.push({ code: "undersampled", value: geometry.pixelM, limit: leastPixel(task) });
  if (task.use === "direct")
    warn(
      "contrastReversal",
      point.measure,
      firstReversal(beam.gamma),
      !(point.measure > 0 && point.measure >= firstReversal(beam.gamma)),
    );
  if (filtered)
    warn(
      "nearFieldLeft",
      point.measure,
      DEFAULT_NEAR_FIELD_LIMIT,
      point.measure <= DEFAULT_NEAR_FIELD_LIMIT * (1 + 1e-9),
    );
  if (withPhase && beam.gamma !== null && beam.gamma < 0 && (filtered || -beam.gamma < EARLY_ZERO_BELOW))
    found.push({ code: "opposedPair", value: beam.gamma, limit: 0 });
  if (withPhase) {
    const matched = contrastUncertainty(task, beam);
    warn("nearlyMatched", matched, WARNING_LIMITS.nearlyMatched, matched <= WARNING_LIMITS.nearlyMatched);
    warnOfTheory(point, warn, filtered);
  }
  warn("transmissionLow", transmission, WARNING_LIMITS.transmissionLow, transmission >= WARNING_LIMITS.transmissionLow);
  warn(
    "transmissionHigh",
    transmission,
    WARNING_LIMITS.transmissionHigh,
    transmission <= WARNING_LIMITS.transmissionHigh,
  );
  warn("sourceBlur", geometry.sourceSigmaM, geometry.detectorSigmaM, geometry.sourceSigmaM <= geometry.detectorSigmaM);
  if (point.countsDecide) found.push({ code: "countFloor", value: task.minimumCounts, limit: task.minimumCounts });
  if (task.use === "tomography" && countsPerPixel !== null)
    warn(
      "fewCountsPerProjection",
      countsPerPixel,
      WARNING_LIMITS.countsPerProjection,
      countsPerPixel >= WARNING_LIMITS.countsPerProjection,
    );
  return found;
}

function warnOfTheory(
  { task, lane, beam }: Point,
  warn: (code: PlanWarningCode, value: number, limit: number, holds: boolean) => void,
  filtered: boolean,
): void {
  const { geometry } = lane;
  const { sample } = task;
  const contrast = largestContrast(sample.shape, geometry, beam);
  warn("linearTheoryLeft", contrast, WARNING_LIMITS.linearContrast, contrast <= WARNING_LIMITS.linearContrast);
  const shift = geometry.effectiveDistanceM * Math.abs(beam.deltaDelta);
  const blur = Math.max(geometry.sigmaM, geometry.pixelM / FWHM_PER_SIGMA);
  warn("refractionShift", shift, blur, shift <= blur);
  const widening = Math.sqrt(beam.wavelengthM * sample.hostThicknessM);
  const half = 0.5 * Math.max(geometry.sigmaM * FWHM_PER_SIGMA, geometry.pixelM);
  warn("thickSample", widening, half, widening <= half);
  const shiftRad = ((2 * Math.PI) / beam.wavelengthM) * Math.abs(beam.deltaDelta) * sample.shape.sizeM;
  if (filtered) warn("phaseWrap", shiftRad, Math.PI, shiftRad <= Math.PI);
}

function leastPixel({ sample: { shape }, use }: PlanTask): number {
  if (shape.kind !== "layer") return shape.sizeM / 3;
  return (use === "tomography" ? Math.min(shape.sizeM, shape.widthM) : shape.widthM) / 3;
}
