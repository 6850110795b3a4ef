/** The many ways people write the same quantity, what is refused with which hint, and that no text takes long. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type Dimension,
  MAX_ENERGIES,
  parseEnergies,
  parseQuantity,
  QuantityError,
} from "#src/lib/quantities/index.ts";

const energies = (text: string) => parseEnergies(text, { defaultUnit: "keV" });
const DEFAULTS: Readonly<Record<Dimension, string>> = {
  energy: "keV",
  length: "mm",
  density: "g/cm3",
  fraction: "%",
  concentration: "mg/mL",
  dose: "Gy",
  time: "s",
  flux: "/s/mm2",
};

function refusal(read: () => unknown): QuantityError {
  try {
    read();
  } catch (error) {
    if (error instanceof QuantityError) return error;
    throw error;
  }
  throw new Error("It was accepted.");
}

describe("units", () => {
  it.each([
    "24 keV",
    "24keV",
    "24 kev",
    "24 KeV",
    "24 KEV",
    "24000 eV",
    "24000 EV",
    "0.024 MeV",
    "+24",
    "2.4e1 keV",
    "24\u00a0keV",
  ])("reads %j as 24 keV", (text) => {
    expect(energies(text)).toEqual({ energiesEv: [24000], kind: "single" });
  });

  it.each(["0.62 Å", "0.62 \u212b", "0.62 A", "0.62angstrom", "0.062 nm", "62 pm", "6.2e-5 µm"])(
    "reads %j as the same wavelength",
    (text) => {
      expect(energies(text).energiesEv[0]).toAgreeWithin(energies("0.62 Å").energiesEv[0]!, 1e-12);
    },
  );

  it.each([
    "1.19",
    "1.19 g/cm3",
    "1.19 g/cm³",
    "1.19 g/cm^3",
    "1.19 g cm-3",
    "1.19 g·cm⁻³",
    "1.19 g cm^-3",
    "1.19 g/mL",
    "1.19 g/ml",
    "1.19 g/cc",
    "1.19 kg/L",
    "1190 kg/m3",
    "1190 kg m⁻³",
    "1190 mg/cm3",
  ])("reads %j as 1190 kg/m³", (text) => {
    expect(parseQuantity(text, "density", { defaultUnit: "g/cm3" })).toBe(1190);
  });

  it("leaves no rounding of its own", () => {
    expect(parseQuantity("20 µm", "length", { defaultUnit: "mm" })).toBe(20e-6);
    expect(parseQuantity("33.1694", "energy", { defaultUnit: "keV" })).toBe(33169.4);
    expect(parseQuantity("7 %", "fraction", { defaultUnit: "%" })).toBe(0.07);
  });

  it.each(["8 meV", "8 mev", "8 mEV"])("does not take %s for MeV", (text) => {
    expect(refusal(() => energies(text)).code).toBe("unknownUnit");
  });
});

describe("columns and lists", () => {
  it.each([
    ["keV\n8\n12", [8000, 12000]],
    ["E (eV)\n8000\n12000\n", [8000, 12000]],
    ["Energy [Å]\r\n1\r\n", [12398.419843320026]],
    ["8\r\n12", [8000, 12000]],
    ["8\t12\t", [8000, 12000]],
    ["8 keV; 9000 eV; 0.5 Å", [8000, 9000, 24796.839686640052]],
    ["8,\n12,\n", [8000, 12000]],
    ["1e1 2e1", [10000, 20000]],
  ])("reads %j", (text, expected) => {
    const { energiesEv } = energies(text);
    expect(energiesEv).toHaveLength(expected.length);
    for (const [index, energyEv] of energiesEv.entries()) expect(energyEv).toAgreeWithin(expected[index]!, 1e-12);
  });

  it.each([
    ["8,0 keV, 9,5 keV", 1, /8\.0/],
    ["8.5; 9,5", 6, /9\.5/],
    ["8,5\n9,5", 1, /8\.5/],
    ["12, 18,24", 5, /18\.24/],
  ])("refuses the decimal comma in %j, with a hint", (text, position, hint) => {
    expect(refusal(() => energies(text))).toMatchObject({
      code: "decimalComma",
      position,
      message: expect.stringMatching(hint) as string,
    });
  });

  it("does not read 10 000 eV as two energies", () => {
    expect(refusal(() => energies("10 000 eV")).message).toContain("10000");
  });

  it("names the place of what it cannot read", () => {
    expect(refusal(() => energies("8 keV, 9 keV, ten keV")).position).toBe(15);
    expect(refusal(() => energies("8 keV\n9 kg")).position).toBe(9);
    expect(refusal(() => energies("8\u200b keV"))).toMatchObject({ code: "invisibleCharacter", position: 2 });
    expect(refusal(() => energies("8 keV\u0000")).message).toContain("U+0000");
  });
});

describe("ranges", () => {
  it.each([
    "5 to 7 keV step 0.5",
    "5-7 keV step 0.5",
    "5 - 7 keV step 0.5",
    "5 keV – 7 keV, step 0.5",
    "5..7 keV every 0.5",
    "5 to 7 keV by 500 eV",
    "5 keV to 7000 eV step 0.5 keV",
    "5000 to 7000 eV step 500",
    "5 TO 7 keV steps of 0.5 keV",
  ])("reads %j", (text) => {
    expect(energies(text)).toEqual({ energiesEv: [5000, 5500, 6000, 6500, 7000], kind: "range" });
  });

  it.each([
    "10 to 40 keV in 2 steps",
    "10 to 40 keV, 3 points",
    "10-40 keV 2 steps",
    "10 keV to 40 keV in 3 points",
    "10 to 40 in 2",
  ])("reads %j, even in log energy", (text) => {
    expect(energies(text).energiesEv).toEqual([10000, 20000, 40000]);
  });

  it("steps wavelengths in their own unit", () => {
    const { energiesEv } = energies("1 to 2 Å step 0.5");
    expect(energiesEv).toHaveLength(3);
    for (const [index, angstrom] of [1, 1.5, 2].entries())
      expect(energiesEv[index]).toAgreeWithin(12398.419843320026 / angstrom, 1e-11);
  });

  it("keeps signs and exponents apart from dashes", () => {
    expect(energies("1e-2 MeV").energiesEv).toEqual([10000]);
    expect(refusal(() => energies("8 -5 keV")).code).toBe("notPositive");
    expect(refusal(() => energies("-5 keV")).code).toBe("notPositive");
    expect(refusal(() => energies("5 to -3 keV")).code).toBe("notPositive");
  });

  it.each([
    ["60 to 5 keV", "rangeReversed"],
    ["2 to 0.5 Å", "rangeReversed"],
    ["5 to 5 keV", "rangeReversed"],
    ["5 to 60 keV step 0", "stepNotPositive"],
    ["5 to 60 keV step -1", "stepNotPositive"],
    ["5 to 60 keV in 0 steps", "stepNotPositive"],
    ["5 to 60 keV, 1 point", "stepNotPositive"],
    ["5 to 60 keV step 1e-9", "tooMany"],
    ["5 to 60 keV in 99999999999999999999 steps", "tooMany"],
    ["5 to 60 keV step 1 Å", "wrongDimension"],
    ["5 to 60 keV step 1 parsec", "unknownUnit"],
    ["5,5 to 60 keV", "decimalComma"],
  ])("refuses %j as %s", (text, code) => {
    expect(refusal(() => energies(text)).code).toBe(code);
  });

  it("holds as many energies as a list, and no more", () => {
    expect(energies(`5 to 60 keV in ${MAX_ENERGIES - 1} steps`).energiesEv).toHaveLength(MAX_ENERGIES);
    expect(refusal(() => energies(`5 to 60 keV in ${MAX_ENERGIES} steps`)).code).toBe("tooMany");
  });
});

describe("any text", () => {
  const pieces = fc.constantFrom(
    "5",
    "60",
    "0",
    "-1",
    "1e9",
    "1e308",
    "1e-320",
    "1e400",
    " to ",
    " in ",
    " step ",
    "–",
    "-",
    "keV",
    "Å",
    "g/cm3",
    "%",
    "mg/mL",
    ",",
    ";",
    "\n",
    " ",
    "(",
    ")",
    "\u0000",
    "٣",
  );
  const texts = fc.oneof(
    fc.string({ unit: "binary", maxLength: 80 }),
    fc.array(pieces, { maxLength: 10 }).map((list) => list.join("")),
  );

  it("gives a finite number or a QuantityError with a place and a sentence", () => {
    fc.assert(
      fc.property(texts, fc.constantFrom(...(Object.keys(DEFAULTS) as Dimension[])), (text, dimension) => {
        try {
          expect(Number.isFinite(parseQuantity(text, dimension, { defaultUnit: DEFAULTS[dimension] }))).toBe(true);
        } catch (error) {
          if (!(error instanceof QuantityError)) throw error;
          expect(error.position).toBeGreaterThan(0);
          expect(error.message).toMatch(/^\S.*\.$/s);
          expect(error.message.length).toBeLessThan(250);
        }
      }),
      { numRuns: 4000, seed: 17 },
    );
  });

  it.each([
    ["letters", "a".repeat(127_000)],
    ["products", "m*m".repeat(42_000)],
    ["spaces", `${" ".repeat(127_000)}8`],
    ["spaces within", `8${" ".repeat(127_000)}9`],
    ["digits", "8".repeat(127_000)],
    ["digits with commas", "8,".repeat(63_000)],
    ["numbers without commas", "8 ".repeat(63_000)],
    ["decimal commas that are none", "1,1.".repeat(31_000)],
    ["ranges", "5 to ".repeat(25_000)],
    ["dashes", "–".repeat(127_000)],
    ["brackets", "(".repeat(127_000)],
    ["units", `8 keV${"\n8 keV".repeat(15_000)}`],
  ])("of 127,000 characters is answered within a second: %s", (_, text) => {
    const start = performance.now();
    try {
      expect(energies(text).energiesEv.length).toBeLessThanOrEqual(MAX_ENERGIES);
    } catch (error) {
      expect(error).toBeInstanceOf(QuantityError);
    }
    expect(performance.now() - start).toBeLessThan(1000);
  });
});
