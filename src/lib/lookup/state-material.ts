/** From the words of a question to a stated material and then to one that computes, with faults tied to the field at fault. */
import { densityGCm3, resolveMaterial, type ResolvedMaterial, StatementError } from "#src/lib/materials/resolve.ts";
import { FormulaError, parseFormula } from "#src/lib/physics/index.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import type { MaterialStatement, PartStatement } from "#src/lib/schemas/material.ts";
import type { KnownMaterial, MaterialFinder } from "./finder.ts";
import { mendedFormula } from "./mend.ts";
import type { Question } from "./question.ts";
import { RecipeError, recipeStatement } from "./recipe.ts";

export type QuestionField = keyof Question;

/** What is wrong with one field, and what to write instead. */
export interface FieldFault {
  readonly field: QuestionField;
  readonly message: string;
  /** From 1, in the field's text, where it is a formula. */
  readonly position: number | null;
  /** Texts that would be accepted in the field's place. */
  readonly suggestions: readonly { readonly text: string; readonly words: string }[];
}

export class QuestionError extends Error {
  override readonly name = "QuestionError";
  readonly fault: FieldFault;
  constructor(
    field: QuestionField,
    message: string,
    more: { position?: number | null; suggestions?: FieldFault["suggestions"] } = {},
  ) {
    super(message);
    this.fault = { field, message, position: more.position ?? null, suggestions: more.suggestions ?? [] };
  }
}

/** Runs `read`; any known error becomes a QuestionError of `field`. */
export function inField<T>(field: QuestionField, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (error instanceof QuestionError) {
      // What is wrong with a part or a further material is mended where that is written; its offers do not fit there.
      if (error.fault.field !== "material" || field === "material") throw error;
      throw new QuestionError(
        field,
        error.message.replace(
          ". Did you mean one of these?",
          `. Near it: ${error.fault.suggestions.map(({ words }) => words).join(", ")}.`,
        ),
      );
    }
    if (error instanceof FormulaError || error instanceof StatementError) {
      throw new QuestionError(field, error.message, {
        position: error.position,
        suggestions: error.suggestions.map((text) => ({ text, words: text })),
      });
    }
    if (error instanceof QuantityError || error instanceof RecipeError) throw new QuestionError(field, error.message);
    throw error;
  }
}

export interface StatedMaterial extends ResolvedMaterial {
  readonly statement: MaterialStatement;
  readonly kept: KnownMaterial | null;
  readonly densityGCm3: number;
  /** The sum of a recipe's shares where they were scaled up to 100 %. */
  readonly scaledFromPercent: number | null;
}

function readDensityGCm3(text: string): number | undefined {
  return text === "" ? undefined : parseQuantity(text, "density", { defaultUnit: "g/cm3" }) / 1000;
}

/** Words to a part: a kept material by any of its names, otherwise a formula. */
export function partOfWords(
  words: string,
  density: number | undefined,
  finder: MaterialFinder,
): PartStatement & { kept?: KnownMaterial } {
  const kept = finder.find(words);
  if (kept) {
    if (density === undefined || density === kept.densityGCm3) return { materialId: kept.id };
    return { components: [{ materialId: kept.id, fraction: 1 }], basis: "mass", densityGCm3: density };
  }
  const formula = formulaOfWords(words, finder);
  return density === undefined ? { formula } : { formula, densityGCm3: density };
}

/** Words that are no known name are a formula; where they do not look like one, the names spelt nearly so are offered. */
function formulaOfWords(words: string, finder: MaterialFinder): string {
  try {
    return parseFormula(words).text;
  } catch (error) {
    if (!(error instanceof FormulaError)) throw error;
    if (looksLikeFormula(words)) {
      throw new QuestionError("material", error.message, {
        position: error.position,
        suggestions: error.suggestions.map((suggestion) => {
          const text = mendedFormula(words, error, suggestion);
          return { text, words: text };
        }),
      });
    }
    const near = finder.near(words).slice(0, NEAR_NAMES);
    throw new QuestionError(
      "material",
      `No material is called “${words.slice(0, 40)}”, and it is not a formula either${near.length > 0 ? ". Did you mean one of these?" : ": write one such as SiO2."}`,
      {
        suggestions: [
          ...near.map(({ id, name }) => ({ text: id, words: name })),
          ...error.suggestions.map((text) => ({ text, words: text })),
        ].slice(0, NEAR_NAMES),
      },
    );
  }
}

