/** A pair plan as people and scripts state it: feature, host, layers, setup, use and limits. One schema for pages, API and worker. */
import { z } from "zod";
import { tabulationSchema } from "./constants.ts";
import { materialSchema } from "./material.ts";
import { OBJECTIVES, PLAN_LIMITS, SHAPES, USES } from "./plan-choices.ts";

const micrometres = (what: string, low = 0.001): z.ZodNumber =>
  z
    .number()
    .min(low)
    .max(1_000_000)
    .meta({ description: `${what}, µm.` });
const spacing = z
  .enum(["log", "linear"])
  .optional()
  .meta({ description: "How steps are spaced; log where it is left out, linear where the range begins at 0." });
const count = z.number().int().min(1).max(200);

const energyRange = z
  .strictObject({ from: z.number().positive(), to: z.number().positive(), count, spacing })
  .refine(({ from, to }) => from <= to, {
    error: "The range runs downwards. Give the smaller energy as from.",
    path: ["from"],
    params: { code: "rangeReversed" },
  })
  .meta({ id: "PlanEnergyRange" });
const distanceRange = z
  .strictObject({ from: z.number().min(0).max(10_000), to: z.number().min(0).max(10_000), count, spacing })
  .refine(({ from, to }) => from <= to, {
    error: "The range runs downwards. Give the smaller distance as from.",
    path: ["from"],
    params: { code: "rangeReversed" },
  })
  .refine(({ from, spacing: spaced }) => from > 0 || spaced !== "log", {
    error: "A range from 0 has no even steps in the logarithm. Leave spacing out, or begin above 0.",
    path: ["spacing"],
    params: { code: "logOfZero" },
  })
  .meta({ id: "PlanDistanceRange" });

export const energyChoiceSchema = z.union(
  [z.array(z.number().positive()).min(1).max(PLAN_LIMITS.energies), energyRange],
  {
    error: "a list of energies in keV, or a range with from, to and count",
  },
);
export const distanceChoiceSchema = z.union(
  [z.array(z.number().min(0).max(10_000)).min(1).max(PLAN_LIMITS.distances), distanceRange],
  { error: "a list of distances in m, or a range with from, to and count" },
);

const efficiency = z
  .union(
    [
      z.number().positive().max(1),
      z.strictObject({ scintillator: materialSchema, thicknessUm: micrometres("Thickness of the screen") }),
    ],
    { error: "a number above 0 and up to 1, or a scintillator with its thicknessUm" },
  )
  .meta({
    description:
      "Share of photons that is detected; left out, a screen of Lu3Al5O12 ten times as thick as the blur or pixel.",
  });

const fluxCurve = z
  .array(z.tuple([z.number().positive(), z.number().min(0)]))
  .min(2)
  .max(PLAN_LIMITS.fluxRows)
  .refine((rows) => rows.every(([energy], index) => index === 0 || energy > (rows[index - 1] as [number, number])[0]), {
    error: "The energies of the flux curve must rise from row to row.",
    params: { code: "energiesNotRising" },
  });

const instrument = {
  sourceDistanceM: z
    .number()
    .min(0.001)
    .max(10_000)
    .nullable()
    .meta({ description: "Source to the middle of the sample, m; null for a parallel beam." }),
  sourceFwhmUm: z.number().min(0).max(100_000).meta({ description: "Source size, FWHM, µm." }),
  detectorFwhmUm: z
    .number()
    .min(0)
    .max(100_000)
    .meta({ description: "Blur of screen and optics without the pixel, FWHM, µm." }),
  pixelUm: micrometres("Detector pixel"),
  efficiency: efficiency.optional().nullable(),
  bandwidth: z
    .number()
    .min(0)
    .max(0.6)
    .optional()
    .meta({ description: "FWHM of the photon spectrum over its energy; 0 where it is left out." }),
  fluxPerSMm2: z
    .union([z.number().positive(), fluxCurve], {
      error: "a number, photons per second and mm², or rows of [energy in keV, photons per second and mm²]",
    })
    .optional()
    .nullable()
    .meta({ description: "Flux density at the first layer; without it no times are given." }),
};

const keptSetup = z
  .strictObject({ setupId: z.string().min(1).max(64).meta({ description: "Id of an example setup." }) })
  .meta({ id: "KeptSetup" });
const SETUP_FORMS = "a setup: setupId, or its figures";

const statedSetup = z
  .strictObject({ ...instrument, energiesKeV: energyChoiceSchema, distancesM: distanceChoiceSchema })
  .meta({ id: "StatedSetup" });

