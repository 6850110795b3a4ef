/** The handbook as data: every entry by its schema, sums, plausible densities, no repeats, the compositions of ICRU 44. */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  compositionOfMassFractions,
  electronDensityPerM3,
  elementBySymbol,
  parseFormula,
  withDensity,
} from "#src/lib/physics/index.ts";
import { AVOGADRO } from "#src/lib/physics/constants.ts";
import { handbookFileSchema } from "#src/lib/schemas/handbook.ts";
import { HANDBOOK_ENTRIES, HANDBOOK_GROUPS } from "#src/lib/services/handbook-entries.ts";

const fold = (words: string): string =>
  words
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[\s_-]+/g, " ")
    .trim();

/** Densities in g/cm³ that a kind can have. Common practice: the lightest and heaviest solids of each kind, with room. */
const PLAUSIBLE: Readonly<Record<string, readonly [number, number]>> = {
  polymer: [0.02, 2.3],
  tissue: [0.2, 3.2],
  mineral: [0.9, 8],
  metal: [0.5, 23],
  ceramic: [1.5, 16],
  glass: [2.1, 6],
  carbon: [1.3, 3.6],
  battery: [0.9, 10],
  catalyst: [1.5, 12],
  "fuel cell": [1.5, 12],
  scintillator: [1, 10],
  sensor: [2, 7],
  liquid: [0.6, 2],
  stain: [0.9, 6],
  "contrast agent": [1, 2],
  gas: [0, 0.01],
  window: [1.2, 5],
};

describe("the handbook", () => {
  it("has at least 160 entries, in every group, each by the schema", () => {
    for (const [group, entries] of Object.entries(HANDBOOK_GROUPS)) {
      const read = handbookFileSchema.safeParse(entries);
      expect(read.error?.issues ?? [], group).toEqual([]);
      expect(entries.length, group).toBeGreaterThanOrEqual(10);
    }
    expect(HANDBOOK_ENTRIES.length).toBeGreaterThanOrEqual(160);
  });

  it("names nothing twice", () => {
    const owners = new Map<string, string>();
    for (const entry of HANDBOOK_ENTRIES) {
      for (const words of [entry.name, ...entry.alsoKnownAs]) {
        const owner = owners.get(fold(words));
        expect(owner, `${words} of ${entry.id} is also ${owner}`).toBeUndefined();
        owners.set(fold(words), entry.id);
      }
    }
    expect(new Set(HANDBOOK_ENTRIES.map(({ id }) => id)).size).toBe(HANDBOOK_ENTRIES.length);
  });

  it("has formulas that can be read and fractions that sum to 1", () => {
    for (const { id, formula, massFractions } of HANDBOOK_ENTRIES) {
      if (formula !== null) expect(() => parseFormula(formula), id).not.toThrow();
      if (massFractions === null) continue;
      for (const symbol of Object.keys(massFractions)) expect(elementBySymbol(symbol), `${id} ${symbol}`).toBeDefined();
      const sum = Object.values(massFractions).reduce((a, b) => a + b, 0);
      expect(Math.abs(sum - 1), id).toBeLessThan(1e-3);
    }
  });

  it("has densities that its kind can have", () => {
    for (const { id, tags, densityGCm3 } of HANDBOOK_ENTRIES) {
      const range = PLAUSIBLE[tags[0]!];
      expect(range, `${id}: no range for ${tags[0]}`).toBeDefined();
      expect(densityGCm3, id).toBeGreaterThanOrEqual(range![0]);
      expect(densityGCm3, id).toBeLessThanOrEqual(range![1]);
      if (id !== "vacuum") expect(densityGCm3, id).toBeGreaterThan(0);
    }
  });

  it("states a source for each", () => {
    for (const { id, source } of HANDBOOK_ENTRIES) expect(source, id).toMatch(/\(\d{4}\)|from memory|by definition/);
  });
});

describe("published compositions", () => {
  const { materials } = JSON.parse(
    readFileSync(new URL("../../../reference/fixtures/compositions.json", import.meta.url), "utf8"),
  ) as {
    materials: {
      id: string;
      densityGCm3: number;
      zOverA: number;
      massFractions: Record<string, number> | null;
      handbookDensityGCm3?: number;
    }[];
  };
  it.each(materials)(
    "$id is the handbook's, with its Z/A",
    ({ id, densityGCm3, zOverA, massFractions, handbookDensityGCm3 }) => {
      const entry = HANDBOOK_ENTRIES.find((candidate) => candidate.id === id)!;
      expect(entry.densityGCm3).toBe(handbookDensityGCm3 ?? densityGCm3);
      if (massFractions === null || entry.massFractions === null) return;
      expect(Object.keys(entry.massFractions).sort()).toEqual(Object.keys(massFractions).sort());
      for (const [symbol, share] of Object.entries(massFractions))
        expect(entry.massFractions[symbol]!).toAgreeWithin(share, 1e-3);
      const fractions = new Map(
        Object.entries(entry.massFractions).map(([symbol, share]) => [elementBySymbol(symbol)!.atomicNumber, share]),
      );
      const material = withDensity(compositionOfMassFractions(fractions), 1000);
      expect(electronDensityPerM3(material) / (1e6 * AVOGADRO.value)).toAgreeWithin(zOverA, 2e-4);
    },
  );
  it("are all compared", () => {
    expect(materials.length).toBeGreaterThanOrEqual(17);
  });
});
