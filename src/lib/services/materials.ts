/** Handbook materials: one by id, a list, a search that forgives one or two wrong letters. Built once and kept. */
import Fuse from "fuse.js";
import { ProblemError } from "#src/lib/http/problems.ts";
import { compositionOfFormula, elementByNumber, elementBySymbol, parseFormula } from "#src/lib/physics/index.ts";
import type { HandbookEntry } from "#src/lib/schemas/handbook.ts";
import type { MaterialItem } from "#src/lib/schemas/materials-list.ts";
import { HANDBOOK_ENTRIES } from "./handbook-entries.ts";

/** Longest query that is searched; fuzzy search grows with it. */
export const QUERY_CHARACTERS = 64;

const SHORT_QUERY_SCORE = 0.12;

interface Indexed {
  readonly item: MaterialItem;
  /** Folded words that name it: id, name, other names. */
  readonly names: readonly string[];
  /** Folded formula; empty where it has none. */
  readonly formula: string;
  /** Single words of names and tags. */
  readonly words: readonly string[];
  readonly tags: readonly string[];
}

interface Index {
  readonly all: readonly Indexed[];
  readonly byId: ReadonlyMap<string, MaterialItem>;
  readonly fuse: Fuse<Indexed>;
}

let index: Index | null = null;

export function allMaterials(): MaterialItem[] {
  return built().all.map(({ item }) => item);
}

export function getMaterial(id: string): MaterialItem | null {
  return built().byId.get(id) ?? null;
}

export interface MaterialsPage {
  items: MaterialItem[];
  nextCursor: string | null;
}

/** Without a query every material by name; with one the best first. @throws ProblemError invalid for a cursor not of ours */
export function listMaterials({
  query,
  limit,
  cursor,
}: {
  query?: string | undefined;
  limit: number;
  cursor?: string | undefined;
}): MaterialsPage {
  const start = cursor === undefined || cursor === "" ? 0 : readCursor(cursor);
  const found = query === undefined || query.trim() === "" ? allMaterials() : searchMaterials(query);
  const items = found.slice(start, start + limit);
  return { items, nextCursor: start + limit < found.length ? writeCursor(start + limit) : null };
}

/**
 * Best first: what is named exactly so (id, name, other name, formula); the element and what holds it, for a symbol; what
 * begins with the words or has them as a word or tag; then what is spelt nearly so.
 */
export function searchMaterials(query: string): MaterialItem[] {
  const { all, fuse } = built();
  const wanted = fold(query.slice(0, QUERY_CHARACTERS));
  if (wanted === "") return [];
  const written = query.trim();
  const symbol = elementBySymbol(written)?.symbol;
  const ranks: ((entry: Indexed) => boolean)[] = [
    // "Co" is first of all cobalt, then what is called so to the letter; "CO" is not an element.
    ({ item }) => symbol !== undefined && item.formula === symbol,
    ({ item }) => item.alsoKnownAs.includes(written),
    ({ names }) => symbol === undefined && names.includes(wanted),
    ({ formula }) => symbol === undefined && formula === wanted,
  ];
  const further: typeof ranks = [
    ({ names }) => names.includes(wanted),
    ({ names }) => names.some((name) => name.startsWith(wanted)),
    ({ tags }) => tags.includes(wanted),
    ({ words }) => words.some((word) => word.startsWith(wanted)),
    ({ names }) => wanted.length > 2 && names.some((name) => name.includes(wanted)),
  ];
  const found = new Set<MaterialItem>();
  const take = (rank: (entry: Indexed) => boolean): void => {
    for (const entry of all) if (rank(entry)) found.add(entry.item);
  };
  ranks.forEach(take);
  // What holds most of the element comes first.
  if (symbol !== undefined) for (const item of holdersOf(symbol, all)) found.add(item);
  further.forEach(take);
  // Few letters are soon near anything: a short query must be nearly right.
  const loosest = wanted.length <= 4 ? SHORT_QUERY_SCORE : 1;
  for (const { item, score = 0 } of fuse.search(wanted)) if (score <= loosest) found.add(item.item);
  return [...found];
}

function holdersOf(symbol: string, all: readonly Indexed[]): MaterialItem[] {
  const share = (item: MaterialItem): number => item.massFractions?.[symbol] ?? 0;
  return all
    .map(({ item }) => item)
    .filter((item) => share(item) > 0)
    .sort((a, b) => share(b) - share(a));
}

/** Case, accents and the difference of spaces, hyphens and subscripts do not count. */
function fold(words: string): string {
  return words
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[\s_-]+/g, " ")
    .trim();
}

function built(): Index {
  if (index) return index;
  const all = HANDBOOK_ENTRIES.map(indexed).sort((a, b) => a.item.name.localeCompare(b.item.name, "en"));
  index = {
    all,
    byId: new Map(all.map(({ item }) => [item.id, item])),
    fuse: new Fuse([...all], {
      keys: [
        { name: "names", weight: 3 },
        { name: "words", weight: 2 },
        { name: "formula", weight: 1 },
        { name: "tags", weight: 1 },
      ],
      // Two wrong letters in a word of six pass, a different word of that length does not.
      threshold: 0.38,
      ignoreLocation: true,
      minMatchCharLength: 2,
      includeScore: true,
    }),
  };
  return index;
}

function indexed(entry: HandbookEntry): Indexed {
  const item: MaterialItem = {
    id: entry.id,
    name: entry.name,
    alsoKnownAs: entry.alsoKnownAs,
    formula: entry.formula,
    massFractions: entry.massFractions ?? (entry.formula === null ? null : fractionsOf(entry.formula)),
    densityGCm3: entry.densityGCm3,
    densityUncertaintyPercent: entry.densityUncertaintyPercent,
    scope: "handbook",
    tags: entry.tags,
    source: entry.source,
    revision: 1,
    status: "approved",
    note: entry.note ?? null,
  };
  const names = [entry.id, entry.name, ...entry.alsoKnownAs].map(fold);
  const formula = entry.formula === null ? "" : fold(entry.formula);
  const words = [...new Set(names.flatMap((name) => name.split(/[^\p{L}\p{N}]+/u)))].filter((word) => word.length > 1);
  return { item, names, formula, words, tags: entry.tags.map(fold) };
}

function fractionsOf(formula: string): Record<string, number> {
  const { massFractions } = compositionOfFormula(parseFormula(formula));
  return Object.fromEntries(
    [...massFractions].map(([atomicNumber, fraction]) => [elementByNumber(atomicNumber).symbol, fraction]),
  );
}

const writeCursor = (start: number): string => Buffer.from(`from ${start}`).toString("base64url");

function readCursor(cursor: string): number {
  const start = /^from (\d{1,6})$/.exec(Buffer.from(cursor, "base64url").toString("utf8"))?.[1];
  if (start === undefined) {
    throw new ProblemError("invalid", "That cursor is not one of this list.", {
      errors: [
        { path: "/cursor", code: "badCursor", message: "Send nextCursor of the answer before, or leave cursor out." },
      ],
    });
  }
  return Number(start);
}
