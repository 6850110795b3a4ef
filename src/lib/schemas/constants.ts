/** What is asked of and answered by the constants endpoints: one schema for handlers, document and tests. */
import { z } from "zod";
import { TABULATION_KEYS } from "#src/lib/physics/index.ts";
import { materialSchema } from "./material.ts";

export const CONSTANTS_LIMITS = {
  energies: 2000,
  batchItems: 100,
  /** Rows of all items of a batch together. */
  batchRows: 10_000,
} as const;

export const tabulationSchema = z
  .enum(TABULATION_KEYS)
  .meta({ description: "Table that gives the values; epdl97 where it is left out." });

const energyKeV = z.number().positive().max(1e6);

export const energyRangeSchema = z
  .strictObject({
    from: energyKeV,
    to: energyKeV,
    count: z.number().int().min(1).max(CONSTANTS_LIMITS.energies),
    spacing: z.enum(["log", "linear"]).optional(),
  })
  .refine(({ from, to }) => from <= to, {
    path: ["to"],
    params: { code: "rangeReversed" },
    message: "The range ends below its start. Swap from and to.",
  })
  .refine(({ from, to, count }) => count > 1 || from === to, {
    path: ["count"],
    params: { code: "tooFewPoints" },
    message: "A range with two ends needs a count of at least 2.",
  });

export const energiesSchema = z
  .union([z.array(energyKeV).min(1).max(CONSTANTS_LIMITS.energies), energyRangeSchema], {
    error: "a list of energies in keV, or a range { from, to, count, spacing }",
  })
  .meta({
    description:
      "Energies in keV: a list in any order, repeats allowed, one row each; or a range with both ends and a count, spaced in log energy unless told otherwise.",
  });

export const constantsRequestSchema = z
  .strictObject({ material: materialSchema, energiesKeV: energiesSchema, tabulation: tabulationSchema.optional() })
  .meta({ id: "ConstantsRequest" });
export type ConstantsRequest = z.infer<typeof constantsRequestSchema>;

/** The frame of a batch; what each item must be is judged item by item. */
export const constantsBatchFrameSchema = z.strictObject({
  items: z.array(z.unknown()).min(1).max(CONSTANTS_LIMITS.batchItems),
});

export const constantsBatchRequestSchema = z
  .strictObject({ items: z.array(constantsRequestSchema).min(1).max(CONSTANTS_LIMITS.batchItems) })
  .meta({
    id: "ConstantsBatchRequest",
    description: `At most ${CONSTANTS_LIMITS.batchItems} requests and ${CONSTANTS_LIMITS.batchRows} rows in all. Each is answered or refused by itself.`,
  });

const nullableNumber = z.number().nullable();
const interval = z.tuple([z.number(), z.number()]);

export const tableSchema = z.strictObject({ version: z.string(), tabulation: z.enum(TABULATION_KEYS) });
export const edgeSchema = z.strictObject({ element: z.string(), shell: z.string(), energyKeV: z.number() });

export const constantsRowSchema = z
  .strictObject({
    energyKeV: z.number(),
    wavelengthAngstrom: z.number(),
    delta: nullableNumber,
    beta: nullableNumber,
    betaEffective: nullableNumber,
    muPhotoPerCm: nullableNumber,
    muCoherentPerCm: nullableNumber,
    muIncoherentPerCm: nullableNumber,
    muTotalPerCm: nullableNumber,
    muEnergyAbsorptionPerCm: nullableNumber,
    attenuationLengthMm: nullableNumber,
    deltaOverBeta: nullableNumber,
    phasePerMicrometreRad: nullableNumber,
    criticalAngleMrad: nullableNumber,
    spread: z
      .strictObject({ delta: interval, beta: interval, muTotalPerCm: interval })
      .nullable()
      .meta({ description: "Least and greatest over the tables that cover the energy; null where only one does." }),
    notes: z.array(z.enum(["nearEdge", "belowOneKeV", "notInTable", "densityEstimated"])),
  })
  .meta({ id: "ConstantsRow" });

export const constantsAnswerSchema = z
  .strictObject({
    table: tableSchema,
    material: z.strictObject({
      label: z.string(),
      formula: z.string().nullable(),
      densityGCm3: z.number(),
      densityEstimated: z.boolean(),
      molarMassGPerMol: nullableNumber,
      massFractions: z.record(z.string(), z.number()),
      electronDensityPerA3: z.number(),
    }),
    edges: z
      .array(edgeSchema)
      .meta({ description: "Edges of the material's elements between the lowest and the highest energy asked for." }),
    rows: z.array(constantsRowSchema),
    citation: z.string(),
  })
  .meta({ id: "ConstantsAnswer" });
export type ConstantsAnswer = z.infer<typeof constantsAnswerSchema>;

export const factorsAnswerSchema = z
  .strictObject({
    table: tableSchema,
    symbol: z.string(),
    atomicNumber: z.number().int(),
    energiesKeV: z.array(z.number()).meta({ description: "Ascending; an edge stands twice, below then above." }),
    f1: z.array(nullableNumber),
    f2: z.array(nullableNumber),
    coherentCm2PerG: z.array(z.number()).nullable(),
    incoherentCm2PerG: z.array(z.number()).nullable(),
    energyAbsorptionCm2PerG: z.array(z.number()).nullable(),
    edges: z.array(z.strictObject({ shell: z.string(), energyKeV: z.number() })),
  })
  .meta({ id: "FactorsAnswer" });
export type FactorsAnswer = z.infer<typeof factorsAnswerSchema>;
