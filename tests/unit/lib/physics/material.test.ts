import { describe, expect, it } from "vitest";
import {
  type Composition,
  compositionOfFormula,
  compositionOfMassFractions,
  dissolve,
  electronDensityPerM3,
  elementBySymbol,
  MaterialError,
  mix,
  normaliseFractions,
  parseFormula,
  type Part,
  VACUUM,
  withDensity,
  withSolidFraction,
} from "#src/lib/physics/index.ts";

const part = (formula: string, densityKgPerM3: number | null): Part =>
  Object.freeze({ ...compositionOfFormula(parseFormula(formula)), densityKgPerM3 });
const share = (composition: Composition, symbol: string): number =>
  composition.massFractions.get(elementBySymbol(symbol)!.atomicNumber) ?? 0;
const codeOf = (act: () => unknown): string => {
  try {
    act();
  } catch (error) {
    if (error instanceof MaterialError) return error.code;
    throw error;
  }
  return "none";
};

describe("mixtures", () => {
  const water = part("H2O", 1000);
  const ethanol = part("C2H6O", 789);

  it("by mass, volume and mole agree when the shares mean the same", () => {
    const byMass = mix([water, ethanol], [0.6, 0.4], "mass").composition;
    const volumes = [0.6 / 1000, 0.4 / 789];
    const volume = volumes[0]! + volumes[1]!;
    const byVolume = mix(
      [water, ethanol],
      volumes.map((each) => each / volume),
      "volume",
    ).composition;
    const moles = [0.6 / 18.015, 0.4 / (2 * 12.011 + 6 * 1.008 + 15.999)];
    const mole = moles[0]! + moles[1]!;
    const byMole = mix(
      [water, ethanol],
      moles.map((each) => each / mole),
      "mole",
    ).composition;
    for (const symbol of ["H", "C", "O"]) {
      expect(share(byVolume, symbol)).toAgreeWithin(share(byMass, symbol), 1e-12);
      expect(share(byMole, symbol)).toAgreeWithin(share(byMass, symbol), 1e-12);
    }
  });

  it("of a compound's parts are the compound", () => {
    const oxide = mix([part("Ca", null), part("O", null)], [0.5, 0.5], "mole").composition;
    expect(share(oxide, "Ca")).toAgreeWithin(share(compositionOfFormula(parseFormula("CaO")), "Ca"), 1e-12);
  });

  it("have the density of additive volumes, or none where a part has none", () => {
    expect(mix([water, ethanol], [0.6, 0.4], "mass").additiveDensityKgPerM3).toAgreeWithin(
      1 / (0.6 / 1000 + 0.4 / 789),
      1e-12,
    );
    expect(mix([water, part("C2H6O", null)], [0.6, 0.4], "mass").additiveDensityKgPerM3).toBeNull();
  });

  it("are the part itself where there is one, and leave parts of share 0 out", () => {
    expect([...mix([water], [1], "mass").composition.massFractions]).toEqual([...water.massFractions]);
    expect(share(mix([water, ethanol], [1, 0], "mass").composition, "C")).toBe(0);
    expect(mix([water, ethanol], [1, 0], "mass").composition.massFractions.size).toBe(2);
  });

  it("keep the mean molar mass, and lose it with a part known by mass only", () => {
    expect(mix([water, ethanol], [0.5, 0.5], "mole").composition.molarMassGPerMol).toAgreeWithin(
      (18.015 + 46.069) / 2,
      1e-9,
    );
    const tissue: Part = {
      ...compositionOfMassFractions(
        new Map([
          [1, 0.1],
          [8, 0.9],
        ]),
      ),
      densityKgPerM3: 1000,
    };
    expect(mix([water, tissue], [0.5, 0.5], "mass").composition.molarMassGPerMol).toBeNull();
    expect(codeOf(() => mix([water, tissue], [0.5, 0.5], "mole"))).toBe("molarMassMissing");
  });

  it("need a density by volume, and no vacuum", () => {
    expect(codeOf(() => mix([water, part("C", null)], [0.5, 0.5], "volume"))).toBe("densityMissing");
    expect(codeOf(() => mix([water, { ...VACUUM, densityKgPerM3: 0 }], [0.5, 0.5], "mass"))).toBe("vacuumInMixture");
  });
});

