/** The constants endpoints: what they answer, and that it is what the core computes and the document promises. */
import { describe, expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { constantsBatchAnswerSchema } from "#src/lib/http/operations.ts";
import {
  compositionOfFormula,
  opticalConstants,
  parseFormula,
  perCmFromPerM,
  withDensity,
} from "#src/lib/physics/index.ts";
import {
  type ConstantsAnswer,
  constantsAnswerSchema,
  type FactorsAnswer,
  factorsAnswerSchema,
} from "#src/lib/schemas/constants.ts";
import { call, good, post, refused, WATER } from "#tests/support/api.ts";

const tables = committedTables();

describe("GET and POST constants", () => {
  it("answer the same, and what the core computes from the committed tables", async () => {
    const fromGet = good<ConstantsAnswer>(
      await call("/constants?formula=Ca5P3O13H&densityGCm3=3.16&energiesKeV=5,20,60"),
    );
    const fromPost = good<ConstantsAnswer>(
      await post("/constants", { material: { formula: "Ca5P3O13H", densityGCm3: 3.16 }, energiesKeV: [5, 20, 60] }),
    );
    expect(fromPost).toEqual(fromGet);
    constantsAnswerSchema.parse(fromGet);
    const material = withDensity(compositionOfFormula(parseFormula("Ca5P3O13H")), 3160);
    for (const row of fromGet.rows) {
      const constants = opticalConstants(material, row.energyKeV * 1000, tables)!;
      expect(row.delta).toAgreeWithin(constants.delta, 1e-9);
      expect(row.beta).toAgreeWithin(constants.beta, 1e-9);
      expect(row.muTotalPerCm).toAgreeWithin(perCmFromPerM(constants.muTotalPerM), 1e-9);
      expect(row.muEnergyAbsorptionPerCm).toAgreeWithin(perCmFromPerM(constants.muEnergyAbsorptionPerM), 1e-9);
    }
  });

  it("E9 give one row an energy, in the order given, repeats included", async () => {
    const { rows } = good<ConstantsAnswer>(
      await post("/constants", { material: WATER, energiesKeV: [30, 10, 30, 20] }),
    );
    expect(rows.map((row) => row.energyKeV)).toEqual([30, 10, 30, 20]);
    expect(rows[0]).toEqual(rows[2]);
  });

  it("take ranges with both ends, log unless told otherwise", async () => {
    const log = good<ConstantsAnswer>(
      await post("/constants", { material: WATER, energiesKeV: { from: 10, to: 40, count: 3 } }),
    );
    expect(log.rows.map((row) => row.energyKeV)).toEqual([10, 20, 40]);
    const linear = good<ConstantsAnswer>(
      await post("/constants", { material: WATER, energiesKeV: { from: 10, to: 40, count: 3, spacing: "linear" } }),
    );
    expect(linear.rows.map((row) => row.energyKeV)).toEqual([10, 25, 40]);
  });

  it("give the spread over the tables that cover the energy, and notes near edges and below 1 keV", async () => {
    const { rows, edges } = good<ConstantsAnswer>(
      await post("/constants", {
        material: { formula: "CsI", densityGCm3: 4.51 },
        energiesKeV: [0.5, 5.2, 20, 33.2, 440],
      }),
    );
    expect(rows[0]?.notes).toContain("belowOneKeV");
    expect(rows[3]?.notes).toEqual(["nearEdge"]);
    expect(rows[2]?.notes).toEqual([]);
    for (const quantity of ["delta", "beta", "muTotalPerCm"] as const) {
      const [low, high] = rows[2]!.spread![quantity];
      expect(low).toBeLessThanOrEqual(rows[2]![quantity]!);
      expect(high).toBeGreaterThanOrEqual(rows[2]![quantity]!);
      expect(high).toBeGreaterThan(low);
    }
    expect(rows[4]?.spread).toBeNull();
    expect(edges.map(({ element, shell }) => `${element} ${shell}`)).toEqual(
      expect.arrayContaining(["I K", "Cs K", "I L3"]),
    );
  });

  it("use another table where asked, with EPDL97's scattering", async () => {
    const henke = good<ConstantsAnswer>(
      await post("/constants", { material: WATER, energiesKeV: [10], tabulation: "henke93" }),
    );
    const epdl = good<ConstantsAnswer>(await post("/constants", { material: WATER, energiesKeV: [10] }));
    expect(henke.table.tabulation).toBe("henke93");
    expect(henke.rows[0]!.muCoherentPerCm).toBe(epdl.rows[0]!.muCoherentPerCm);
    expect(henke.rows[0]!.muPhotoPerCm).not.toBe(epdl.rows[0]!.muPhotoPerCm);
    expect(henke.citation).toContain("Henke");
  });

  it("answer null with notInTable where a table lacks an element, and never NaN or 0", async () => {
    const { rows } = good<ConstantsAnswer>(
      await post("/constants", {
        material: { formula: "PuO2", densityGCm3: 11.5 },
        energiesKeV: [20],
        tabulation: "chantler95",
      }),
    );
    expect(rows[0]).toMatchObject({ delta: null, beta: null, muTotalPerCm: null, notes: ["notInTable"] });
  });

  it("compute mixtures, solutions, pores and vacuum", async () => {
    const mixture = good<ConstantsAnswer>(
      await post("/constants", {
        material: {
          components: [
            { materialId: "water", fraction: 0.95 },
            { formula: "KI", fraction: 0.05 },
          ],
          basis: "mass",
          densityGCm3: 1.04,
        },
        energiesKeV: [24],
      }),
    );
    expect(mixture.material.massFractions["I"]).toAgreeWithin((0.05 * 126.9) / (126.9 + 39.098), 1e-9);
    const solution = good<ConstantsAnswer>(
      await post("/constants", {
        material: { solvent: { materialId: "water" }, solutes: [{ formula: "KI", densityGCm3: 3.12, mgPerMl: 50 }] },
        energiesKeV: [24],
      }),
    );
    expect(solution.material.densityEstimated).toBe(true);
    // 50 mg of KI take 50/3.12 µL of each millilitre; the rest is water.
    expect(solution.material.densityGCm3).toAgreeWithin(0.05 + 1 * (1 - 0.05 / 3.12), 1e-9);
    expect(solution.rows[0]?.notes).toEqual(["densityEstimated"]);
    const porous = good<ConstantsAnswer>(
      await post("/constants", { material: { ...WATER, solidFraction: 0.25 }, energiesKeV: [24] }),
    );
    expect(porous.material.densityGCm3).toBe(0.25);
    const vacuum = good<ConstantsAnswer>(
      await post("/constants", { material: { materialId: "vacuum" }, energiesKeV: [24] }),
    );
    expect(vacuum.rows[0]).toMatchObject({
      delta: 0,
      beta: 0,
      muTotalPerCm: 0,
      attenuationLengthMm: null,
      deltaOverBeta: null,
    });
  });

  it("answer 304 to a GET whose answer is known", async () => {
    const first = await call("/constants?materialId=water&energiesKeV=10");
    const etag = first.headers.get("etag");
    expect(etag).toMatch(/^(W\/)?"[\w-]+"$/);
    const again = await call("/constants?materialId=water&energiesKeV=10", { headers: { "if-none-match": etag! } });
    expect([again.status, again.body]).toEqual([304, ""]);
  });
});

describe("POST constants/batch", () => {
  it("answers each item or refuses it by itself", async () => {
    const answer = good<{ results: unknown[] }>(
      await post("/constants/batch", {
        items: [
          { material: WATER, energiesKeV: [10] },
          { material: { formula: "Hx", densityGCm3: 1 }, energiesKeV: [10] },
          { material: { materialId: "no-such" }, energiesKeV: [10] },
        ],
      }),
    );
    constantsBatchAnswerSchema.parse(answer);
    expect(answer.results).toHaveLength(3);
    expect(answer.results[0]).toHaveProperty("rows");
    expect(answer.results[1]).toMatchObject({
      status: 422,
      errors: [{ path: "/material/formula", code: "unknownElement" }],
    });
    expect(answer.results[2]).toMatchObject({ status: 404 });
  });

  it("refuses too many items and too many rows, naming the limit", async () => {
    const item = { material: WATER, energiesKeV: [10] };
    expect(
      refused(await post("/constants/batch", { items: Array(101).fill(item) }), "invalid").errors?.[0]?.message,
    ).toContain("100");
    const wide = { material: WATER, energiesKeV: { from: 5, to: 50, count: 2000 } };
    expect(refused(await post("/constants/batch", { items: Array(6).fill(wide) }), "invalid").detail).toContain(
      "10000",
    );
  });
});

describe("GET elements/{symbol}/factors", () => {
  it("gives the tabulated rows; an edge stands twice, below then above", async () => {
    const answer = good<FactorsAnswer>(await call("/elements/Fe/factors"));
    factorsAnswerSchema.parse(answer);
    const k = answer.edges.find((edge) => edge.shell === "K")!;
    const at = answer.energiesKeV.indexOf(k.energyKeV);
    expect(at).toBeGreaterThan(0);
    expect(answer.energiesKeV[at + 1]).toBe(k.energyKeV);
    expect(answer.f2[at + 1]!).toBeGreaterThan(5 * answer.f2[at]!);
  });

  it("is immutable with the version in use, else revalidated; another version is not found", async () => {
    const { table } = good<FactorsAnswer>(await call("/elements/O/factors"));
    expect((await call(`/elements/O/factors?version=${table.version}`)).headers.get("cache-control")).toContain(
      "immutable",
    );
    expect((await call("/elements/O/factors")).headers.get("cache-control")).toBe("no-cache");
    refused(await call("/elements/O/factors?version=0.0.1"), "notFound");
  });

  it("refuses symbols that are none, and elements that a table lacks", async () => {
    for (const symbol of ["Xx", "fe", "constructor", "1%20OR%201=1"])
      refused(await call(`/elements/${symbol}/factors`), "notFound");
    refused(await call("/elements/Pu/factors?tabulation=henke93"), "notFound");
    expect(refused(await call("/elements/Fe/factors?tabulation=best"), "invalid").errors?.[0]).toMatchObject({
      path: "/tabulation",
      code: "notAChoice",
    });
  });
});

describe("materials", () => {
  it("lists pages that hold every material once", async () => {
    const ids: string[] = [];
    let cursor = "";
    do {
      const page = good<{ items: { id: string }[]; nextCursor: string | null }>(
        await call(`/materials?limit=100&cursor=${cursor}`),
      );
      ids.push(...page.items.map((item) => item.id));
      cursor = page.nextCursor ?? "";
    } while (cursor !== "");
    expect(ids.length).toBeGreaterThanOrEqual(160);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it("finds by name, formula, other name and misspelt name, best first", async () => {
    const first = async (query: string): Promise<string | undefined> =>
      good<{ items: { id: string }[] }>(await call(`/materials?query=${encodeURIComponent(query)}&limit=5`)).items[0]
        ?.id;
    expect(await first("water")).toBe("water");
    expect(await first("PMMA")).toBe("pmma");
    expect(await first("Kapton")).toBe("polyimide");
    expect(await first("hydroxyapatit")).toBe("hydroxyapatite");
    expect(await first("Al")).toBe("aluminium");
  });

  it("gives one by id, and 404 for another", async () => {
    expect(good<{ id: string }>(await call("/materials/pmma")).id).toBe("pmma");
    refused(await call("/materials/no-such"), "notFound");
    refused(await call("/materials/constructor"), "notFound");
  });

  it("I10, F2 refuses limits, cursors and queries out of range", async () => {
    for (const query of [
      "limit=-1",
      "limit=1e9",
      "limit=2.5",
      "limit=ten",
      "cursor=%21%21",
      `query=${"x".repeat(65)}`,
      "sort=name%22--",
    ]) {
      expect(refused(await call(`/materials?${query}`), "invalid").errors?.length, query).toBeGreaterThan(0);
    }
    refused(await call("/materials?query=a&query=b"), "repeatedKey");
  });
});

describe("methods", () => {
  it("not offered are refused with those that are", async () => {
    for (const [path, method, allow] of [
      ["/constants", "DELETE", "GET, POST, HEAD"],
      ["/constants/batch", "GET", "POST"],
      ["/elements/Fe/factors", "POST", "GET, HEAD"],
      ["/materials", "PUT", "GET, HEAD"],
      ["/openapi.json", "PATCH", "GET, HEAD"],
    ] as const) {
      const answer = await call(path, {
        method,
        headers: { "content-type": "application/json" },
        ...(method === "GET" ? {} : { body: "{}" }),
      });
      refused(answer, "methodNotAllowed");
      expect(answer.headers.get("allow"), path).toBe(allow);
    }
  });
});
