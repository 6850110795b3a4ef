/** From stated to computable: what each way of stating means, and where a fault is said to lie. */
import { describe, expect, it } from "vitest";
import {
  densityGCm3,
  type KeptComposition,
  type MaterialLookup,
  resolveMaterial,
  StatementError,
} from "#src/lib/materials/resolve.ts";
import { elementBySymbol } from "#src/lib/physics/index.ts";
import { MATERIAL_LIMITS, type MaterialStatement } from "#src/lib/schemas/material.ts";

const KEPT: Readonly<Record<string, KeptComposition>> = {
  water: { name: "Water", formula: "H2O", massFractions: null, densityGCm3: 1, densityUncertaintyPercent: 0.1 },
  tissue: {
    name: "Tissue",
    formula: null,
    massFractions: { H: 0.1, C: 0.2, O: 0.7 },
    densityGCm3: 1.06,
    densityUncertaintyPercent: null,
  },
  vacuum: { name: "Vacuum", formula: null, massFractions: null, densityGCm3: 0, densityUncertaintyPercent: null },
};
const lookup: MaterialLookup = (id) => (Object.hasOwn(KEPT, id) ? (KEPT[id] as KeptComposition) : null);
const resolve = (statement: MaterialStatement) => resolveMaterial(Object.freeze(statement), lookup);

function fault(statement: MaterialStatement): StatementError {
  try {
    resolve(statement);
  } catch (error) {
    if (error instanceof StatementError) return error;
    throw error;
  }
  throw new Error("It was accepted.");
}
const shareOf = (statement: MaterialStatement, symbol: string): number | undefined =>
  resolve(statement).material.massFractions.get(elementBySymbol(symbol)!.atomicNumber);

describe("a formula", () => {
  it("keeps its density, text and default uncertainty", () => {
    const resolved = resolve({ formula: "SiO₂", densityGCm3: 2.65 });
    expect(resolved).toMatchObject({ label: "SiO2", formula: "SiO2", densityUncertaintyPercent: 1 });
    expect(densityGCm3(resolved.material)).toBe(2.65);
    expect(resolve({ formula: "C", densityGCm3: 2, densityUncertaintyPercent: 5 }).densityUncertaintyPercent).toBe(5);
  });

  it("tells its faults at /formula, with position and suggestions", () => {
    expect(fault({ formula: "h2o", densityGCm3: 1 })).toMatchObject({
      path: "/formula",
      code: "letterCase",
      position: 1,
      suggestions: ["H2O"],
    });
  });

  it.each([0, -2.7, 50.1, Number.NaN, Infinity])(
    "refuses the density %d at its place, wherever it stands",
    (density) => {
      const part = { formula: "C", densityGCm3: density };
      expect(fault(part)).toMatchObject({ path: "/densityGCm3", code: "densityOutOfRange" });
      expect(fault({ components: [{ ...part, fraction: 1 }], basis: "volume" }).path).toBe("/components/0/densityGCm3");
      expect(
        fault({ components: [{ materialId: "water", fraction: 1 }], basis: "mass", densityGCm3: density }).path,
      ).toBe("/densityGCm3");
      expect(
        fault({ solvent: { materialId: "water" }, solutes: [{ formula: "KI", mgPerMl: 5 }], densityGCm3: density })
          .path,
      ).toBe("/densityGCm3");
    },
  );
});

describe("a kept material", () => {
  it("comes with its name, composition, density and uncertainty", () => {
    expect(resolve({ materialId: "water" })).toMatchObject({
      label: "Water",
      formula: "H2O",
      densityUncertaintyPercent: 0.1,
    });
    expect(shareOf({ materialId: "tissue" }, "C")).toAgreeWithin(0.2, 1e-12);
  });

  it("of density 0 is vacuum", () => {
    const { material } = resolve({ materialId: "vacuum" });
    expect([material.densityKgPerM3, material.massFractions.size]).toEqual([0, 0]);
  });

  it.each(["no-such", "constructor", "__proto__", "1 OR 1=1"])("%s is not found", (materialId) => {
    expect(fault({ materialId })).toMatchObject({ path: "/materialId", code: "materialNotFound" });
    expect(fault({ components: [{ materialId, fraction: 1 }], basis: "mass" }).path).toBe("/components/0/materialId");
  });
});

