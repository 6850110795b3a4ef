/**
 * What the plan page shows, from what was ranked: JSON only, so that server, worker and island share it. Numbers that are drawn are
 * rounded here once; the figures of picks are the API's own.
 */
import {
  acrossM,
  contrastProfile,
  countedDoseGy,
  countsFeatureDose,
  type Edge,
  FWHM_PER_SIGMA,
  kevFromEv,
  type PlanPick,
  planEdges,
  type PointFigures,
  type RankedPlan,
  retrievalGains,
  type ScatteringTables,
  type TabulationKey,
  type Working,
  workingOf,
} from "#src/lib/physics/index.ts";
import { citation } from "#src/lib/lookup/citation.ts";
import type { Candidate, ForbiddenCode } from "#src/lib/schemas/plan-answer.ts";
import { candidateOf, namesOf, spoken } from "./answer.ts";
import { checkLines, type CheckLine } from "./check-lines.ts";
import type { PlanFault } from "./faults.ts";
import type { Objective, Use } from "./question.ts";
import type { ResolvedPlan } from "./resolve-plan.ts";
import { type Miss, missOf } from "./miss.ts";
import { answerSentences, type AnswerSentences, contactDistanceM } from "./verdict-words.ts";

export interface PickView {
  readonly id: string;
  readonly candidate: Candidate;
  /** In the plane's objective: Gy, s or photons per µm²; null where it is not known. */
  readonly objective: number | null;
  readonly doseGy: number | null;
  readonly inContact: boolean;
  readonly checks: readonly CheckLine[];
  /** Greatest contrast with its sign, and the shares of blur. */
  readonly sourceBlurUm: number;
  readonly detectorBlurUm: number;
  readonly pixelUm: number;
  /** Codes of limits that the pick breaks. */
  readonly forbiddenBy: ForbiddenCode | null;
}

export interface ProfileView {
  readonly positionsUm: readonly number[];
  readonly contrast: readonly number[];
  readonly largest: number;
}

/** What the objective needs, the time, absorption's need over the point's own, retrieval's gain, the sample's transmission. */
export type PlaneQuantity = "objective" | "time" | "advantage" | "gain" | "transmission";

export interface PlaneView {
  readonly energiesKeV: readonly number[];
  readonly distancesM: readonly number[];
  readonly quantity: PlaneQuantity;
  readonly values: readonly (readonly (number | null)[])[];
  /** Absorption's objective over the point's own; 1 where both need as much. Null for the use absorption. */
  readonly equal: readonly (readonly (number | null)[])[] | null;
  readonly forbidden: readonly (readonly (ForbiddenCode | null)[])[];
  /** Absorption's objective at the shortest distance outside the sample, one an energy. */
  readonly contact: { readonly distanceM: number; readonly values: readonly (number | null)[] } | null;
}

export interface BeamView {
  readonly sourceDistanceM: number | null;
  readonly sourceFwhmUm: number;
  readonly pixelUm: number;
  readonly blurUm: number;
  readonly host: { readonly thicknessMm: number; readonly label: string };
  readonly layers: readonly {
    readonly position: "before" | "after";
    readonly thicknessMm: number;
    readonly label: string;
  }[];
  readonly feature: {
    readonly shape: "sphere" | "fibre" | "layer";
    readonly sizeUm: number;
    readonly widthUm: number | null;
    readonly label: string;
  };
}

export interface PlanResult {
  readonly tableVersion: string;
  readonly tabulation: TabulationKey;
  readonly use: Use;
  readonly objective: Objective;
  readonly objectiveProposed: boolean;
  readonly choice: RankedPlan["choice"];
  readonly sentences: AnswerSentences;
  readonly doseAdvantage: number | null;
  readonly limits: { readonly doseGy: number | null; readonly timeS: number | null };
  readonly threshold: number;
  /** Candidates by the objective, then absorption's best where it is not one of them. */
  readonly picks: readonly PickView[];
  readonly absorptionId: string | null;
  readonly plane: PlaneView;
  readonly points: number;
  readonly edges: readonly { readonly name: string; readonly energyKeV: number }[];
  readonly fringe: ProfileView | null;
  readonly shadow: ProfileView | null;
  readonly working: Working | null;
  /** Where no point is allowed. */
  readonly miss: Miss | null;
  readonly beam: BeamView;
  readonly featureDose: boolean;
  readonly flux: boolean;
  readonly citation: string;
}