const NEAR_NAMES = 4;

/** A capital or a bracket first, and a digit, a bracket or only few letters: then the fault is one of spelling a formula. */
export function looksLikeFormula(words: string): boolean {
  return /^[A-Z([]/.test(words) && !/\s/.test(words.trim()) && (/[0-9()[\]·]/.test(words) || words.length <= 4);
}

/** The question's main material. @throws QuestionError */
export function statedMaterial(question: Question, finder: MaterialFinder): StatedMaterial {
  const density = inField("density", () => readDensityGCm3(question.density));
  if (question.parts.trim() !== "") return recipeMaterial(question, density, finder);
  const statement = inField("material", () => materialOfWords(question.material, density, finder));
  return resolved(withSolidFraction(statement, question), question.material, finder, "material", null);
}

/** One line of further materials: `name; formula; density`, `name; density`, `formula; density` or a kept name. */
export function materialOfLine(line: string, finder: MaterialFinder): StatedMaterial {
  return inField("with", () => {
    const fields = line.split(/[;\t]/).map((field) => field.trim());
    const [first = "", second = "", third = ""] = fields;
    if (fields.length >= 3) {
      const named = resolved(
        materialOfWords(second || first, readDensityGCm3(third), finder),
        second || first,
        finder,
        "with",
        null,
      );
      return { ...named, label: first || named.label };
    }
    return resolved(materialOfWords(first, readDensityGCm3(second), finder), first, finder, "with", null);
  });
}

function materialOfWords(words: string, density: number | undefined, finder: MaterialFinder): MaterialStatement {
  if (words === "")
    throw new QuestionError("material", "No material is named. Write a name such as water, or a formula such as SiO2.");
  const part = partOfWords(words, density, finder);
  if ("formula" in part && part.densityGCm3 === undefined) {
    const same = finder.ofFormula(part.formula);
    throw new QuestionError(
      "density",
      `The density of ${part.formula} is needed${same.length > 0 ? "; the handbook has" : ". Write it as 2.65 g/cm3."}`,
      {
        suggestions: same.map((material) => ({
          text: `${material.densityGCm3} g/cm3`,
          words: `${material.densityGCm3} g/cm³, ${material.name}`,
        })),
      },
    );
  }
  return part as MaterialStatement;
}

function withSolidFraction(statement: MaterialStatement, question: Question): MaterialStatement {
  if (question.solid === "") return statement;
  const solidFraction = inField("solid", () => parseQuantity(question.solid, "fraction", { defaultUnit: "%" }));
  if (!(solidFraction > 0) || solidFraction > 1) {
    throw new QuestionError(
      "solid",
      `A solid share of ${question.solid.slice(0, 20)} is not accepted. Write one above 0 and up to 100 %.`,
    );
  }
  return { ...statement, solidFraction };
}

function recipeMaterial(question: Question, density: number | undefined, finder: MaterialFinder): StatedMaterial {
  const { statement, scaledFromPercent } = inField("parts", () =>
    recipeStatement(question.parts, question.by, density, (words, partDensity) =>
      partOfWords(words, readDensityGCm3(partDensity), finder),
    ),
  );
  return resolved(withSolidFraction(statement, question), "", finder, "parts", scaledFromPercent);
}

function resolved(
  statement: MaterialStatement,
  words: string,
  finder: MaterialFinder,
  field: QuestionField,
  scaledFromPercent: number | null,
): StatedMaterial {
  return inField(field, () => {
    try {
      const material = resolveMaterial(statement, finder.lookup);
      return {
        ...material,
        statement,
        kept: finder.find(words),
        densityGCm3: densityGCm3(material.material),
        scaledFromPercent,
      };
    } catch (error) {
      if (error instanceof StatementError && error.path === "/densityGCm3")
        throw new QuestionError("density", error.message);
      if (error instanceof StatementError && error.path === "/solidFraction")
        throw new QuestionError("solid", error.message);
      throw error;
    }
  });
}
