import { describe, expect, test } from "vitest";
import { formatDate } from "#src/lib/format/dates.ts";
import { compositionText, formatFormula, formulaText } from "#src/lib/format/formula.ts";
import { readableLength, unitParts, unitText } from "#src/lib/format/units.ts";

describe("units", () => {
  test("reciprocals and powers become superscripts", () => {
    expect(unitText("1/cm")).toBe("cm⁻¹");
    expect(unitText("g/cm3")).toBe("g/cm³");
    expect(unitText("1/Å3")).toBe("Å⁻³");
    expect(unitText("cm2/g")).toBe("cm²/g");
    expect(unitText("rad/µm")).toBe("rad/µm");
    expect(unitText("keV")).toBe("keV");
    expect(unitParts("cm2/g")).toEqual([
      { text: "cm", script: "base" },
      { text: "2", script: "sup" },
      { text: "/g", script: "base" },
    ]);
  });
  test("a length takes the unit that reads best", () => {
    expect(readableLength(2340)).toEqual({ value: 2.34, unit: "m" });
    expect(readableLength(350)).toEqual({ value: 35, unit: "cm" });
    expect(readableLength(12.3)).toEqual({ value: 12.3, unit: "mm" });
    expect(readableLength(0.25)).toEqual({ value: 250, unit: "µm" });
    expect(readableLength(2e-5)).toEqual({ value: 20, unit: "nm" });
    expect(readableLength(0)).toEqual({ value: 0, unit: "mm" });
    expect(readableLength(null)).toEqual({ value: null, unit: "mm" });
  });
});

describe("formulas", () => {
  test("counts are subscripts, the number that leads a hydrate group is not", () => {
    expect(formatFormula("CuSO4·5H2O")).toEqual([
      { text: "CuSO", script: "base" },
      { text: "4", script: "sub" },
      { text: "·5H", script: "base" },
      { text: "2", script: "sub" },
      { text: "O", script: "base" },
    ]);
    expect(formulaText("Ca5(PO4)3OH")).toBe("Ca₅(PO₄)₃OH");
    expect(formulaText("Ni0.8Mn0.1Co0.1O2")).toBe("Ni₀.₈Mn₀.₁Co₀.₁O₂");
    expect(formulaText("CaSO4*0.5H2O")).toBe("CaSO₄·0.5H₂O");
    expect(formulaText("K3[Fe(CN)6]")).toBe("K₃[Fe(CN)₆]");
  });
  test("a formula typed with subscript digits comes out the same", () => {
    expect(formatFormula("H₂O")).toEqual(formatFormula("H2O"));
  });
  test("a composition is told in words, largest share first", () => {
    expect(compositionText({ H: 0.1119, O: 0.8881 })).toBe("O\u00a088.8\u00a0%, H\u00a011.2\u00a0%");
  });
});

describe("dates", () => {
  test("a date is written in words, in UTC", () => {
    expect(formatDate("2026-10-02T23:30:00Z")).toBe("2 October 2026");
    expect(formatDate(new Date(Date.UTC(2026, 0, 31)))).toBe("31 January 2026");
  });
  test("what is no date is refused", () => {
    expect(() => formatDate("soon")).toThrow(RangeError);
  });
});