export const rankSetupSchema = z.union([keptSetup, statedSetup], { error: SETUP_FORMS }).meta({ id: "RankSetup" });
export const evaluateSetupSchema = z
  .union([keptSetup, z.strictObject(instrument).meta({ id: "StatedInstrument" })], { error: SETUP_FORMS })
  .meta({ id: "EvaluateSetup" });

/** Example setups, as a list. */
export const exampleSetupsSchema = z
  .strictObject({
    items: z.array(z.strictObject({ id: z.string(), name: z.string(), about: z.string(), setup: statedSetup })),
  })
  .meta({ id: "ExampleSetups" });

export const featureSchema = z
  .strictObject({
    material: materialSchema,
    shape: z.enum(SHAPES),
    sizeUm: micrometres("Diameter of a sphere or fibre, depth of a layer along the beam"),
    lengthUm: micrometres("Visible length of a fibre or layer; 5 times the size where it is left out").optional(),
    widthUm: micrometres("Width of a layer across the beam").optional(),
  })
  .refine(({ shape, widthUm }) => shape !== "layer" || widthUm !== undefined, {
    error: "A layer needs its width across the beam, widthUm.",
    path: ["widthUm"],
    params: { code: "missing" },
  })
  .refine(({ shape, widthUm }) => shape === "layer" || widthUm === undefined, {
    error: "Only a layer has a width of its own. Leave widthUm out.",
    path: ["widthUm"],
    params: { code: "notForThisShape" },
  })
  .refine(({ shape, lengthUm }) => shape !== "sphere" || lengthUm === undefined, {
    error: "A sphere has no length of its own. Leave lengthUm out.",
    path: ["lengthUm"],
    params: { code: "notForThisShape" },
  })
  .meta({ id: "Feature" });

const thicknessMm = z.number().min(1e-6).max(10_000);

const common = {
  feature: featureSchema,
  host: z.strictObject({ material: materialSchema, thicknessMm }).meta({ id: "Host" }),
  layers: z
    .array(z.strictObject({ material: materialSchema, thicknessMm, position: z.enum(["before", "after"]) }))
    .max(PLAN_LIMITS.layers)
    .optional(),
  use: z.enum([...USES, "several"]).refine((use) => use !== "several", {
    error: `Several distances are not ranked yet. Ask for ${USES.slice(0, -1).join(", ")} or ${USES.at(-1) as string}.`,
    params: { code: "useNotOffered" },
  }),
  threshold: z
    .number()
    .min(0.1)
    .max(1000)
    .optional()
    .meta({ description: "Detectability asked for; 5 (Rose) where it is left out." }),
  minimumCounts: z
    .number()
    .min(0)
    .max(1e9)
    .optional()
    .meta({ description: "Least detected photons per pixel; 100 where it is left out, 0 for no floor." }),
  nearFieldLimit: z
    .number()
    .min(0.01)
    .max(PLAN_LIMITS.nearField)
    .optional()
    .meta({ description: "Largest πλR'u² of retrieval and tomography; 0.8 where it is left out." }),
  projections: z
    .number()
    .int()
    .min(1)
    .max(1_000_000)
    .optional()
    .meta({ description: "Of a tomography; π/2 × host thickness / pixel." }),
  objective: z
    .enum(OBJECTIVES)
    .optional()
    .meta({ description: "What is least at the best point; dose where it is left out." }),
  limits: z
    .strictObject({
      doseGy: z.number().positive().max(1e15).optional(),
      timeS: z.number().positive().max(1e12).optional(),
      transmission: z
        .tuple([z.number().min(0).max(1), z.number().min(0).max(1)])
        .refine(([low, high]) => low < high, {
          error: "The smaller transmission comes first.",
          params: { code: "rangeReversed" },
        })
        .optional(),
    })
    .optional(),
  tabulation: tabulationSchema.optional(),
  waveCheck: z.literal(false, { error: "The wave-optical check is not offered yet. Leave waveCheck out." }).optional(),
};

export const rankRequestSchema = z.strictObject({ ...common, setup: rankSetupSchema }).meta({ id: "RankRequest" });
export const evaluateRequestSchema = z
  .strictObject({
    ...common,
    setup: evaluateSetupSchema,
    energyKeV: z.number().positive(),
    distanceM: z.number().min(0).max(10_000),
  })
  .meta({ id: "EvaluateRequest" });

export type RankRequest = z.infer<typeof rankRequestSchema>;
export type EvaluateRequest = z.infer<typeof evaluateRequestSchema>;
export type StatedSetup = Exclude<RankRequest["setup"], { setupId: string }>;
export type FeatureStatement = z.infer<typeof featureSchema>;
