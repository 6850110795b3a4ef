/** One handbook entry as its file holds it. Ids never change: plans and links name them. */
import { z } from "zod";

const symbol = z.string().regex(/^[A-Z][a-z]?$/);

export const handbookEntrySchema = z
  .strictObject({
    id: z
      .string()
      .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
      .max(64),
    name: z.string().min(1).max(80),
    /** Abbreviations, common and trade names, spelling variants: search words. */
    alsoKnownAs: z.array(z.string().min(1).max(80)),
    formula: z.string().max(256).nullable(),
    /** By element symbol; they sum to 1. */
    massFractions: z.record(symbol, z.number().positive().max(1)).nullable(),
    densityGCm3: z.number().min(0).max(50),
    densityUncertaintyPercent: z.number().positive().max(100).nullable(),
    tags: z.array(z.string().min(1).max(40)).min(1),
    /** A published table, or "from memory, common handbook value". */
    source: z.string().min(1).max(300),
    note: z.string().max(400).optional(),
  })
  .refine((entry) => entry.id === "vacuum" || (entry.formula === null) !== (entry.massFractions === null), {
    message: "An entry has a formula or mass fractions, never both; only vacuum has neither.",
  });

export type HandbookEntry = z.infer<typeof handbookEntrySchema>;
export const handbookFileSchema = z.array(handbookEntrySchema);
