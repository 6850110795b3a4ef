import fc from "fast-check";
import { create, unitDependencies } from "mathjs";
import { describe, expect, it } from "vitest";
import { type Dimension, parseEnergies, parseQuantity, QuantityError, UNITS } from "#src/lib/quantities/index.ts";

const math = create({ ...unitDependencies });
const SI: Readonly<Record<Dimension, string | null>> = {
  energy: "eV",
  length: "m",
  density: "kg/m^3",
  fraction: null,
  concentration: "kg/m^3",
  dose: null,
  time: "s",
  flux: null,
};

const energies = (text: string) => parseEnergies(text, { defaultUnit: "keV" });
const codeOf = (read: () => unknown): string => {
  try {
    read();
  } catch (error) {
    if (error instanceof QuantityError) return error.code;
    throw error;
  }
  return "none";
};

describe("units", () => {
  it("have mathjs's factors", () => {
    let compared = 0;
    for (const [dimension, units] of Object.entries(UNITS) as [Dimension, (typeof UNITS)[Dimension]][]) {
      for (const [name, { factor, mathjs }] of Object.entries(units)) {
        if (mathjs === null) continue;
        expect(math.unit!(1, mathjs).toNumber(SI[dimension]!), name).toAgreeWithin(factor, 1e-12);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(22);
  });

  it("of dose and flux, which mathjs does not have, are their prefixes", () => {
    const read = (text: string, dimension: Dimension): number => parseQuantity(text, dimension, { defaultUnit: "" });
    expect(["2 Gy", "2 mGy", "2 µGy", "2 uGy", "2 kGy", "2 MGy"].map((text) => read(text, "dose"))).toEqual([
      2, 2e-3, 2e-6, 2e-6, 2e3, 2e6,
    ]);
    expect(
      ["3 /s/m2", "3 /s/cm²", "3 /s/mm2", "3 1/s/mm2", "3 /(s mm2)", "3 /s/µm2"].map((text) => read(text, "flux")),
    ).toEqual([3, 3e4, 3e6, 3e6, 3e6, 3e12]);
  });
});

describe("parseQuantity", () => {
  it.each([
    ["1.19 g/cm3", "density", "g/cm3", 1190],
    ["1.19", "density", "g/cm3", 1190],
    ["1190 kg/m³", "density", "g/cm3", 1190],
    ["1.2 g/ml", "density", "g/cm3", 1200],
    ["20 µm", "length", "mm", 20e-6],
    ["20 μm", "length", "mm", 20e-6],
    ["20um", "length", "mm", 20e-6],
    ["5", "length", "mm", 5e-3],
    ["20 %", "fraction", "%", 0.2],
    ["0.2", "fraction", "%", 0.2],
    ["20", "fraction", "%", 0.2],
    ["50 mg/mL", "concentration", "mg/mL", 50],
    ["0.62 Å", "energy", "keV", 12398.419843320026 / 0.62],
    ["8.048", "energy", "keV", 8048],
  ] as const)("reads %s as %s", (text, dimension, defaultUnit, expected) => {
    expect(parseQuantity(text, dimension, { defaultUnit })).toAgreeWithin(expected, 1e-12);
  });

  it.each([
    ["N3", "NaN", "density", "notANumber"],
    ["N4", "1e400", "density", "notFinite"],
    ["N5", "1e-400", "density", "underflow"],
    ["N6", "2.7 kg", "density", "wrongDimension"],
    ["", "20 keV", "density", "wrongDimension"],
    ["N7", "2,7", "density", "decimalComma"],
    ["N8", "2.7;import({})", "density", "unknownUnit"],
    ["N10", "9".repeat(65), "density", "tooLong"],
    ["E1", "0 keV", "energy", "notPositive"],
    ["E2", "-8 keV", "energy", "notPositive"],
    ["E7", "0 nm", "energy", "notPositive"],
    ["E8", "8 keV/0", "energy", "unknownUnit"],
    ["E10", "٣ keV", "energy", "foreignDigits"],
    ["E11", "8 eVV", "energy", "unknownUnit"],
    ["", "5 constructor", "density", "unknownUnit"],
    ["", "  ", "density", "empty"],
  ] as const)("%s refuses “%s” as a %s", (_, text, dimension, code) => {
    expect(
      codeOf(() => parseQuantity(text, dimension, { defaultUnit: dimension === "energy" ? "keV" : "g/cm3" })),
    ).toBe(code);
  });

  it("names the units it takes", () => {
    expect(() => parseQuantity("8 eVV", "energy", { defaultUnit: "keV" })).toThrow(/keV, eV, Å, nm/);
  });
});

describe("parseEnergies", () => {
  it.each([
    ["24 keV", [24000]],
    ["12, 18, 24 keV", [12000, 18000, 24000]],
    ["24, 12, 24", [24000, 12000, 24000]],
    ["8 12 20 keV", [8000, 12000, 20000]],
    ["12\n18\n24 eV", [12, 18, 24]],
    ["12 keV\n18000 eV", [12000, 18000]],
    ["8,12,20 keV", [8000, 12000, 20000]],
    ["5–7 keV step 0.5", [5000, 5500, 6000, 6500, 7000]],
    ["10 to 40 keV in 2 steps", [10000, 20000, 40000]],
  ])("reads %j", (text, expected) => {
    expect(energies(text).energiesEv).toEqual(expected);
  });

  it("gives a range both its ends", () => {
    const { energiesEv, kind } = energies("5 to 60 keV");
    expect([energiesEv[0], energiesEv.at(-1), energiesEv.length, kind]).toEqual([5000, 60000, 51, "range"]);
  });

  it.each([
    ["E4", "60 to 5 keV", "rangeReversed"],
    ["E5", "5 to 60 keV step 0", "stepNotPositive"],
    ["E6", "5 to 60 keV step 1e-9", "tooMany"],
    ["E6", "5 to 60 keV in 1000000000 steps", "tooMany"],
    ["", "2,7", "decimalComma"],
    ["", "", "empty"],
    ["", "abc", "notANumber"],
    ["", Array(2001).fill("20").join(","), "tooMany"],
  ])("%s refuses %s", (_, text, code) => {
    expect(codeOf(() => energies(text))).toBe(code);
  });

  it("gives finite energies above 0 or its own error, for any text", () => {
    const pieces = fc.constantFrom(
      "5",
      "60",
      "0",
      "-1",
      "1e9",
      "1e400",
      " to ",
      " in ",
      " steps",
      " step ",
      "keV",
      "eV",
      "Å",
      "nm",
      ",",
      ";",
      "\n",
      " ",
      "–",
      ".",
      "e",
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ unit: "grapheme", maxLength: 100 }),
          fc.array(pieces, { maxLength: 14 }).map((list) => list.join("")),
        ),
        (text) => {
          try {
            for (const energyEv of energies(text).energiesEv)
              expect(energyEv > 0 && Number.isFinite(energyEv)).toBe(true);
          } catch (error) {
            expect(error).toBeInstanceOf(QuantityError);
          }
        },
      ),
      { numRuns: 3000, seed: 13 },
    );
  });
});