export interface PlanView {
  readonly faults: readonly PlanFault[];
  readonly result: PlanResult | null;
}

/** Drawn numbers keep four digits: a pixel shows less. */
const drawn = (value: number): number | null => (Number.isFinite(value) ? Number(value.toPrecision(4)) : null);
const fixed = (value: number, digits: number): number => Number(value.toPrecision(digits));

export function planResult(
  ranked: RankedPlan,
  plan: ResolvedPlan,
  tables: ScatteringTables,
  options: { objectiveProposed: boolean; date: Date; quantity?: PlaneQuantity },
): PlanResult {
  const { task, candidates, absorptionBest } = ranked;
  const listed = candidates.map((pick, index) => pickView(pick, String(index + 1), ranked, plan));
  const alone =
    absorptionBest && task.use !== "absorption"
      ? pickView(absorptionBest, String(listed.length + 1), ranked, plan)
      : null;
  const first = candidates[0]?.figures ?? null;
  const shadowOf = task.use === "absorption" ? first : (absorptionBest?.figures ?? null);
  return {
    tableVersion: tables.version,
    tabulation: task.tabulation,
    use: task.use,
    objective: task.objective,
    objectiveProposed: options.objectiveProposed,
    choice: ranked.choice,
    sentences: answerSentences(ranked),
    doseAdvantage: ranked.doseAdvantage,
    limits: { doseGy: task.limits.doseGy, timeS: task.limits.timeS },
    threshold: task.threshold,
    picks: alone ? [...listed, alone] : listed,
    absorptionId: alone?.id ?? null,
    plane: planeView(ranked, options.quantity ?? "objective"),
    points: ranked.plane.objective.length,
    edges: edgesInside(ranked, tables),
    fringe: first && task.use !== "absorption" ? profileView(first, ranked, true) : null,
    shadow: shadowOf ? profileView(shadowOf, ranked, false) : null,
    working:
      first && absorptionBest && task.use !== "absorption" ? workingOf(task, first, absorptionBest.figures) : null,
    miss: missOf(ranked),
    beam: beamView(plan),
    featureDose: countsFeatureDose(task.sample),
    flux: task.setup.fluxPerSM2 !== null,
    citation: citation(tables.version, task.tabulation, options.date),
  };
}

export function pickView(pick: PlanPick, id: string, ranked: RankedPlan, plan: ResolvedPlan): PickView {
  const { figures } = pick;
  const { task } = ranked;
  const { geometry } = figures;
  const contact = contactDistanceM(ranked);
  return {
    id,
    candidate: candidateOf(pick, plan),
    objective: figures.objective === null ? null : figures.objective * (task.objective === "fluence" ? 1e-12 : 1),
    doseGy: countedDoseGy(task, pick),
    inContact: contact !== null && geometry.distanceM <= contact * (1 + 1e-9),
    checks: checkLines(
      pick,
      task,
      namesOf(plan),
      figures.technique === ranked.candidates[0]?.figures.technique ? ranked.candidates[0].figures.objective : null,
    ),
    sourceBlurUm: geometry.sourceSigmaM * FWHM_PER_SIGMA * 1e6,
    detectorBlurUm: geometry.detectorSigmaM * FWHM_PER_SIGMA * 1e6,
    pixelUm: geometry.pixelM * 1e6,
    forbiddenBy: figures.forbiddenBy,
  };
}

