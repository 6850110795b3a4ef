/** Handbook materials: one by id, a list, a search that forgives one or two wrong letters. Built once and kept. */
import Fuse from "fuse.js";
import { ProblemError } from "#src/lib/http/problems.ts";
import { compositionOfFormula, elementByNumber, elementBySymbol, parseFormula } from "#src/lib/physics/index.ts";
import type { HandbookEntry } from "#src/lib/schemas/handbook.ts";
import type { MaterialItem } from "#src/lib/schemas/materials-list.ts";
import { HANDBOOK_ENTRIES } from "./handbook-entries.ts";

/** Longest query that is searched; fuzzy search grows with it. */
export const QUERY_CHARACTERS = 64;

interface Indexed {
  readonly item: MaterialItem;
  /** Folded words that name it: id, name, other names, formula. */
  readonly names: readonly string[];
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
  const symbol = elementBySymbol(query.trim())?.symbol;
  const ranks: ((entry: Indexed) => boolean)[] = [
    // A symbol is first of all its element, then any other name spelt the same.
    ({ item }) => symbol !== undefined && item.formula === symbol,
    ({ names }) => names.includes(wanted),
    ({ names }) => names.some((name) => name.startsWith(wanted)),
    ({ tags }) => tags.includes(wanted),
    ({ words }) => words.some((word) => word.startsWith(wanted)),
    ({ item }) => symbol !== undefined && item.massFractions?.[symbol] !== undefined,
    ({ names }) => wanted.length > 2 && names.some((name) => name.includes(wanted)),
  ];
  const found = new Set<MaterialItem>();
  for (const rank of ranks) for (const entry of all) if (rank(entry)) found.add(entry.item);
  for (const { item } of fuse.search(wanted)) found.add(item.item);
  return [...found];
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
  const names = [entry.id, entry.name, ...entry.alsoKnownAs, ...(entry.formula === null ? [] : [entry.formula])].map(
    fold,
  );
  const words = [...new Set(names.flatMap((name) => name.split(/[^\p{L}\p{N}]+/u)))].filter((word) => word.length > 1);
  return { item, names, words, tags: entry.tags.map(fold) };
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
