/** Problem documents (RFC 9457) and the health answer, as schemas for the API's document and its tests. */
import { z } from "zod";
import { PROBLEM_KINDS, type ProblemCode } from "./problems.ts";

export const problemSchema = z
  .strictObject({
    type: z.string(),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    instance: z.string(),
    code: z.enum(Object.keys(PROBLEM_KINDS) as [ProblemCode, ...ProblemCode[]]),
    requestId: z.string(),
    errors: z.array(z.strictObject({ path: z.string(), code: z.string(), message: z.string() })).optional(),
  })
  .meta({ id: "Problem", description: "What happened, what was given, what is accepted and what to do." });

export const healthSchema = z
  .strictObject({ status: z.literal("ok"), tableVersion: z.string(), database: z.literal("ok") })
  .meta({ id: "Health" });