describe("fractions", () => {
  it("sum to 1 within 0.001, and are then scaled to sum to 1", () => {
    expect(normaliseFractions([0.5, 0.4995]).reduce((a, b) => a + b)).toAgreeWithin(1, 1e-15);
    expect(codeOf(() => normaliseFractions([0.5, 0.498]))).toBe("fractionsDoNotSum");
    expect(codeOf(() => normaliseFractions([0.5, 0.502]))).toBe("fractionsDoNotSum");
    expect(codeOf(() => normaliseFractions([1.2, -0.2]))).toBe("fractionNegative");
    expect(codeOf(() => normaliseFractions([0, 0]))).toBe("fractionsAllZero");
    expect(codeOf(() => normaliseFractions([Number.NaN]))).toBe("fractionNegative");
    expect(codeOf(() => normaliseFractions([]))).toBe("noComponents");
  });
});

describe("solutions", () => {
  const water = part("H2O", 1000);
  const iodide = part("KI", 3120);

  it("fill up to a given density with solvent", () => {
    const solution = dissolve(water, [{ part: iodide, concentrationKgPerM3: 50 }], 1036);
    expect(solution.densityEstimated).toBe(false);
    expect(share(solution, "I")).toAgreeWithin(((50 / 1036) * 126.9) / 165.998, 1e-12);
  });

  it("estimate the density from additive volumes", () => {
    const solution = dissolve(water, [{ part: iodide, concentrationKgPerM3: 50 }], null);
    expect(solution.densityKgPerM3).toAgreeWithin(50 + 1000 * (1 - 50 / 3120), 1e-12);
    expect(solution.densityEstimated).toBe(true);
  });

  it("are the solvent at vanishing concentration", () => {
    const solution = dissolve(water, [{ part: iodide, concentrationKgPerM3: 1e-9 }], null);
    expect(solution.densityKgPerM3).toAgreeWithin(1000, 1e-9);
    expect(share(solution, "O")).toAgreeWithin(share(water, "O"), 1e-9);
  });

  it("refuse more solute than there is room for", () => {
    expect(codeOf(() => dissolve(water, [{ part: iodide, concentrationKgPerM3: 3200 }], null))).toBe(
      "concentrationTooHigh",
    );
    expect(codeOf(() => dissolve(water, [{ part: iodide, concentrationKgPerM3: 1036 }], 1036))).toBe(
      "concentrationTooHigh",
    );
    expect(codeOf(() => dissolve(water, [{ part: part("KI", null), concentrationKgPerM3: 50 }], null))).toBe(
      "densityMissing",
    );
  });
});

describe("density", () => {
  const water = compositionOfFormula(parseFormula("H2O"));
  it("is above 0 and up to 50 g/cm³", () => {
    for (const density of [0, -1, 50_001, Number.NaN, Infinity])
      expect(codeOf(() => withDensity(water, density))).toBe("densityOutOfRange");
    expect(withDensity(water, 50_000).densityKgPerM3).toBe(50_000);
  });
  it("falls in proportion to the solid share", () => {
    expect(withSolidFraction(withDensity(water, 1000), 0.26).densityKgPerM3).toBe(260);
    for (const solid of [0, -0.1, 1.01])
      expect(codeOf(() => withSolidFraction(withDensity(water, 1000), solid))).toBe("solidFractionOutOfRange");
  });
  it("gives water its electrons", () => {
    // Derived: 0.3343 electrons per cubic ångström at 1 g/cm³.
    expect(electronDensityPerM3(withDensity(water, 1000))).toAgreeWithin(0.3343e30, 1e-4);
    expect(electronDensityPerM3(VACUUM)).toBe(0);
  });
});
