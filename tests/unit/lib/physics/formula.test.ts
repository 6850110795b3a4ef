import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ELEMENTS, FormulaError, hillFormula, MAX_ATOMIC_NUMBER, parseFormula } from "#src/lib/physics/index.ts";

const counts = (text: string): Record<string, number> =>
  Object.fromEntries([...parseFormula(text).atoms].map(([z, count]) => [ELEMENTS[z - 1]!.symbol, count]));
const fault = (text: string): FormulaError => {
  try {
    parseFormula(text);
  } catch (error) {
    if (error instanceof FormulaError) return error;
    throw error;
  }
  throw new Error(`${text} was accepted`);
};

describe("parseFormula", () => {
  it.each([
    ["H2O", { H: 2, O: 1 }],
    ["Ca5(PO4)3OH", { Ca: 5, P: 3, O: 13, H: 1 }],
    ["K4[Fe(CN)6]·3H2O", { K: 4, Fe: 1, C: 6, N: 6, H: 6, O: 3 }],
    ["CuSO4*5H2O", { Cu: 1, S: 1, O: 9, H: 10 }],
    ["CuSO4 · 5 H2O", { Cu: 1, S: 1, O: 9, H: 10 }],
    ["CaSO4·0.5H2O", { Ca: 1, S: 1, O: 4.5, H: 1 }],
    ["Ni0.8Mn0.1Co0.1O2", { Ni: 0.8, Mn: 0.1, Co: 0.1, O: 2 }],
    ["Al₂O₃", { Al: 2, O: 3 }],
    ["  SiO2 ", { Si: 1, O: 2 }],
    ["2H2O", { H: 4, O: 2 }],
    ["Co", { Co: 1 }],
    ["CO", { C: 1, O: 1 }],
    ["Hf", { Hf: 1 }],
    ["HF", { H: 1, F: 1 }],
  ])("reads %s", (text, expected) => {
    expect(counts(text)).toEqual(expected);
  });

  it("weighs a formula unit with standard atomic weights", () => {
    // CIAAW abridged weights: 5 × 40.078 + 3 × 30.974 + 13 × 15.999 + 1.008
    expect(parseFormula("Ca5(PO4)3OH").molarMassGPerMol).toAgreeWithin(502.307, 1e-9);
  });

  it.each([
    ["Hx2O", "unknownElement", 1, ["He", "Hg"]],
    ["SiO2Xq", "unknownElement", 5, ["Xe"]],
    ["h2o", "letterCase", 1, ["H2O"]],
    ["caco3", "letterCase", 1, ["CaCO3"]],
    ["NaCl(", "unclosedBracket", 5, []],
    ["H2O)", "unopenedBracket", 4, []],
    ["(H2O]", "mismatchedBracket", 5, []],
    ["Fe()", "emptyGroup", 3, []],
    ["H2O·", "emptyGroup", 5, []],
    ["MgCl2.6H2O", "ambiguousHydrate", 5, ["MgCl2·6H2O", "MgCl2.6(H2O)"]],
    ["Na2CO3.H2O", "countMalformed", 7, []],
    ["Al.5", "countMalformed", 3, []],
    ["C0.0000001", "countTooSmall", 2, []],
    ["H2 O", "unexpectedCharacter", 3, ["H2O"]],
    ["Ca2+", "unexpectedCharacter", 4, []],
    ["D2O", "unknownElement", 1, ["H"]],
    ["Ѕi", "foreignLetter", 1, ["S"]],
  ])("refuses %s as %s at %d", (text, code, position, suggestions) => {
    expect(fault(text)).toMatchObject({ code, position, suggestions });
  });

  it("names a near element in the words the hint promises", () => {
    expect(fault("Hx2O").message).toBe("Unknown element 'Hx' at 1; did you mean He or Hg?");
  });

  it.each([
    ["(C2H4)n", 7, "(C2H4)"],
    ["C5H8O2n", 7, "C5H8O2"],
    ["Fe2O3(s)", 7, "Fe2O3"],
    ["NaCl(aq)", 6, "NaCl"],
    ["Fe(III)2O3", 3, "Fe2O3"],
    ["Cu(I)2O", 3, "Cu2O"],
    ["V(IV)O2", 2, "VO2"],
  ])("does not take the notation in %s for elements", (text, position, without) => {
    expect(fault(text)).toMatchObject({ code: "unexpectedCharacter", position, suggestions: [without] });
    expect(() => parseFormula(without)).not.toThrow();
  });

  it("still reads iodine and vanadium in brackets with counts", () => {
    expect([...parseFormula("Hg(I2)2").atoms]).toEqual([
      [80, 1],
      [53, 4],
    ]);
    expect([...parseFormula("(VO4)2").atoms]).toEqual([
      [23, 2],
      [8, 8],
    ]);
  });

  it("takes linear time", () => {
    const start = performance.now();
    for (const text of [
      "(".repeat(256),
      "a".repeat(1e6),
      `H${" ·".repeat(120)}`,
      `H0.${"0".repeat(250)}1`,
      "C".repeat(256),
      " ".repeat(1e6),
    ])
      for (let turn = 0; turn < 20; turn++)
        expect(() => parseFormula(text === "C".repeat(256) ? `${text}!` : text)).toThrow(FormulaError);
    expect(performance.now() - start).toBeLessThan(2000);
  });

  it("offers only formulas it would read", () => {
    for (const text of ["h2o", "caco3", "nacl", "CuSO4.5H2O", "H2 O"]) {
      for (const suggestion of fault(text).suggestions)
        expect(() => parseFormula(suggestion), suggestion).not.toThrow();
    }
  });

  it("throws its own error and nothing else, for any text", () => {
    const pieces = fc.constantFrom(
      "H",
      "O",
      "Si",
      "Fe",
      "(",
      ")",
      "[",
      "]",
      "·",
      "*",
      ".",
      "2",
      "0.5",
      "10",
      " ",
      "x",
      "\u200b",
      "С",
    );
    const texts = fc.oneof(
      fc.string({ unit: "binary", maxLength: 300 }),
      fc.string({ unit: "grapheme", maxLength: 80 }),
      fc.array(pieces, { maxLength: 60 }).map((list) => list.join("")),
    );
    fc.assert(
      fc.property(texts, (text) => {
        try {
          const { molarMassGPerMol } = parseFormula(text);
          expect(molarMassGPerMol).toBeGreaterThan(0);
        } catch (error) {
          expect(error).toBeInstanceOf(FormulaError);
          expect((error as FormulaError).position).toBeGreaterThanOrEqual(1);
        }
      }),
      { numRuns: 3000, seed: 7 },
    );
  });

  it("gives a composition back after it was written out", () => {
    const atoms = fc.uniqueArray(
      fc.tuple(
        fc.integer({ min: 1, max: MAX_ATOMIC_NUMBER }),
        fc.oneof(
          fc.integer({ min: 1, max: 999 }),
          fc.integer({ min: 1, max: 9999 }).map((n) => n / 1000),
        ),
      ),
      {
        minLength: 1,
        maxLength: 12,
        selector: ([atomicNumber]) => atomicNumber,
      },
    );
    fc.assert(
      fc.property(atoms, (entries) => {
        const composition = new Map(entries);
        const again = parseFormula(hillFormula(composition)).atoms;
        expect([...again].sort()).toEqual([...composition].sort());
      }),
      { numRuns: 500, seed: 11 },
    );
  });
});
