/** The browser's tables travel as JSON in other units; the plan they give must be the server's to 1e-9. */
import { afterAll, beforeAll, expect, it, vi } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { TABULATION_KEYS, type TabulationKey } from "#src/lib/physics/index.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { rankJob, viewJob } from "#src/lib/plans/jobs.ts";
import { DEFAULT_PLAN } from "#src/lib/plans/question.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";
import { elementFactors } from "#src/lib/services/constants.ts";
import { allMaterials } from "#src/lib/services/materials.ts";
import { tableInfo } from "#src/lib/tables/info.ts";
import { loadElement, tablesOf } from "#src/lib/tables/load.client.ts";

const tables = committedTables();
const finder = materialFinder(allMaterials());

beforeAll(() => {
  vi.stubGlobal("fetch", async (address: string) => {
    const [, symbol = "", query = ""] = /elements\/(\w+)\/factors\?(.*)$/.exec(address) ?? [];
    const tabulation = new URLSearchParams(query).get("tabulation") as TabulationKey;
    return new Response(JSON.stringify(elementFactors(symbol, tabulation, tables)));
  });
});
afterAll(() => {
  vi.unstubAllGlobals();
});

/** Every number of a value with its path. */
function numbersIn(value: unknown, path = ""): [string, number][] {
  if (typeof value === "number") return [[path, value]];
  if (value === null || typeof value !== "object") return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}/${key}`));
}

it.each([
  { use: "direct" as const },
  { use: "tomography" as const, feature: "hydroxyapatite", shape: "sphere" as const, size: "10 um" },
  { use: "retrieval" as const, setup: "long-beamline", size: "200 um", layers: "before; 1 mm; aluminium" },
])("the browser ranks as the server does: $use", async (fields) => {
  const { request, faults } = readPlan({ ...DEFAULT_PLAN, ...fields }, finder);
  expect(faults).toEqual([]);
  const info = tableInfo(tables);
  const wanted = [1, 6, 8, 13, 15, 20, 71];
  const elements = await Promise.all(wanted.map((atomicNumber) => loadElement(atomicNumber, info)));
  const browser = tablesOf(elements, info);
  const date = new Date(0);
  const [here, there] = [tables, browser].map((each) => rankJob(request!, each, finder.lookup, date));
  const [own, other] = [numbersIn(here), numbersIn(there)];
  expect(own.length).toBeGreaterThan(4000);
  expect(other.map(([path]) => path)).toEqual(own.map(([path]) => path));
  for (const [index, [path, value]] of own.entries()) {
    const given = other[index]![1];
    if (Math.abs(given - value) > 1e-9 * Math.abs(value))
      throw new Error(`${path}: ${value} here, ${given} in the browser`);
  }
  expect(there!.verdict.choice).toBe(here!.verdict.choice);
  expect(there!.verdict.summary).toBe(here!.verdict.summary);
});

it("the page's picks are the API's candidates", () => {
  const { request } = readPlan(DEFAULT_PLAN, finder);
  const date = new Date(0);
  const answer = rankJob(request!, tables, finder.lookup, date);
  const { result } = viewJob(request!, true, tables, finder.lookup, date).view;
  expect(result!.picks.map(({ candidate }) => candidate)).toEqual([...answer.candidates, answer.absorptionBest]);
  expect(result!.sentences.whole).toBe(answer.verdict.summary);
  expect(TABULATION_KEYS).toContain(result!.tabulation);
});

it("the factors of the working multiply to the ratio of the doses", () => {
  for (const fields of [
    {},
    { use: "retrieval" as const },
    { use: "tomography" as const },
    { counts: "0" },
    { objective: "fluence" as const },
  ]) {
    const { request } = readPlan({ ...DEFAULT_PLAN, ...fields }, finder);
    const { result } = viewJob(request!, true, tables, finder.lookup, new Date(0)).view;
    const { factors, ratio } = result!.working!;
    const product = Object.values(factors).reduce((all, factor) => all * factor, 1);
    expect(product).toAgreeWithin(ratio, 1e-9);
    expect(ratio).toAgreeWithin(result!.doseAdvantage!, 1e-9);
  }
});
