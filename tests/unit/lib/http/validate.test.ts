/** Faults of input: at their place, with what was given, what is accepted and, for a choice of forms, the one that was meant. */
import { describe, expect, it } from "vitest";
import { ProblemError, type InputFault, MAX_FAULTS } from "#src/lib/http/problems.ts";
import { validate } from "#src/lib/http/validate.ts";
import { constantsRequestSchema } from "#src/lib/schemas/constants.ts";

function faults(value: unknown): InputFault[] {
  try {
    validate(constantsRequestSchema, value);
  } catch (error) {
    if (error instanceof ProblemError) return error.errors ?? [];
    throw error;
  }
  return [];
}
const WATER = { formula: "H2O", densityGCm3: 1 };
const ofMaterial = (material: unknown): InputFault[] => faults({ material, energiesKeV: [20] });
const ofEnergies = (energiesKeV: unknown): InputFault[] => faults({ material: WATER, energiesKeV });
const brief = (list: readonly InputFault[]): string[] => list.map(({ path, code }) => `${path} ${code}`);

describe("validate", () => {
  it("gives good input back", () => {
    const request = { material: WATER, energiesKeV: [20] };
    expect(validate(constantsRequestSchema, request)).toEqual(request);
  });

  it.each([
    [{ formula: "H2O" }, ["/material/densityGCm3 missing"]],
    [{ densityGCm3: 1 }, ["/material/formula missing"]],
    [{ formula: "H2O", density: 1 }, ["/material/densityGCm3 missing", "/material/density unknownKey"]],
    [{ ...WATER, materialId: "water" }, ["/material/materialId unknownKey"]],
    [{ materialId: 5 }, ["/material/materialId wrongType"]],
    [{ components: [], basis: "mass" }, ["/material/components tooSmall"]],
    [{ components: [{ formula: "C", fraction: 1 }] }, ["/material/basis missing"]],
    [{ components: [{ formula: "C" }], basis: "mass" }, ["/material/components/0/fraction missing"]],
    [
      { components: [{ formula: "C", fraction: 1, part: 2 }], basis: "mass" },
      ["/material/components/0/part unknownKey"],
    ],
    [
      { components: [{ components: [{ formula: 5, fraction: 1 }], basis: "mass", fraction: 1 }], basis: "mass" },
      ["/material/components/0/components/0/formula wrongType"],
    ],
    [{ solvent: WATER }, ["/material/solutes missing"]],
    [{ solvent: WATER, solutes: [{ formula: "KI", mgPerMl: -1 }] }, ["/material/solutes/0/mgPerMl tooSmall"]],
    [{ ...WATER, solidFraction: 0 }, ["/material/solidFraction tooSmall"]],
  ])("of %j tells %j: the form that was meant", (material, expected) => {
    expect(brief(ofMaterial(material))).toEqual(expected);
  });

  it.each([null, 3, "H2O", [], {}, { name: "water" }])("of %j names every form of a material", (material) => {
    const [fault, ...others] = ofMaterial(material);
    expect(others).toEqual([]);
    expect(fault?.path).toBe("/material");
    for (const key of ["formula", "densityGCm3", "materialId", "components", "solvent"])
      expect(fault?.message).toContain(key);
  });

  it.each([
    [{ from: 1, to: 2 }, ["/energiesKeV/count missing"]],
    [{ from: 2, to: 1, count: 3 }, ["/energiesKeV/to rangeReversed"]],
    [{ from: 1, to: 2, count: 1 }, ["/energiesKeV/count tooFewPoints"]],
    [{ from: 1, to: 2, count: 1e9 }, ["/energiesKeV/count tooLarge"]],
    [{ from: 1, to: 2, step: 0 }, ["/energiesKeV/count missing", "/energiesKeV/step unknownKey"]],
    [
      [20, "8", null],
      ["/energiesKeV/1 wrongType", "/energiesKeV/2 wrongType"],
    ],
    [[], ["/energiesKeV tooSmall"]],
    [Array(2001).fill(20), ["/energiesKeV tooLong"]],
    [{}, ["/energiesKeV wrongType"]],
    ["20", ["/energiesKeV wrongType"]],
  ])("of energies %j tells %j", (energies, expected) => {
    expect(brief(ofEnergies(energies))).toEqual(expected);
  });

  it("says what was given, what is accepted and how to mend it", () => {
    expect(ofEnergies(["8"])[0]?.message).toMatch(/“8” was given.*number.*without quotes/);
    expect(ofEnergies([-8])[0]?.message).toMatch(/-8 was given.*more than 0/);
    expect(ofMaterial({ ...WATER, densityGCm3: 500 })[0]?.message).toMatch(/500 was given.*50/);
    expect(faults({ material: WATER, energiesKeV: [20], tabulation: "best" })[0]?.message).toMatch(
      /“best”.*epdl97, henke93/,
    );
  });

  it("repeats at most 64 characters of any input, and tells a bounded number of faults", () => {
    const long = "x".repeat(5000);
    for (const list of [ofMaterial(long), ofMaterial({ [long]: 1, ...WATER }), ofEnergies([long])])
      for (const { path, message } of list) expect(`${path}${message}`).not.toMatch(/x{65}/);
    const many = Object.fromEntries(Array.from({ length: 5000 }, (_, index) => [`k${index}`, 1]));
    expect(faults(many)).toHaveLength(MAX_FAULTS);
    expect(ofEnergies(Array(100).fill("a"))).toHaveLength(MAX_FAULTS);
  });

  it("answers deep and wide bodies quickly", () => {
    let material: Record<string, unknown> = {};
    for (let depth = 0; depth < 9; depth++)
      material = {
        components: [
          { ...material, fraction: 1 },
          { ...material, x: 1 },
        ],
        basis: "mass",
      };
    const start = performance.now();
    expect(ofMaterial(material)).toHaveLength(MAX_FAULTS);
    expect(performance.now() - start).toBeLessThan(1000);
  });
});
