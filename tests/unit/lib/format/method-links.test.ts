import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { METHOD_TOPICS, methodHref, methodTopicHref, NOTE_EXPLANATIONS } from "#src/lib/format/method-links.ts";
import { QUANTITIES, type QuantityKey } from "#src/lib/format/quantities.ts";
import { symbolParts } from "#src/lib/format/symbols.ts";

const SECTIONS = join(import.meta.dirname, "../../../../src/components/site/method");
const ids = readdirSync(SECTIONS)
  .filter((file) => file.endsWith(".astro"))
  .flatMap((file) => [...readFileSync(join(SECTIONS, file), "utf8").matchAll(/\sid="([\w-]+)"/g)])
  .map(([, id]) => id);

describe("the method page", () => {
  test("explains every displayed quantity under the id that pages link to", () => {
    const keys = Object.keys(QUANTITIES) as QuantityKey[];
    expect(keys.length).toBeGreaterThan(20);
    for (const key of keys) expect(ids, key).toContain(QUANTITIES[key].anchor);
  });
  test("explains every topic and note that pages link to", () => {
    for (const topic of METHOD_TOPICS) expect(ids, topic).toContain(topic);
    for (const [code, { anchor }] of Object.entries(NOTE_EXPLANATIONS)) expect(ids, code).toContain(anchor);
  });
  test("gives no id twice", () => {
    expect(ids.filter((id, place) => ids.indexOf(id) !== place)).toEqual([]);
  });
  test("is reached by the address the formats make", () => {
    expect(methodHref("betaEffective")).toBe("/method#beta-effective");
    expect(methodTopicHref("safety")).toBe("/method#safety");
  });
});

test("an index of a symbol becomes a subscript, what follows it stays on the line", () => {
  expect(symbolParts("m_e c²")).toEqual([
    { text: "m", script: "base" },
    { text: "e", script: "sub" },
    { text: " c²", script: "base" },
  ]);
  expect(symbolParts("δ/β_eff")).toEqual([
    { text: "δ/β", script: "base" },
    { text: "eff", script: "sub" },
  ]);
});
