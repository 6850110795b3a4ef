/**
 * A material as people and scripts state it: one schema for forms, the API and its document.
 * Four ways: a formula with its density; a kept material by id; a mixture of parts; a solution by concentration.
 */
import { z } from "zod";

export const MATERIAL_LIMITS = {
  components: 32,
  nesting: 5,
  densityGCm3: 50,
  concentrationMgPerMl: 20_000,
  formulaCharacters: 256,
} as const;

const density = z
  .number()
  .positive()
  .max(MATERIAL_LIMITS.densityGCm3)
  .meta({ description: "Density in g/cm³, above 0 and up to 50." });

const common = {
  densityUncertaintyPercent: z
    .number()
    .min(0)
    .max(100)
    .optional()
    .meta({ description: "Standard uncertainty of the density in percent; 1 where it is left out." }),
  solidFraction: z
    .number()
    .positive()
    .max(1)
    .optional()
    .meta({ description: "Share of the volume that is solid, for porous or packed matter; 1 where it is left out." }),
};

export const formulaMaterialSchema = z
  .strictObject({
    formula: z
      .string()
      .min(1)
      .meta({ description: "IUPAC notation, at most 256 characters: Ca5(PO4)3OH, CuSO4·5H2O." }),
    densityGCm3: density,
    ...common,
  })
  .meta({ id: "FormulaMaterial" });

export const keptMaterialSchema = z
  .strictObject({
    materialId: z.string().min(1).max(64).meta({ description: "Id of a handbook or team material." }),
    revision: z.number().int().positive().optional(),
    ...common,
  })
  .meta({ id: "KeptMaterial" });

// As a part, a formula needs a density only by volume or where the density of the whole is to be estimated.
export const formulaPartSchema = formulaMaterialSchema
  .extend({ densityGCm3: density.optional() })
  .meta({ id: "FormulaPart" });

export const mixtureMaterialSchema = z
  .strictObject({
    get components() {
      return z.array(componentSchema).min(1).max(MATERIAL_LIMITS.components).meta({ id: "Components" });
    },
    basis: z.enum(["mass", "volume", "mole"]),
    densityGCm3: density.optional(),
    ...common,
  })
  .meta({ id: "Mixture" });

export const solutionMaterialSchema = z
  .strictObject({
    get solvent() {
      return partSchema;
    },
    get solutes() {
      return z
        .array(soluteSchema)
        .min(1)
        .max(MATERIAL_LIMITS.components - 1)
        .meta({ id: "Solutes" });
    },
    densityGCm3: density.optional(),
    ...common,
  })
  .meta({ id: "Solution" });

const fraction = {
  fraction: z.number().min(0).max(1.001).meta({ description: "Share of the whole; shares sum to 1 within 0.001." }),
};
const concentration = {
  mgPerMl: z
    .number()
    .positive()
    .max(MATERIAL_LIMITS.concentrationMgPerMl)
    .meta({ description: "Milligrams per millilitre of solution." }),
};

// Return types are written out because the definitions refer to each other.
export type FormulaMaterial = z.infer<typeof formulaMaterialSchema>;
export type KeptMaterial = z.infer<typeof keptMaterialSchema>;
interface Common {
  densityUncertaintyPercent?: number | undefined;
  solidFraction?: number | undefined;
}
export interface FormulaPart extends Common {
  formula: string;
  densityGCm3?: number | undefined;
}
export interface MixtureMaterial extends Common {
  components: Component[];
  basis: "mass" | "volume" | "mole";
  densityGCm3?: number | undefined;
}
export interface SolutionMaterial extends Common {
  solvent: PartStatement;
  solutes: Solute[];
  densityGCm3?: number | undefined;
}
export type PartStatement = FormulaPart | KeptMaterial | MixtureMaterial | SolutionMaterial;
export type Component = PartStatement & { fraction: number };
export type Solute = PartStatement & { mgPerMl: number };
export type MaterialStatement = FormulaMaterial | KeptMaterial | MixtureMaterial | SolutionMaterial;

const PART_FORMS = "a part: formula, or materialId, or components with basis, or solvent with solutes";

const partSchema: z.ZodType<PartStatement> = z
  .lazy(() =>
    z.union([formulaPartSchema, keptMaterialSchema, mixtureMaterialSchema, solutionMaterialSchema], {
      error: PART_FORMS,
    }),
  )
  .meta({ id: "Part" });
const componentSchema: z.ZodType<Component> = z
  .lazy(() =>
    z.union(
      [
        formulaPartSchema.extend(fraction),
        keptMaterialSchema.extend(fraction),
        mixtureMaterialSchema.extend(fraction),
        solutionMaterialSchema.extend(fraction),
      ],
      { error: `${PART_FORMS}; each with fraction` },
    ),
  )
  .meta({ id: "Component" }) as z.ZodType<Component>;
const soluteSchema: z.ZodType<Solute> = z
  .lazy(() =>
    z.union(
      [
        formulaPartSchema.extend(concentration),
        keptMaterialSchema.extend(concentration),
        mixtureMaterialSchema.extend(concentration),
        solutionMaterialSchema.extend(concentration),
      ],
      { error: `${PART_FORMS}; each with mgPerMl` },
    ),
  )
  .meta({ id: "Solute" }) as z.ZodType<Solute>;

export const materialSchema: z.ZodType<MaterialStatement> = z
  .union([formulaMaterialSchema, keptMaterialSchema, mixtureMaterialSchema, solutionMaterialSchema], {
    error: "a material: formula with densityGCm3, or materialId, or components with basis, or solvent with solutes",
  })
  .meta({ id: "MaterialStatement" });
