/** The constants look-up on the server: a question from the address to everything the page and its island need. */
import { answerQuestion, type Answer } from "#src/lib/lookup/answer.ts";
import { type KnownMaterial, materialFinder, type MaterialFinder } from "#src/lib/lookup/finder.ts";
import { type Question, readQuestion } from "#src/lib/lookup/question.ts";
import { readRecipe } from "#src/lib/lookup/recipe.ts";
import { type View, viewOf } from "#src/lib/lookup/view.ts";
import type { MaterialLookup } from "#src/lib/materials/resolve.ts";
import { TABULATION_KEYS, type ScatteringTables } from "#src/lib/physics/index.ts";
import type { TableInfo } from "#src/lib/tables/load.client.ts";
import { allMaterials } from "./materials.ts";
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
  finder ??= materialFinder(allMaterials());
  return finder;
}

/** Handbook compositions by id, for statements in requests. */
export const materialLookup: MaterialLookup = (materialId, revision) => handbookFinder().lookup(materialId, revision);

function namedIn(question: Question, handbook: MaterialFinder): KnownMaterial[] {
  const words = [
    question.material,
    ...readRecipe(question.parts).map((line) => line.material),
    ...question.with.split("\n").flatMap((line) => line.split(/[;\t]/).slice(0, 2)),
  ];
  const found = words.flatMap((word) => handbook.find(word.trim()) ?? []);
  const formulas = words.flatMap((word) => handbook.ofFormula(word.trim()));
  return [...new Map([...found, ...formulas].map((material) => [material.id, slim(material)])).values()];
}

/** Only what the island computes with: the page carries no more than it needs. */
function slim({
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

function tableInfo(tables: ScatteringTables): TableInfo {
  const each = <T>(read: (key: (typeof TABULATION_KEYS)[number]) => T) => ({
    epdl97: read("epdl97"),
    henke93: read("henke93"),
    chantler95: read("chantler95"),
  });
  return {
    version: tables.version,
    rangeEv: each((key) => tables.tabulations[key].rangeEv),
    elements: each((key) => [...tables.tabulations[key].elements.keys()]),
  };
}
