/** Materials that a look-up may name, found exactly: by id, name, other name. Fuzzy search belongs to the picker. */
import type { KeptComposition, MaterialLookup } from "#src/lib/materials/resolve.ts";

/** A kept material as pages and islands hold it. */
export interface KnownMaterial extends KeptComposition {
  readonly id: string;
  readonly alsoKnownAs: readonly string[];
}

export interface MaterialFinder {
  /** The material whose id, name or other name the words are, whatever their case; or null. */
  find(words: string): KnownMaterial | null;
  /** Materials of exactly that formula, for an offer of densities. */
  ofFormula(formula: string): readonly KnownMaterial[];
  readonly lookup: MaterialLookup;
  /** Materials spelt nearly so, best first, for an offer. */
  near(words: string): readonly KnownMaterial[];
}

const fold = (words: string): string => words.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase().trim();

/** @param near fuzzy search, which belongs to whoever has the whole handbook at hand */
export function materialFinder(
  known: Iterable<KnownMaterial>,
  near: (words: string) => readonly KnownMaterial[] = () => [],
): MaterialFinder {
  const byId = new Map<string, KnownMaterial>();
  const byWords = new Map<string, KnownMaterial>();
  const byFormula = new Map<string, KnownMaterial[]>();
  const all = [...known];
  for (const material of all) {
    byId.set(material.id, material);
    if (material.formula) byFormula.set(material.formula, [...(byFormula.get(material.formula) ?? []), material]);
  }
  // Ids before names before other names: the first to claim a word keeps it.
  for (const words of [
    (m: KnownMaterial) => [m.id],
    (m: KnownMaterial) => [m.name],
    (m: KnownMaterial) => m.alsoKnownAs,
  ]) {
    for (const material of all) {
      for (const word of words(material)) if (!byWords.has(fold(word))) byWords.set(fold(word), material);
    }
  }
  return {
    find: (words) => byWords.get(fold(words)) ?? null,
    ofFormula: (formula) => byFormula.get(formula) ?? [],
    lookup: (materialId) => byId.get(materialId) ?? null,
    near,
  };
}

/** The same materials, each id once: the last one stands. */
export function uniqueById(materials: readonly KnownMaterial[]): KnownMaterial[] {
  return [...new Map(materials.map((material) => [material.id, material])).values()];
}