/** The plane in one quantity: what the objective needs, the time, absorption over phase, retrieval's gain, transmission. */
export function planeView(ranked: RankedPlan, quantity: PlaneQuantity): PlaneView {
  const { plane, task } = ranked;
  const { energiesEv, distancesM } = plane.grid;
  const width = distancesM.length;
  const unit = task.objective === "fluence" ? 1e-12 : 1;
  const rows = <T>(at: (place: number, i: number, j: number) => T): T[][] =>
    energiesEv.map((_, i) => distancesM.map((__, j) => at(i * width + j, i, j)));
  const advantage = (place: number): number => plane.absorption[place]! / plane.objective[place]!;
  const valueOf: Readonly<Record<PlaneQuantity, (place: number, i: number, j: number) => number>> = {
    objective: (place) => plane.objective[place]! * unit,
    time: (place, i) => plane.fluencePerM2[place]! / (plane.beams[i]?.fluxPerSM2 ?? Number.NaN),
    advantage,
    gain: (_, i, j) => gainAt(ranked, i, j),
    transmission: (_, i) => plane.beams[i]?.transmission ?? Number.NaN,
  };
  const outside = plane.lanes.findIndex(({ insideSample }) => !insideSample);
  return {
    energiesKeV: energiesEv.map((energyEv) => fixed(kevFromEv(energyEv), 14)),
    distancesM: [...distancesM],
    quantity,
    values: rows((place, i, j) => drawn(valueOf[quantity](place, i, j))),
    equal: task.use === "absorption" ? null : rows((place) => drawn(advantage(place))),
    forbidden: rows((place) => plane.forbidden[place] ?? null),
    contact:
      outside < 0
        ? null
        : {
            distanceM: distancesM[outside]!,
            values: energiesEv.map((_, i) => drawn(plane.absorption[i * width + outside]! * unit)),
          },
  };
}

/** Gain of retrieval: in the slice for a tomography, otherwise in the image. */
function gainAt({ plane, task }: RankedPlan, i: number, j: number): number {
  const [beam, lane] = [plane.beams[i], plane.lanes[j]];
  if (!beam || !lane) return Number.NaN;
  const { geometry } = lane;
  const gains = retrievalGains(
    Math.PI * beam.wavelengthM * geometry.effectiveDistanceM * beam.filterGamma * geometry.nyquistPerM ** 2,
  );
  return task.use === "tomography" ? gains.tomography : gains.image;
}

function edgesInside(ranked: RankedPlan, tables: ScatteringTables): { name: string; energyKeV: number }[] {
  const { energiesEv } = ranked.plane.grid;
  const edges: Edge[] = planEdges(ranked.task, tables, [energiesEv[0]!, energiesEv.at(-1)!]);
  return edges.map(({ element, shell, energyEv }) => ({
    name: `${element} ${shell}`,
    energyKeV: fixed(kevFromEv(energyEv), 6),
  }));
}

const PROFILE_POINTS = 121;

function profileView(figures: PointFigures, { task }: RankedPlan, phase: boolean): ProfileView {
  const { geometry, beam } = figures;
  const { shape } = task.sample;
  const halfM = acrossM(shape) / 2;
  const fringeM = Math.max(
    geometry.sigmaM,
    geometry.pixelM,
    phase ? Math.sqrt(beam.wavelengthM * geometry.effectiveDistanceM) : 0,
  );
  const reachM = Math.max(1.6 * halfM, halfM + 3 * fringeM);
  const half = Array.from({ length: PROFILE_POINTS }, (_, index) => (reachM * index) / (PROFILE_POINTS - 1));
  const contrast = contrastProfile(shape, geometry, beam, half, { phase }).map((value) => fixed(value, 4));
  const positions = half.map((positionM) => fixed(positionM * 1e6, 5));
  return {
    positionsUm: [
      ...positions
        .slice(1)
        .reverse()
        .map((position) => -position),
      ...positions,
    ],
    contrast: [...contrast.slice(1).reverse(), ...contrast],
    largest: contrast.reduce((most, value) => (Math.abs(value) > Math.abs(most) ? value : most), 0),
  };
}

function beamView({ task, feature, host, layers, setup }: ResolvedPlan): BeamView {
  const { shape } = task.sample;
  return {
    sourceDistanceM: setup.sourceDistanceM,
    sourceFwhmUm: setup.sourceFwhmUm,
    pixelUm: setup.pixelUm,
    blurUm: setup.detectorFwhmUm,
    host: { thicknessMm: fixed(task.sample.hostThicknessM * 1e3, 12), label: spoken(host) },
    layers: task.sample.layers.map(({ position, thicknessM }, index) => ({
      position,
      thicknessMm: fixed(thicknessM * 1e3, 12),
      label: spoken(layers[index]!),
    })),
    feature: {
      shape: shape.kind,
      sizeUm: fixed(shape.sizeM * 1e6, 12),
      widthUm: shape.kind === "layer" ? fixed(shape.widthM * 1e6, 12) : null,
      label: spoken(feature),
    },
  };
}
