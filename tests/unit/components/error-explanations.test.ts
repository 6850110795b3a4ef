import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import {
  FAULT_EXPLANATIONS,
  FIELD_EXPLANATIONS,
  FORMULA_EXPLANATIONS,
  MATERIAL_EXPLANATIONS,
  PLAN_EXPLANATIONS,
  PROBLEM_EXPLANATIONS,
  QUANTITY_EXPLANATIONS,
} from "#src/components/site/method/error-explanations.ts";
import { PROBLEM_KINDS } from "#src/lib/http/problems.ts";

const SOURCE = join(import.meta.dirname, "../../../src");
/** Where codes that reach people are made. */
const FOLDERS = [
  "lib/http",
  "lib/schemas",
  "lib/services",
  "lib/materials",
  "lib/plans",
  "lib/quantities",
  "lib/physics",
  "server",
];
/** zod's own word for an issue whose code stands in its params. */
const NOT_OURS = new Set(["custom"]);
/** A code as it is written where a fault is made: `code: "x"`, `told("x"`, `fault("x"`, or before `codeOf` is asked. */
const WRITTEN = [
  /\bcode: "([a-z][A-Za-z]+)"/g,
  /\b(?:told|fault)\(\s*"([a-z][A-Za-z]+)"/g,
  /\? "([a-z][A-Za-z]+)" : codeOf/g,
];
/** What `codeOf` makes of the schema's own faults. */
const CHOSEN = /(?:\breturn|[?:]) "([a-z][A-Za-z]+)"/g;

function codesInSource(): Set<string> {
  const codes = new Set<string>();
  const take = (text: string, pattern: RegExp): void => {
    for (const [, code] of text.matchAll(pattern)) codes.add(code as string);
  };
  for (const folder of FOLDERS) {
    for (const file of readdirSync(join(SOURCE, folder), { recursive: true, encoding: "utf8" })) {
      if (!file.endsWith(".ts")) continue;
      const text = readFileSync(join(SOURCE, folder, file), "utf8");
      for (const pattern of WRITTEN) take(text, pattern);
      take(/\nfunction codeOf[^]*?\n\}/.exec(text)?.[0] ?? "", CHOSEN);
    }
  }
  return codes;
}

test("every code that an answer can carry is explained", () => {
  const codes = [...codesInSource()].filter((code) => !NOT_OURS.has(code));
  // Some of each way to write a code, so that the search cannot go blind.
  expect(codes).toEqual(
    expect.arrayContaining(["oneOf", "decimalComma", "unsafeInteger", "missing", "wrongType", "tooLong", "tooLarge"]),
  );
  const explained = new Set([...Object.keys(FAULT_EXPLANATIONS), ...Object.keys(PROBLEM_EXPLANATIONS)]);
  expect(codes.filter((code) => !explained.has(code))).toEqual([]);
});

test("every kind of problem is explained, and no field's code is explained twice", () => {
  expect(Object.keys(PROBLEM_EXPLANATIONS)).toEqual(Object.keys(PROBLEM_KINDS));
  const groups = [
    FIELD_EXPLANATIONS,
    QUANTITY_EXPLANATIONS,
    FORMULA_EXPLANATIONS,
    MATERIAL_EXPLANATIONS,
    PLAN_EXPLANATIONS,
  ];
  const all = groups.flatMap((group) => Object.keys(group));
  expect(all.filter((code, place) => all.indexOf(code) !== place)).toEqual([]);
});

test("every explanation is a plain sentence with an end", () => {
  for (const [code, { means, remedy }] of [
    ...Object.entries(PROBLEM_EXPLANATIONS),
    ...Object.entries(FAULT_EXPLANATIONS),
  ]) {
    expect(means, code).toMatch(/^[A-Z0-9].*\.$/);
    expect(remedy, code).toMatch(/^[A-Z0-9].*\.$/);
  }
});
