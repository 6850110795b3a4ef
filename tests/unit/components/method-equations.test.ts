import { readFileSync } from "node:fs";
import { join } from "node:path";
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

test("the page shows every equation once, in the order of its numbers", () => {
  const source = join(import.meta.dirname, "../../../src");
  const read = (...path: string[]): string => readFileSync(join(source, ...path), "utf8");
  const sections = [...read("pages/method/index.astro").matchAll(/^\s+<(\w+) \/>$/gm)].map(
    ([, name]) => name as string,
  );
  const shown = sections.flatMap((name) =>
    [...read("components/site/method", `${name}.astro`).matchAll(/<Equation of="(\w+)"/g)].map(([, key]) => key),
  );
  expect(shown).toEqual(equations.map(([key]) => key));
});

test("TeX that cannot be read stops the page instead of showing an error in it", () => {
  expect(() => mathml(String.raw`\frac{1}{`)).toThrow();
});
