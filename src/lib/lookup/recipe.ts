/**
 * Recipes as text, one part a line: `share; material; density`. A line that begins with dashes is a part of the line above it
 * that has one dash fewer; such a line's material is only a name, and a fourth field may say how its parts are counted.
 *
 *     91.5; water
 *     2; agarose
 *     5; Buffer salts; 2.2
 *     - 82; NaCl
 *     - 18; K2HPO4
 *
 * By concentration the solvent's share is left empty and the others are mg/mL of solution.
 */
import type { Component, MaterialStatement, PartStatement, Solute } from "#src/lib/schemas/material.ts";
import type { MixtureBasisChoice } from "./question.ts";

export interface RecipeLine {
  readonly depth: number;
  readonly share: string;
  readonly material: string;
  readonly density: string;
  readonly basis: string;
}

export class RecipeError extends Error {
  override readonly name = "RecipeError";
  /** From 0. */
  readonly line: number;
  constructor(line: number, message: string) {
    super(message);
    this.line = line;
  }
}

/** Largest excess of a sum of shares over 100 % that counts as rounding. */
const SUM_TOLERANCE_PERCENT = 0.1;

export function readRecipe(text: string): RecipeLine[] {
  return text
    .split("\n")
    .filter((line) => line.trim() !== "")
    .map((line) => {
      const [, dashes = "", rest = ""] = /^\s*(-*)\s*(.*)$/.exec(line) ?? [];
      const [share = "", material = "", density = "", basis = ""] = rest.split(/[;\t]/).map((field) => field.trim());
      return { depth: dashes.length, share, material, density, basis };
    });
}

export function writeRecipe(lines: readonly RecipeLine[]): string {
  return lines
    .map(({ depth, share, material, density, basis }) => {
      const fields = [share, material, density, basis];
      while (fields.length > 2 && fields.at(-1) === "") fields.pop();
      return `${"-".repeat(depth)}${depth > 0 ? " " : ""}${fields.join("; ")}`;
    })
    .join("\n");
}

export interface RecipeReading {
  readonly statement: MaterialStatement;
  /** The sum of the shares where it was below 100 and they were scaled up, or null. */
  readonly scaledFromPercent: number | null;
}

/** How a line's words become a part: a kept material or a formula, with its density if one is given. */
export type PartReader = (words: string, density: string, line: number) => PartStatement;

/** @throws RecipeError, or what `readPart` throws */
export function recipeStatement(
  text: string,
  by: MixtureBasisChoice,
  densityGCm3: number | undefined,
  readPart: PartReader,
): RecipeReading {
  const lines = readRecipe(text);
  if (lines.length === 0) throw new RecipeError(0, "The recipe has no parts. Write one a line, such as 91.5; water.");
  const reader = new RecipeReader(lines, readPart);
  const density = densityGCm3 === undefined ? {} : { densityGCm3 };
  if (by === "concentration") return { statement: { ...reader.solution(), ...density }, scaledFromPercent: null };
  const { components, sum } = reader.components(0, 0);
  return {
    statement: { components, basis: by, ...density },
    scaledFromPercent: Math.abs(sum - 100) > SUM_TOLERANCE_PERCENT ? sum : null,
  };
}

class RecipeReader {
  constructor(
    private readonly lines: readonly RecipeLine[],
    private readonly readPart: PartReader,
  ) {}

  components(start: number, depth: number): { components: Component[]; sum: number; end: number } {
    const found: { part: PartStatement; share: number }[] = [];
    let index = start;
    while (index < this.lines.length) {
      const line = this.lines[index] as RecipeLine;
      if (line.depth < depth) break;
      if (line.depth > depth)
        throw new RecipeError(
          index,
          `Line ${index + 1} has ${line.depth} dashes but the line above has ${depth - 1 < 0 ? 0 : depth}. Add one dash at a time.`,
        );
      const { part, end } = this.part(index, depth);
      found.push({ part, share: this.number(line.share, index, "%") });
      index = end;
    }
    const sum = found.reduce((total, { share }) => total + share, 0);
    if (sum > 100 + SUM_TOLERANCE_PERCENT) {
      throw new RecipeError(
        start,
        `The parts add up to ${Number(sum.toPrecision(6))} %. Take ${Number((sum - 100).toPrecision(4))} % from one of them, or scale all.`,
      );
    }
    if (!(sum > 0)) throw new RecipeError(start, "All shares are 0. Give each part its share in percent.");
    return { components: found.map(({ part, share }) => ({ ...part, fraction: share / sum })), sum, end: index };
  }

  solution(): { solvent: PartStatement; solutes: Solute[] } {
    let solvent: PartStatement | null = null;
    const solutes: Solute[] = [];
    for (let index = 0; index < this.lines.length;) {
      const line = this.lines[index] as RecipeLine;
      const { part, end } = this.part(index, 0);
      if (line.share === "" || line.share.toLowerCase() === "solvent") {
        if (solvent)
          throw new RecipeError(
            index,
            `Line ${index + 1} is a second solvent. Mix the solvents by mass or volume first, on lines with a dash under one name.`,
          );
        solvent = part;
      } else {
        solutes.push({ ...part, mgPerMl: this.number(line.share, index, "mg/mL") });
      }
      index = end;
    }
    if (!solvent) throw new RecipeError(0, "No solvent is named. Leave the number of one line empty: ; water.");
    if (solutes.length === 0) throw new RecipeError(0, "Nothing is dissolved. Add a line such as 50; KI for 50 mg/mL.");
    return { solvent, solutes };
  }

  private part(index: number, depth: number): { part: PartStatement; end: number } {
    const line = this.lines[index] as RecipeLine;
    if (line.material === "")
      throw new RecipeError(index, `Line ${index + 1} names no material. Write share; material.`);
    if (this.lines[index + 1]?.depth !== depth + 1)
      return { part: this.readPart(line.material, line.density, index), end: index + 1 };
    const basis = line.basis === "" ? "mass" : line.basis;
    if (basis !== "mass" && basis !== "volume" && basis !== "mole") {
      throw new RecipeError(
        index,
        `“${basis.slice(0, 20)}” in line ${index + 1} is not a way to count. Write mass, volume or mole.`,
      );
    }
    const { components, end } = this.components(index + 1, depth + 1);
    const density = line.density === "" ? {} : { densityGCm3: this.number(line.density, index, "g/cm³") };
    return { part: { components, basis, ...density }, end };
  }

  private number(text: string, index: number, unit: string): number {
    const plain = text.replace(/\s*(%|mg\/m[lL]|g\/cm3|g\/cm³)$/, "");
    if (/^\d+,\d+$/.test(plain))
      throw new RecipeError(index, `Write ${plain.replace(",", ".")} in line ${index + 1}, with a point.`);
    if (!/^(\d+\.?\d*|\.\d+)$/.test(plain)) {
      throw new RecipeError(
        index,
        `“${text.slice(0, 20)}” in line ${index + 1} is not a number. Write a share in ${unit}, such as 12.5.`,
      );
    }
    return Number(plain);
  }
}
