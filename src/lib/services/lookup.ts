/** The constants look-up on the server: a question from the address to everything the page and its island need. */
import { answerQuestion, type Answer } from "#src/lib/lookup/answer.ts";
import { type KnownMaterial, materialFinder, type MaterialFinder } from "#src/lib/lookup/finder.ts";
import { type Question, readQuestion } from "#src/lib/lookup/question.ts";
import { readRecipe } from "#src/lib/lookup/recipe.ts";
import { type View, viewOf } from "#src/lib/lookup/view.ts";
import type { MaterialLookup } from "#src/lib/materials/resolve.ts";
import { tableInfo, type TableInfo } from "#src/lib/tables/info.ts";
import { allMaterials, getMaterial, searchMaterials } from "./materials.ts";
import { getTables } from "./tables.ts";

export interface LookupPage {
  readonly question: Question;
  readonly answer: Answer;
  readonly view: View;
  /** Handbook entries that the question names. */
  readonly known: readonly KnownMaterial[];
  readonly tables: TableInfo;
}

export async function lookUp(query: URLSearchParams): Promise<LookupPage> {
  const question = readQuestion(query);
  const tables = await getTables();
  const finder = handbookFinder();
  const answer = answerQuestion(question, tables, finder);
  return { question, answer, view: viewOf(answer), known: namedIn(question, finder), tables: tableInfo(tables) };
}

let finder: MaterialFinder | null = null;

/** Made once: the handbook does not change while the process runs. */
export function handbookFinder(): MaterialFinder {
  finder ??= materialFinder(allMaterials(), searchMaterials);
  return finder;
}

/** Handbook compositions by id, for statements in requests; null for a revision that there is not. */
export const materialLookup: MaterialLookup = (materialId, revision) => {
  const kept = getMaterial(materialId);
  return kept && (revision === undefined || revision === kept.revision) ? kept : null;
};

function namedIn(question: Question, handbook: MaterialFinder): KnownMaterial[] {
  const words = [
    question.material,
    ...readRecipe(question.parts).map((line) => line.material),
    ...question.with.split("\n").flatMap((line) => line.split(/[;\t]/).slice(0, 2)),
  ];
  const found = words.flatMap((word) => handbook.find(word.trim()) ?? []);
  const formulas = words.flatMap((word) => handbook.ofFormula(word.trim()));
  return [...new Map([...found, ...formulas].map((material) => [material.id, slimMaterial(material)])).values()];
}

/** Only what the island computes with: the page carries no more than it needs. */
export function slimMaterial({
  id,
  name,
  alsoKnownAs,
  formula,
  massFractions,
  densityGCm3,
  densityUncertaintyPercent,
}: KnownMaterial): KnownMaterial {
  return {
    id,
    name,
    alsoKnownAs,
    formula,
    massFractions: formula === null ? massFractions : null,
    densityGCm3,
    densityUncertaintyPercent,
  };
}
