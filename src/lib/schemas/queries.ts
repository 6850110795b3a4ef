/** Query keys of the look-up addresses: texts, read strictly, with the same hints as on pages. */
import { z } from "zod";
import { CONSTANTS_LIMITS, tabulationSchema } from "./constants.ts";

/** A plain decimal number as text. Decimal commas, other scripts' digits, NaN and what overflows are told apart. */
export function numberText(what: string) {
  return z
    .string()
    .max(64)
    .transform((text, context) => {
      const told = (code: string, message: string): never => {
        context.addIssue({ code: "custom", params: { code }, message });
        return z.NEVER;
      };
      if (/^[+-]?\d+,\d+$/.test(text)) return told("decimalComma", `Write ${text.replace(",", ".")}, with a point.`);
      if (!/^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d{1,4})?$/.test(text))
        return told(
          "notANumber",
          `“${text.slice(0, 24)}” is not a number. Write ${what} with the digits 0 to 9 and a decimal point.`,
        );
      const value = Number(text);
      if (!Number.isFinite(value)) return told("notFinite", `${text.slice(0, 24)} is too large for a number.`);
      if (value === 0 && /[1-9]/.test(text.split(/[eE]/)[0] ?? ""))
        return told("underflow", `${text.slice(0, 24)} is too small for a number: it would become 0.`);
      return value;
    });
}

const energiesText = z
  .string({ error: "energies in keV, parted by commas, such as 10,20" })
  .min(1)
  .max(32 * CONSTANTS_LIMITS.energies)
  .transform((text, context) => {
    const entries = text.split(",");
    if (entries.length > CONSTANTS_LIMITS.energies) {
      context.addIssue({
        code: "custom",
        params: { code: "tooLong" },
        message: `${entries.length} energies were given; the limit is ${CONSTANTS_LIMITS.energies}.`,
      });
      return z.NEVER;
    }
    const number = numberText("energies in keV, parted by commas,").pipe(z.number().positive().max(1e6));
    return entries.map((entry) => {
      const read = number.safeParse(entry.trim());
      if (read.success) return read.data;
      const issue = read.error.issues[0];
      context.addIssue({
        code: "custom",
        params: { code: issue?.code === "custom" ? issue.params?.["code"] : "outOfRange" },
        message:
          issue?.code === "custom"
            ? issue.message
            : `${entry.slice(0, 24)} keV is not a photon energy. Energies are above 0.`,
      });
      return z.NEVER as never;
    });
  });

export const constantsQuerySchema = z
  .strictObject({
    formula: z.string().min(1).optional(),
    densityGCm3: numberText("a density in g/cm³").optional(),
    materialId: z.string().min(1).max(64).optional(),
    energiesKeV: energiesText,
    tabulation: tabulationSchema.optional(),
  })
  .refine(({ formula, materialId }) => (formula === undefined) !== (materialId === undefined), {
    params: { code: "oneOf" },
    message: "Name the material once: formula with densityGCm3, or materialId.",
  })
  .refine(({ formula, densityGCm3 }) => (formula === undefined) === (densityGCm3 === undefined), {
    path: ["densityGCm3"],
    params: { code: "densityMissing" },
    message: "densityGCm3 goes with formula: give both, or neither with materialId.",
  });

export const factorsQuerySchema = z.strictObject({
  tabulation: tabulationSchema.optional(),
  version: z.string().max(32).optional(),
});

export const listQuerySchema = z.strictObject({
  query: z.string().max(64).optional(),
  limit: numberText("a whole number from 1 to 100").pipe(z.number().int().min(1).max(100)).optional(),
  cursor: z.string().max(200).optional(),
});
