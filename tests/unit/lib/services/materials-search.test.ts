/** Search as people type: exact names first, elements, misspellings of one and two letters. */
import { describe, expect, it } from "vitest";
import { allMaterials, getMaterial, listMaterials, searchMaterials } from "#src/lib/services/materials.ts";

const first = (query: string, count = 1): string[] =>
  searchMaterials(query)
    .slice(0, count)
    .map(({ id }) => id);

describe("searchMaterials", () => {
  it.each([
    ["PMMA", "pmma"],
    ["pmma", "pmma"],
    ["water", "water"],
    ["h2o", "water"],
    ["Kapton", "polyimide"],
    ["kaptn", "polyimide"],
    ["Teflon", "ptfe"],
    ["plexiglass", "pmma"],
    ["Al", "aluminium"],
    ["aluminum", "aluminium"],
    ["alumnium", "aluminium"],
    ["Fe", "iron"],
    ["Co", "cobalt"],
    ["polyprophylene", "polypropylene"],
    ["hydroxyapatit", "hydroxyapatite"],
    ["HAp", "hydroxyapatite"],
    ["Ti-6Al-4V", "ti-6al-4v"],
    ["ti 6al 4v", "ti-6al-4v"],
    ["LuAG", "luag"],
    ["bone", "cortical-bone-icru44"],
    ["fat", "adipose-icru44"],
    ["stainless steel", "steel-304"],
  ])("finds %s as %s", (query, id) => {
    expect(first(query)).toEqual([id]);
  });

  it("finds every form of a formula, and what holds an element", () => {
    expect(first("SiO2", 3).sort()).toEqual(expect.arrayContaining(["quartz", "silica-fused"]));
    for (const { massFractions } of searchMaterials("Ca").slice(0, 8)) expect(massFractions?.["Ca"]).toBeGreaterThan(0);
    expect(
      searchMaterials("scintillator")
        .slice(0, 10)
        .every(({ tags }) => tags.includes("scintillator")),
    ).toBe(true);
  });

  /** One wrong letter of each kind, at a place that the word itself decides: the same every run. */
  function misspellings(word: string): string[] {
    const at = 1 + ((word.length * 7) % (word.length - 2));
    return [
      word.slice(0, at) + word.slice(at + 1),
      word.slice(0, at) + word[at] + word.slice(at),
      word.slice(0, at) + (word[at] === "x" ? "q" : "x") + word.slice(at + 1),
      word.slice(0, at) + (word[at + 1] ?? "") + word[at] + word.slice(at + 2),
    ];
  }
  const words = allMaterials()
    .filter(({ name }) => /^[A-Za-z]{7,}$/.test(name))
    .map(({ id, name }) => ({ id, name: name.toLowerCase() }));
  const hitRate = (tries: { query: string; id: string }[]): number =>
    tries.filter(({ query, id }) => first(query, 3).includes(id)).length / tries.length;

  it("forgives one wrong letter", () => {
    expect(words.length).toBeGreaterThan(60);
    expect(
      hitRate(words.flatMap(({ id, name }) => misspellings(name).map((query) => ({ query, id })))),
    ).toBeGreaterThan(0.95);
  });

  it("forgives two wrong letters in words of nine and more", () => {
    const long = words.filter(({ name }) => name.length >= 9);
    expect(long.length).toBeGreaterThan(30);
    const twice = long.flatMap(({ id, name }) =>
      misspellings(name).map((query) => ({ query: `${query.slice(0, -2)}z${query.slice(-1)}`, id })),
    );
    expect(hitRate(twice)).toBeGreaterThan(0.85);
  });

  it("answers nothing for nothing, and no more than the query's limit is searched", () => {
    expect(searchMaterials("   ")).toEqual([]);
    expect(searchMaterials(`water${" ".repeat(100)}xyz`)[0]?.id).toBe("water");
  });
});

describe("listMaterials and getMaterial", () => {
  it("walk all once, by name", () => {
    const ids: string[] = [];
    let cursor: string | undefined;
    do {
      const page = listMaterials({ limit: 37, cursor });
      ids.push(...page.items.map(({ id }) => id));
      cursor = page.nextCursor ?? undefined;
    } while (cursor !== undefined);
    expect(ids).toEqual(allMaterials().map(({ id }) => id));
  });

  it("refuse a cursor that is not theirs, and know no prototype's keys", () => {
    for (const cursor of [
      "x",
      "!!",
      Buffer.from("from -1").toString("base64url"),
      Buffer.from("from 12345678").toString("base64url"),
    ]) {
      expect(() => listMaterials({ limit: 10, cursor }), cursor).toThrow(/cursor/);
    }
    expect(getMaterial("constructor")).toBeNull();
    expect(getMaterial("water")?.massFractions?.["H"]).toAgreeWithin(0.1119, 1e-3);
  });
});