describe("a mixture", () => {
  const mixture = (
    components: readonly Record<string, unknown>[],
    more: { basis?: "mass" | "volume" | "mole"; densityGCm3?: number } = {},
  ): MaterialStatement => ({ components, basis: "mass", ...more }) as unknown as MaterialStatement;
  const half = { formula: "C", densityGCm3: 2, fraction: 0.5 };

  it("estimates its density from its parts and says so, or takes the one given", () => {
    const parts = [half, { formula: "O", densityGCm3: 1, fraction: 0.5 }];
    const estimated = resolve(mixture(parts)).material;
    expect(estimated.densityEstimated).toBe(true);
    expect(densityGCm3(estimated)).toAgreeWithin(1 / (0.5 / 2 + 0.5 / 1), 1e-11);
    const given = resolve(mixture(parts, { densityGCm3: 1.4 })).material;
    expect([given.densityEstimated, densityGCm3(given)]).toEqual([false, 1.4]);
  });

  it("of one part is that part, with another density if one is given", () => {
    const resolved = resolve(mixture([{ materialId: "water", fraction: 1 }], { densityGCm3: 0.92 }));
    expect(resolved).toMatchObject({ label: "Water", formula: "H2O" });
    expect(resolved.material.densityEstimated).toBe(false);
  });

  it("takes sums within 0.001 of 1 and states others", () => {
    expect(shareOf(mixture([half, { formula: "O", fraction: 0.4991 }], { densityGCm3: 1 }), "C")).toAgreeWithin(
      0.5 / 0.9991,
      1e-12,
    );
    expect(fault(mixture([half, { formula: "O", fraction: 0.498 }], { densityGCm3: 1 }))).toMatchObject({
      path: "",
      code: "fractionsDoNotSum",
      message: expect.stringContaining("0.998") as string,
    });
    expect(fault(mixture([half, { formula: "O", fraction: 0.502 }])).message).toContain("1.002");
    expect(
      fault(
        mixture([
          { ...half, fraction: 0 },
          { formula: "O", fraction: 0 },
        ]),
      ).code,
    ).toBe("fractionsAllZero");
    expect(
      fault(
        mixture([
          { ...half, fraction: 1.2 },
          { formula: "O", fraction: -0.2 },
        ]),
      ),
    ).toMatchObject({
      path: "/components/1",
      code: "fractionNegative",
    });
  });

  it("refuses the same part twice, and takes two densities of one formula", () => {
    expect(fault(mixture([half, half]))).toMatchObject({ path: "/components/1", code: "partRepeated" });
    expect(
      fault(
        mixture([
          { materialId: "water", fraction: 0.4 },
          { materialId: "water", fraction: 0.6 },
        ]),
      ).code,
    ).toBe("partRepeated");
    const inner = { components: [{ formula: "C", fraction: 1 }], basis: "mass", fraction: 0.5 };
    expect(fault(mixture([inner, inner])).code).toBe("partRepeated");
    const { material } = resolve(mixture([half, { ...half, densityGCm3: 3.5 }]));
    expect(densityGCm3(material)).toAgreeWithin(1 / (0.5 / 2 + 0.5 / 3.5), 1e-11);
  });

  it("names the part that lacks what its basis needs", () => {
    const bare = { formula: "O", fraction: 0.5 };
    expect(fault(mixture([half, bare], { basis: "volume" }))).toMatchObject({
      path: "/components/1",
      code: "densityMissing",
    });
    expect(fault(mixture([half, bare]))).toMatchObject({ path: "/densityGCm3", code: "densityMissing" });
    expect(fault(mixture([half, { materialId: "tissue", fraction: 0.5 }], { basis: "mole" }))).toMatchObject({
      path: "/components/1",
      code: "molarMassMissing",
    });
  });

  it("nests as deep as the limit, and says where it goes too deep", () => {
    const nested = (levels: number): Record<string, unknown> =>
      levels === 1
        ? { formula: "C", densityGCm3: 2 }
        : { components: [{ ...nested(levels - 1), fraction: 1 }], basis: "mass" };
    expect(resolve(nested(MATERIAL_LIMITS.nesting) as unknown as MaterialStatement).label).toBe("C");
    expect(fault(nested(MATERIAL_LIMITS.nesting + 1) as unknown as MaterialStatement)).toMatchObject({
      path: "/components/0".repeat(MATERIAL_LIMITS.nesting),
      code: "nestedTooDeep",
    });
  });

  it("has no vacuum in it", () => {
    expect(fault(mixture([half, { materialId: "vacuum", fraction: 0.5 }]))).toMatchObject({
      path: "/components/1",
      code: "vacuumInMixture",
    });
  });

  it("has a label of bounded length, however many parts it has", () => {
    const many = mixture(
      Array.from({ length: 32 }, (_, outer) => ({
        ...mixture(Array.from({ length: 32 }, (__, i) => ({ formula: `C${i + 1}H${outer + 1}`, fraction: 1 / 32 }))),
        fraction: 1 / 32,
      })),
      { densityGCm3: 1 },
    );
    expect(resolve(many).label.length).toBeLessThan(220);
  });
});

