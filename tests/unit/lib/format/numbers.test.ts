import { describe, expect, test } from "vitest";
import fc from "fast-check";
import {
  formatCount,
  formatFixed,
  formatGiven,
  formatPercent,
  formatSignedPercent,
  formatSignificant,
  rangeText,
  spreadText,
  significantText,
} from "#src/lib/format/numbers.ts";

const THIN = "\u202f";
const SPACE = "\u00a0";

describe("significant digits", () => {
  test("a small number becomes a mantissa and a power of ten", () => {
    expect(formatSignificant(4.62169e-7, 3)).toEqual({ mantissa: "4.62", exponent: -7 });
  });
  test("four digits are the default and trailing zeros stay", () => {
    expect(formatSignificant(0.905)).toEqual({ mantissa: "0.9050", exponent: null });
    expect(formatSignificant(21)).toEqual({ mantissa: "21.00", exponent: null });
  });
  test("thousands are set apart by a narrow no-break space", () => {
    expect(formatSignificant(2425.3)).toEqual({ mantissa: `2${THIN}425`, exponent: null });
    expect(formatSignificant(12705)).toEqual({ mantissa: `12${THIN}710`, exponent: null });
  });
  test("a negative number carries the true minus", () => {
    expect(formatSignificant(-1406.2)).toEqual({ mantissa: `\u22121${THIN}406`, exponent: null });
    expect(formatSignificant(-8.99e-8, 3)).toEqual({ mantissa: "\u22128.99", exponent: -8 });
  });
  test("rounding that reaches the next power of ten moves the exponent", () => {
    expect(formatSignificant(9.9999e-7, 3)).toEqual({ mantissa: "1.00", exponent: -6 });
    expect(formatSignificant(99999.6)).toEqual({ mantissa: "1.000", exponent: 5 });
    expect(formatSignificant(0.00099996)).toEqual({ mantissa: "0.001000", exponent: null });
  });
  test("what has no value is null, never a number", () => {
    expect(formatSignificant(null)).toBeNull();
    expect(formatSignificant(Number.NaN)).toBeNull();
    expect(formatSignificant(Number.POSITIVE_INFINITY)).toBeNull();
    expect(significantText(null)).toBe("no value");
  });
  test("zero is plain zero", () => {
    expect(formatSignificant(0)).toEqual({ mantissa: "0", exponent: null });
    expect(formatSignificant(-0)).toEqual({ mantissa: "0", exponent: null });
  });
  test("the text form writes the power in superscripts", () => {
    expect(significantText(4.55e-10, 3)).toBe(`4.55${SPACE}×${SPACE}10⁻¹⁰`);
  });
  test("the digits shown are the value within half a unit of the last digit", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-12, max: 1e12, noNaN: true }),
        fc.integer({ min: 1, max: 8 }),
        (value, digits) => {
          const parts = formatSignificant(value, digits);
          const shown = Number(parts?.mantissa.replaceAll(THIN, "")) * 10 ** (parts?.exponent ?? 0);
          // half a unit of the last digit, and the rounding of the power itself
          expect(Math.abs(shown / value - 1)).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits) + 1e-12);
        },
      ),
    );
  });
});

describe("other numbers", () => {
  test("a given number keeps its digits and gets no zeros", () => {
    expect(formatGiven(33.1694, 4)).toBe("33.17");
    expect(formatGiven(20)).toBe("20");
    expect(formatGiven(0.1)).toBe("0.1");
    expect(formatGiven(0)).toBe("0");
    expect(formatGiven(2.5e-9, 2)).toBe(`2.5${SPACE}×${SPACE}10⁻⁹`);
    expect(formatGiven(-2500)).toBe(`\u22122${THIN}500`);
  });
  test("fixed decimals align columns, and nothing becomes minus zero", () => {
    expect(formatFixed(1.2, 3)).toBe("1.200");
    expect(formatFixed(-0.0001, 2)).toBe("0.00");
    expect(formatFixed(-1234.5, 1)).toBe(`\u22121${THIN}234.5`);
  });
  test("shares read as percent", () => {
    expect(formatPercent(0.0312)).toBe(`3.1${SPACE}%`);
    expect(formatPercent(1)).toBe(`100${SPACE}%`);
    expect(formatPercent(0)).toBe(`0${SPACE}%`);
    expect(formatPercent(0.00001)).toBe(`below 0.01${SPACE}%`);
    expect(formatPercent(0.8881, 3)).toBe(`88.8${SPACE}%`);
    expect(formatPercent(12.5)).toBe(`1${THIN}300${SPACE}%`);
  });
  test("differences carry their sign", () => {
    expect(formatSignedPercent(0.008)).toBe(`+0.8${SPACE}%`);
    expect(formatSignedPercent(-0.034)).toBe(`\u22123.4${SPACE}%`);
    expect(formatSignedPercent(0)).toBe(`0${SPACE}%`);
  });
  test("two bounds share one power of ten where they can", () => {
    expect(rangeText([4.07e-7, 4.1e-7], 3)).toBe(`4.07 to 4.10${SPACE}×${SPACE}10⁻⁷`);
    expect(rangeText([9.9e-8, 1.01e-7], 3)).toBe(`9.90${SPACE}×${SPACE}10⁻⁸ to 1.01${SPACE}×${SPACE}10⁻⁷`);
    expect(rangeText([0.728, 0.76], 3)).toBe("0.728 to 0.760");
    expect(rangeText([Number.NaN, 1])).toBe("no value");
    expect(spreadText([39.23, 94.76], "1/cm")).toBe(`tables: 39.23 to 94.76${SPACE}1/cm`);
    expect(spreadText([1.50301e-6, 1.50318e-6])).toBe(`spread 0.011${SPACE}%`);
    expect(spreadText([Number.NaN, 1])).toBe("no value");
  });
  test("counts are grouped", () => {
    expect(formatCount(1234567)).toBe(`1${THIN}234${THIN}567`);
  });
});
