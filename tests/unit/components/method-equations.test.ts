import { expect, test } from "vitest";
import { EQUATIONS, equationNumber, type Equation, type EquationKey } from "#src/components/site/method/equations.ts";
import { mathml } from "#src/components/site/method/mathml.ts";

const equations = Object.entries(EQUATIONS) as [EquationKey, Equation][];

test("every equation turns into MathML with a spoken label and no style of its own", () => {
  for (const [key, { parts, where }] of equations) {
    for (const { tex, spoken } of parts) {
      const markup = mathml(tex, { display: true, spoken });
      expect(markup, key).toMatch(/^<math aria-label="[^"]+" display="block">/);
      expect(markup, key).not.toMatch(/style=|<script|ParseError|tml-/);
    }
    for (const [symbol] of where ?? []) expect(mathml(symbol), key).toMatch(/^<math>/);
  }
});

test("equations are numbered in reading order from 1", () => {
  expect(equations.map(([key]) => equationNumber(key))).toEqual(equations.map((_, place) => place + 1));
});

test("TeX that cannot be read stops the page instead of showing an error in it", () => {
  expect(() => mathml(String.raw`\frac{1}{`)).toThrow();
});
