/** Materials as lists and single answers give them. */
import { z } from "zod";

export const materialItemSchema = z
  .strictObject({
    id: z.string(),
    name: z.string(),
    alsoKnownAs: z.array(z.string()),
    formula: z.string().nullable(),
    massFractions: z
      .record(z.string(), z.number())
      .nullable()
      .meta({ description: "By element symbol; null for vacuum." }),
    densityGCm3: z.number(),
    densityUncertaintyPercent: z.number().nullable(),
    scope: z.enum(["handbook", "team"]),
    tags: z.array(z.string()),
    source: z.string(),
    revision: z.number().int(),
    status: z.enum(["draft", "approved"]),
    note: z.string().nullable(),
  })
  .meta({ id: "Material" });
export type MaterialItem = z.infer<typeof materialItemSchema>;

export const materialsListSchema = z
  .strictObject({ items: z.array(materialItemSchema), nextCursor: z.string().nullable() })
  .meta({ id: "MaterialsList" });
