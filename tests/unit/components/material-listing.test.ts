import { describe, expect, test } from "vitest";
import {
  compositionParts,
  countTags,
  foundText,
  groupByTag,
  groupId,
  heading,
  listHref,
  type ListedMaterial,
} from "#src/components/site/materials/listing.ts";

function material(id: string, more: Partial<ListedMaterial> = {}): ListedMaterial {
  return { id, name: id, alsoKnownAs: [], formula: null, massFractions: null, densityGCm3: 1, tags: [], ...more };
}
const text = (item: ListedMaterial): string =>
  compositionParts(item)
    .map((part) => part.text)
    .join("");

describe("the handbook's list", () => {
  const items = Object.freeze([
    material("water", { tags: ["solvent", "liquid"] }),
    material("vacuum"),
    material("PTFE", { tags: ["polymer"] }),
    material("acetone", { tags: ["solvent"] }),
  ]);
  test("is grouped by first tag, in alphabetical order, what has no tag at the end", () => {
    const groups = groupByTag(items).map((group) => [group.tag, ...group.items.map(({ id }) => id)]);
    expect(groups).toEqual([
      ["polymer", "PTFE"],
      ["solvent", "acetone", "water"],
      ["other", "vacuum"],
    ]);
  });
  test("counts every tag, the most common first", () => {
    expect(countTags(items)).toEqual([
      { tag: "solvent", count: 2 },
      { tag: "liquid", count: 1 },
      { tag: "polymer", count: 1 },
    ]);
  });
  test("shows a formula, else the three largest shares by mass", () => {
    expect(text(material("quartz", { formula: "SiO2" }))).toBe("SiO2");
    const massFractions = { H: 0.114, C: 0.598, N: 0.007, O: 0.278, S: 0.003 };
    expect(text(material("fat", { massFractions }))).toBe(
      "C\u00a060\u00a0%, O\u00a028\u00a0%, H\u00a011\u00a0%, 2\u00a0more",
    );
    expect(text(material("vacuum", { massFractions: {} }))).toBe("no matter");
  });
  test("says in a sentence what was found", () => {
    expect(foundText(181, "", null)).toBe("181 materials, by kind.");
    expect(foundText(1, "", "gas")).toBe("1 material under “gas”.");
    expect(foundText(1, "argon", null)).toBe("1 material matches “argon”, best first.");
    expect(foundText(12, "resin", "polymer")).toBe("12 materials match “resin” under “polymer”, best first.");
    expect(foundText(0, "xyzzy", null)).toBe("Nothing matches “xyzzy”.");
  });
  test("has one address for each way to ask for it", () => {
    expect(listHref({})).toBe("/materials");
    expect(listHref({ tag: "contrast agent" })).toBe("/materials?tag=contrast+agent");
    expect(listHref({ query: "a&b", tag: "gas", all: true })).toBe("/materials?query=a%26b&tag=gas&all=yes");
  });
  test("makes ids and headings from tags", () => {
    expect(groupId("Contrast agents, I")).toBe("tag-contrast-agents-i");
    expect(heading("contrast agent")).toBe("Contrast agent");
  });
});
