/** What the API answers, from what the core ranked: units of the edges, null for what has no value, sentences. */
import {
  FWHM_PER_SIGMA,
  kevFromEv,
  type PlanPick,
  type RankedPlan,
  type ScatteringTables,
} from "#src/lib/physics/index.ts";
import { formulaText } from "#src/lib/format/formula.ts";
import { inSentence } from "#src/lib/format/sentence.ts";
import { citation } from "#src/lib/lookup/citation.ts";
import type { Candidate, EvaluateAnswer, RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import type { ResolvedPlan } from "./resolve-plan.ts";
import { verdictSummary } from "./verdict-words.ts";
import { warningText } from "./warning-words.ts";

const UM2_PER_M2 = 1e12;
/** What no JSON number can be is null. */
const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);
const times = (value: number | null, factor: number): number | null => finite(value === null ? null : value * factor);
/** keV without the division's last bit. */
const keV = (energyEv: number): number => Number(kevFromEv(energyEv).toPrecision(14));

/** Materials by the names that sentences use. */
export const namesOf = ({ feature, host }: ResolvedPlan) => ({
  feature: spoken(feature),
  host: spoken(host),
});

/** A material by the name that sentences use. */
export const spoken = ({ label, formula }: { label: string; formula: string | null }): string =>
  formula === label ? formulaText(label) : inSentence(label);

/** One point in the API's units. */
export function candidateOf(pick: PlanPick, plan: ResolvedPlan): Candidate {
  const { figures, plateau } = pick;
  const { geometry, beam } = figures;
  return {
    technique: figures.technique,
    why: [...pick.why],
    allowed: figures.forbiddenBy === null && figures.objective !== null,
    energyKeV: keV(figures.energyEv),
    distanceM: geometry.distanceM,
    magnification: geometry.magnification,
    effectiveDistanceM: geometry.effectiveDistanceM,
    blurFwhmUm: blurFwhmUm(geometry.sigmaM),
    resolutionPerUm: geometry.resolutionPerM * 1e-6,
    nearFieldMeasure: figures.nearFieldMeasure,
    fresnelResolution: finite(figures.fresnelResolution),
    fresnelFeature: finite(figures.fresnelFeature),
    efficiency: beam.efficiency,
    transmission: beam.transmission,
    deltaMuPerCm: beam.deltaMuPerM / 100,
    deltaDelta: beam.deltaDelta,
    gamma: finite(beam.gamma),
    signalUm2: times(figures.signalM2, UM2_PER_M2),
    absorptionSignalUm2: times(figures.absorptionSignalM2, UM2_PER_M2),
    rankedSignalUm2: times(figures.rankedSignalM2, UM2_PER_M2),
    fluencePerUm2: times(figures.fluencePerM2, 1 / UM2_PER_M2),
    absorptionFluencePerUm2: times(figures.absorptionFluencePerM2, 1 / UM2_PER_M2),
    countsPerPixel: finite(figures.countsPerPixel),
    entranceDoseGy: finite(figures.entranceDoseGy),
    meanDoseGy: finite(figures.meanDoseGy),
    featureDoseGy: finite(figures.featureDoseGy),
    absorptionEntranceDoseGy: finite(figures.absorptionEntranceDoseGy),
    timeS: finite(figures.timeS),
    cnrContactPerPixel: finite(figures.cnrContactPerPixel),
    gain2d: finite(figures.gain2d),
    gainCt: finite(figures.gainCt),
    waveRatio: null,
    densitySensitivity: finite(pick.densitySensitivity),
    agreesInAllTables: pick.agreesInAllTables,
    plateau: plateau && {
      energyKeV: [keV(plateau.energyEv[0]), keV(plateau.energyEv[1])],
      distanceM: [...plateau.distanceM],
    },
    warnings: figures.checks
      .filter(({ holds }) => !holds)
      .map((warning) => ({ code: warning.code, message: warningText(warning, namesOf(plan)) })),
  };
}

const blurFwhmUm = (sigmaM: number): number => sigmaM * FWHM_PER_SIGMA * 1e6;

export function evaluateAnswer(pick: PlanPick, plan: ResolvedPlan, tables: ScatteringTables): EvaluateAnswer {
  return { table: { version: tables.version, tabulation: plan.task.tabulation }, candidate: candidateOf(pick, plan) };
}

export function rankAnswer(ranked: RankedPlan, plan: ResolvedPlan, tables: ScatteringTables, date: Date): RankAnswer {
  const { plane, task } = ranked;
  const { energiesEv, distancesM } = plane.grid;
  const width = distancesM.length;
  // Per m² inside, per µm² outside.
  const unit = task.objective === "fluence" ? 1 / UM2_PER_M2 : 1;
  const rows = <T>(at: (place: number) => T): T[][] =>
    energiesEv.map((_, i) => distancesM.map((__, j) => at(i * width + j)));
  const objective = rows((place) => finite(plane.objective[place]! * unit));
  return {
    table: { version: tables.version, tabulation: task.tabulation },
    verdict: {
      summary: verdictSummary(ranked),
      choice: ranked.choice,
      doseAdvantage: finite(ranked.doseAdvantage),
    },
    candidates: ranked.candidates.map((pick) => candidateOf(pick, plan)),
    absorptionBest: ranked.absorptionBest && candidateOf(ranked.absorptionBest, plan),
    plane: {
      energiesKeV: energiesEv.map(keV),
      distancesM: [...distancesM],
      objective,
      allowed: rows((place) => plane.forbidden[place] === null && Number.isFinite(plane.objective[place]!)),
      forbiddenBy: rows((place) => plane.forbidden[place] ?? null),
    },
    citation: citation(tables.version, task.tabulation, date),
  };
}
