/** What to check at a point (PHYSICS 4–6): a code with the figure and the limit that it is held against. */
import { FREE_ATOM_LIMIT_EV, type Edge } from "../edges.ts";
import { FWHM_PER_SIGMA } from "../geometry.ts";
import type { Beam } from "./beam.ts";
import { candidateBandEv } from "./grid.ts";
import { EARLY_ZERO_BELOW, firstReversal, type Lane, leastDetailM } from "./point.ts";
import { largestContrast } from "./profile.ts";
import { closestDistanceM, DEFAULT_NEAR_FIELD_LIMIT, type PlanTask } from "./task.ts";

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

/** A thing that was checked. Those that do not hold are the point's warnings. */
export interface Check {
  readonly code: PlanWarningCode;
  readonly holds: boolean;
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

/** Everything that is checked at a point, in the order in which it is told. */
export function checksOf(point: Point): Check[] {
  const { task, lane, beam, nearEdge, countsPerPixel, countsDecide, measure } = point;
  const { geometry } = lane;
  const withPhase = task.use !== "absorption";
  const filtered = task.use === "retrieval" || task.use === "tomography";
  const { transmission, energyEv } = beam;
  const detailM = leastDetailM(task);
  const checks: (Check | null)[] = [
    check("insideSample", geometry.distanceM, closestDistanceM(task.sample), !lane.insideSample),
    nearEdge && {
      ...check("nearEdge", Math.abs(energyEv - nearEdge.energyEv), bandOfEdge(nearEdge, task), false),
      edge: nearEdge,
    },
    atLeast("belowOneKeV", energyEv, FREE_ATOM_LIMIT_EV),
    check("undersampled", geometry.pixelM, detailM / 3, !lane.undersampled && lane.ranked !== null),
    task.use === "direct"
      ? check(
          "contrastReversal",
          measure,
          firstReversal(beam.gamma),
          !(measure > 0 && measure >= firstReversal(beam.gamma)),
        )
      : null,
    filtered ? atMost("nearFieldLeft", measure, DEFAULT_NEAR_FIELD_LIMIT) : null,
    withPhase && beam.gamma !== null && (filtered || Math.abs(beam.gamma) < EARLY_ZERO_BELOW)
      ? check("opposedPair", beam.gamma, 0, beam.gamma >= 0)
      : null,
    withPhase ? atMost("nearlyMatched", contrastUncertainty(task, beam), WARNING_LIMITS.nearlyMatched) : null,
    ...(withPhase ? checksOfTheory(task, lane, beam, filtered) : []),
    atLeast("transmissionLow", transmission, WARNING_LIMITS.transmissionLow),
    atMost("transmissionHigh", transmission, WARNING_LIMITS.transmissionHigh),
    atMost("sourceBlur", geometry.sourceSigmaM, geometry.detectorSigmaM),
    check("countFloor", task.minimumCounts, task.minimumCounts, !countsDecide),
    task.use === "tomography" && countsPerPixel !== null
      ? atLeast("fewCountsPerProjection", countsPerPixel, WARNING_LIMITS.countsPerProjection)
      : null,
  ];
  return checks.filter((each) => each !== null);
}

const bandOfEdge = ({ energyEv }: Edge, { setup }: PlanTask): number => candidateBandEv(energyEv, setup.bandwidth);

const check = (code: PlanWarningCode, value: number, limit: number, holds: boolean): Check => ({
  code,
  holds,
  value,
  limit,
});
const SLACK = 1 + 1e-9;
const atMost = (code: PlanWarningCode, value: number, limit: number): Check =>
  check(code, value, limit, value <= limit * SLACK);
const atLeast = (code: PlanWarningCode, value: number, limit: number): Check =>
  check(code, value, limit, value >= limit / SLACK);

function checksOfTheory({ sample }: PlanTask, { geometry }: Lane, beam: Beam, filtered: boolean): (Check | null)[] {
  const blurM = Math.max(geometry.sigmaM, geometry.pixelM / FWHM_PER_SIGMA);
  const shiftRad = ((2 * Math.PI) / beam.wavelengthM) * Math.abs(beam.deltaDelta) * sample.shape.sizeM;
  return [
    atMost("linearTheoryLeft", largestContrast(sample.shape, geometry, beam), WARNING_LIMITS.linearContrast),
    atMost("refractionShift", geometry.effectiveDistanceM * Math.abs(beam.deltaDelta), blurM),
    atMost("thickSample", Math.sqrt(beam.wavelengthM * sample.hostThicknessM), 0.5 * FWHM_PER_SIGMA * blurM),
    filtered ? atMost("phaseWrap", shiftRad, Math.PI) : null,
  ];
}