describe("a solution", () => {
  const solution = (solute: Record<string, unknown>, more: object = {}): MaterialStatement =>
    ({ solvent: { materialId: "water" }, solutes: [solute], ...more }) as unknown as MaterialStatement;
  const iodide = { formula: "KI", densityGCm3: 3.12, mgPerMl: 50 };

  it("adds volumes, or fills up to the density given", () => {
    const estimated = resolve(solution(iodide)).material;
    expect(densityGCm3(estimated)).toAgreeWithin(0.05 + (1 - 0.05 / 3.12), 1e-11);
    expect(estimated.densityEstimated).toBe(true);
    const given = solution({ formula: "KI", mgPerMl: 50 }, { densityGCm3: 1.04 });
    expect(shareOf(given, "K")! + shareOf(given, "I")!).toAgreeWithin(0.05 / 1.04, 1e-12);
    expect(resolve(given).label).toBe("Water with 50 mg/mL KI");
  });

  it("tells the solvent's faults from the solutes'", () => {
    expect(fault(solution({ ...iodide, mgPerMl: 4000 })).code).toBe("concentrationTooHigh");
    expect(fault(solution({ formula: "KI", mgPerMl: 50 }))).toMatchObject({
      path: "/solutes/0",
      code: "densityMissing",
    });
    expect(fault({ solvent: { formula: "H2O" }, solutes: [iodide] } as MaterialStatement)).toMatchObject({
      path: "/solvent",
      code: "densityMissing",
    });
    expect(fault(solution({ formula: "Kx", mgPerMl: 50 })).path).toBe("/solutes/0/formula");
    expect(fault(solution({ materialId: "water", mgPerMl: 50 }))).toMatchObject({
      path: "/solutes/0",
      code: "partRepeated",
    });
  });

  // Vacuum has no mass to fill up with: its shares would not sum to 1.
  it.each([{}, { densityGCm3: 1.04 }])("has no vacuum as solvent or solute, with %j", (more) => {
    expect(fault(solution({ materialId: "vacuum", mgPerMl: 5 }, more))).toMatchObject({
      path: "/solutes/0",
      code: "vacuumInMixture",
    });
    expect(fault({ solvent: { materialId: "vacuum" }, solutes: [iodide], ...more } as MaterialStatement)).toMatchObject(
      { path: "/solvent", code: "vacuumInMixture" },
    );
  });
});

describe("a solid fraction", () => {
  it("thins the matter and is named in the label", () => {
    const porous = resolve({ materialId: "water", solidFraction: 0.25 });
    expect([densityGCm3(porous.material), porous.label]).toEqual([0.25, "Water, 0.25 solid"]);
  });

  it.each([0, -0.1, 1.2])("of %d is refused at its place", (solidFraction) => {
    expect(fault({ materialId: "water", solidFraction })).toMatchObject({
      path: "/solidFraction",
      code: "solidFractionOutOfRange",
    });
  });
});
