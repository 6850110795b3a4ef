/** What a ranked plan answers. Doses, fluences and times are those of the whole measurement; null is "no value", never 0. */
import { z } from "zod";
import { tabulationSchema } from "./constants.ts";

export const WHY_CODES = [
  "leastDose",
  "leastFluence",
  "shortestTime",
  "shortestDistance",
  "mostTransmitted",
  "besideEdge",
  "nextBest",
] as const;
export type WhyCode = (typeof WHY_CODES)[number];

export const WARNING_CODES = [
  "transmissionLow",
  "transmissionHigh",
  "nearEdge",
  "belowOneKeV",
  "nearFieldLeft",
  "contrastReversal",
  "linearTheoryLeft",
  "thickSample",
  "refractionShift",
  "nearlyMatched",
  "opposedPair",
  "phaseWrap",
  "sourceBlur",
  "undersampled",
  "countFloor",
  "fewCountsPerProjection",
  "insideSample",
] as const;
export type WarningCode = (typeof WARNING_CODES)[number];

export const FORBIDDEN_CODES = [
  "insideSample",
  "notInTable",
  "nearEdge",
  "undersampled",
  "contrastReversal",
  "nearFieldLeft",
  "transmissionLow",
  "transmissionHigh",
  "overDose",
  "overTime",
] as const;
export type ForbiddenCode = (typeof FORBIDDEN_CODES)[number];

const orNull = z.number().nullable();
const interval = z.tuple([z.number(), z.number()]);

export const candidateSchema = z
  .strictObject({
    technique: z.enum(["phase", "absorption"]),
    why: z.array(z.enum(WHY_CODES)),
    allowed: z.boolean(),
    energyKeV: z.number(),
    distanceM: z.number(),
    magnification: z.number(),
    effectiveDistanceM: z.number(),
    blurFwhmUm: z.number(),
    resolutionPerUm: z.number(),
    nearFieldMeasure: z.number(),
    fresnelResolution: orNull,
    fresnelFeature: orNull,
    efficiency: z.number(),
    transmission: z.number(),
    deltaMuPerCm: z.number(),
    deltaDelta: z.number(),
    gamma: orNull,
    signalUm2: orNull,
    absorptionSignalUm2: orNull,
    rankedSignalUm2: orNull,
    fluencePerUm2: orNull,
    absorptionFluencePerUm2: orNull,
    countsPerPixel: orNull,
    entranceDoseGy: orNull,
    meanDoseGy: orNull,
    featureDoseGy: orNull,
    absorptionEntranceDoseGy: orNull,
    timeS: orNull,
    cnrContactPerPixel: orNull,
    gain2d: orNull,
    gainCt: orNull,
    waveRatio: orNull,
    densitySensitivity: orNull,
    agreesInAllTables: z.boolean().nullable(),
    plateau: z.strictObject({ energyKeV: interval, distanceM: interval }).nullable(),
    warnings: z.array(z.strictObject({ code: z.enum(WARNING_CODES), message: z.string() })),
  })
  .meta({ id: "Candidate" });

const table = z.strictObject({ version: z.string(), tabulation: tabulationSchema });

export const evaluateAnswerSchema = z
  .strictObject({ table, candidate: candidateSchema })
  .meta({ id: "EvaluateAnswer" });

export const rankAnswerSchema = z
  .strictObject({
    table,
    verdict: z.strictObject({
      summary: z.string(),
      choice: z.enum(["phase", "absorption", "either", "none"]),
      doseAdvantage: orNull,
    }),
    candidates: z.array(candidateSchema),
    absorptionBest: candidateSchema.nullable(),
    plane: z.strictObject({
      energiesKeV: z.array(z.number()),
      distancesM: z.array(z.number()),
      objective: z.array(z.array(orNull)),
      allowed: z.array(z.array(z.boolean())),
      forbiddenBy: z.array(z.array(z.enum(FORBIDDEN_CODES).nullable())),
    }),
    citation: z.string(),
  })
  .meta({ id: "RankAnswer" });

export type Candidate = z.infer<typeof candidateSchema>;
export type RankAnswer = z.infer<typeof rankAnswerSchema>;
export type EvaluateAnswer = z.infer<typeof evaluateAnswerSchema>;
