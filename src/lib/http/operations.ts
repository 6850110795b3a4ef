/** Every operation of the API, for its document and the tests that call each one. */
import { z } from "zod";
import {
  constantsAnswerSchema,
  constantsBatchRequestSchema,
  constantsRequestSchema,
  factorsAnswerSchema,
  tabulationSchema,
} from "#src/lib/schemas/constants.ts";
import { materialItemSchema, materialsListSchema } from "#src/lib/schemas/materials-list.ts";
import { evaluateAnswerSchema, rankAnswerSchema } from "#src/lib/schemas/plan-answer.ts";
import { evaluateRequestSchema, exampleSetupsSchema, rankRequestSchema } from "#src/lib/schemas/plan.ts";
import { healthSchema, problemSchema } from "./problem-schema.ts";

type Place = "query" | "path";

interface Parameter {
  readonly name: string;
  readonly in: Place;
  readonly required: boolean;
  readonly description: string;
  readonly schema: z.ZodType;
  readonly example: string;
}

export interface Operation {
  readonly method: "get" | "post";
  readonly path: string;
  readonly id: string;
  readonly summary: string;
  readonly parameters: readonly Parameter[];
  readonly body?: z.ZodType;
  readonly answer: z.ZodType;
  /** Problems beside those every operation may answer. */
  readonly problems: readonly number[];
}

const text = (name: string, description: string, example: string, more: Partial<Parameter> = {}): Parameter => ({
  name,
  in: "query",
  required: false,
  description,
  example,
  schema: z.string(),
  ...more,
});
const tabulation = text("tabulation", "Table that gives the values; epdl97 where it is left out.", "epdl97", {
  schema: tabulationSchema,
});

export const constantsBatchAnswerSchema = z
  .strictObject({ results: z.array(z.union([constantsAnswerSchema, problemSchema])) })
  .meta({ id: "ConstantsBatchAnswer" });

/** Every operation of the API. A route that is served without standing here fails a test. */
export const OPERATIONS: readonly Operation[] = [
  {
    method: "get",
    path: "/constants",
    id: "getConstants",
    summary: "Optical constants of a formula or a kept material",
    parameters: [
      text("formula", "IUPAC notation; goes with densityGCm3.", "H2O"),
      text("densityGCm3", "Density in g/cm³, above 0 and up to 50.", "1"),
      text("materialId", "Id of a kept material, instead of a formula.", "pmma"),
      text("energiesKeV", "Energies in keV, parted by commas; one row each, in this order.", "10,20", {
        required: true,
      }),
      tabulation,
    ],
    answer: constantsAnswerSchema,
    problems: [404, 422],
  },
  {
    method: "post",
    path: "/constants",
    id: "postConstants",
    summary: "Optical constants of any stated material: formula, kept material, mixture or solution",
    parameters: [],
    body: constantsRequestSchema,
    answer: constantsAnswerSchema,
    problems: [404, 413, 415, 422],
  },
  {
    method: "post",
    path: "/constants/batch",
    id: "postConstantsBatch",
    summary: "Many requests at once, each answered or refused by itself",
    parameters: [],
    body: constantsBatchRequestSchema,
    answer: constantsBatchAnswerSchema,
    problems: [413, 415, 422],
  },
  {
    method: "get",
    path: "/elements/{symbol}/factors",
    id: "getElementFactors",
    summary: "Scattering factors and cross sections of one element, as tabulated",
    parameters: [
      text("symbol", "Element symbol.", "Fe", { in: "path", required: true }),
      tabulation,
      text("version", "Table version; the answer is then immutable.", "1.0.0"),
    ],
    answer: factorsAnswerSchema,
    problems: [404, 422],
  },
  {
    method: "get",
    path: "/materials",
    id: "listMaterials",
    summary: "Handbook materials, searched by name, formula, other names and tags, best first",
    parameters: [
      text("query", "At most 64 characters; one or two wrong letters are forgiven.", "kapton"),
      text("limit", "From 1 to 100; 50 where it is left out.", "10"),
      text("cursor", "From the answer before.", ""),
    ],
    answer: materialsListSchema,
    problems: [422],
  },
  {
    method: "get",
    path: "/materials/{id}",
    id: "getMaterial",
    summary: "One material",
    parameters: [text("id", "Material id.", "pmma", { in: "path", required: true })],
    answer: materialItemSchema,
    problems: [404],
  },
  {
    method: "post",
    path: "/plans/evaluate",
    id: "evaluatePlan",
    summary: "Every figure of one energy at one distance, also where the use or a limit forbids it",
    parameters: [],
    body: evaluateRequestSchema,
    answer: evaluateAnswerSchema,
    problems: [404, 413, 415, 422],
  },
  {
    method: "post",
    path: "/plans/rank",
    id: "rankPlan",
    summary:
      "Energies and distances ranked for two materials in a sample on a setup, phase contrast against absorption",
    parameters: [],
    body: rankRequestSchema,
    answer: rankAnswerSchema,
    problems: [404, 413, 415, 422],
  },
  {
    method: "get",
    path: "/setups/examples",
    id: "listExampleSetups",
    summary: "Invented example setups, whose ids stand for their figures in plans",
    parameters: [],
    answer: exampleSetupsSchema,
    problems: [],
  },
  {
    method: "get",
    path: "/health",
    id: "getHealth",
    summary: "Whether the site can answer",
    parameters: [],
    answer: healthSchema,
    problems: [],
  },
  {
    method: "get",
    path: "/openapi.json",
    id: "getDocument",
    summary: "This document",
    parameters: [],
    answer: z.looseObject({ openapi: z.string() }),
    problems: [],
  },
];
