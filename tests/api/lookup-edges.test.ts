/** The look-up endpoints at their edges: methods, caching, places of faults, and input made to cost time. */
import { createHash } from "node:crypto";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import fc from "fast-check";
import { beforeAll, afterAll, describe, expect, inject, it } from "vitest";
import { constantsBatchAnswerSchema } from "#src/lib/http/operations.ts";
import { problemSchema } from "#src/lib/http/problem-schema.ts";
import { constantsAnswerSchema, type ConstantsAnswer, factorsAnswerSchema } from "#src/lib/schemas/constants.ts";
import { materialsListSchema } from "#src/lib/schemas/materials-list.ts";
import { type ApiAnswer, call, good, post, postText, refused, WATER } from "#tests/support/api.ts";

/** Every byte of the server's database: what is only asked never changes it. */
function databaseHash(): string {
  const hash = createHash("sha256");
  const file = join(dirname(inject("serverLog")), "rimelight.db");
  for (const path of [file, `${file}-wal`]) if (existsSync(path)) hash.update(readFileSync(path));
  return hash.digest("hex");
}

let before = "";
beforeAll(() => {
  before = databaseHash();
});
afterAll(async () => {
  good(await call("/health"));
  expect(databaseHash(), "Something was stored.").toBe(before);
});

describe("HEAD and conditions", () => {
  it.each([
    "/constants?materialId=water&energiesKeV=10",
    "/elements/Fe/factors",
    "/materials?limit=3",
    "/materials/pmma",
    "/openapi.json",
  ])("HEAD %s has GET's headers and no body", async (path) => {
    const [head, get] = await Promise.all([call(path, { method: "HEAD" }), call(path)]);
    expect([head.status, head.body]).toEqual([200, ""]);
    for (const name of ["content-type", "cache-control", "etag"])
      expect(head.headers.get(name), name).toBe(get.headers.get(name));
  });

  it("HEAD is refused where there is no GET, and refused input stays refused", async () => {
    expect((await call("/constants/batch", { method: "HEAD" })).status).toBe(405);
    expect((await call("/constants", { method: "HEAD" })).status).toBe(422);
    expect((await call("/materials/no-such", { method: "HEAD" })).status).toBe(404);
  });

  it("If-None-Match takes lists, weak tags and *", async () => {
    const etag = (await call("/materials/pmma")).headers.get("etag")!.replace(/^W\//, "");
    const status = async (tags: string): Promise<number> =>
      (await call("/materials/pmma", { headers: { "if-none-match": tags } })).status;
    for (const tags of [etag, `W/${etag}`, `"x", ${etag}`, "*"]) expect(await status(tags), tags).toBe(304);
    for (const tags of ['"x"', "x", `${etag}x`]) expect(await status(tags), tags).toBe(200);
  });

  it("Accept is held to, with its weights", async () => {
    const status = async (accept: string): Promise<number> =>
      (await call("/materials/pmma", { headers: { accept } })).status;
    for (const accept of ["application/json", "application/*;q=0.5", "*/*", "text/html, */*;q=0.1", "text/html"])
      expect(await status(accept), accept).toBe(200);
    for (const accept of ["text/csv", "application/json;q=0", "application/xml, application/json; q=0.0"])
      expect(await status(accept), accept).toBe(406);
  });
});

describe("faults stand at their place", () => {
  it.each([
    ["formula=h2o&densityGCm3=1&energiesKeV=20", "/formula", "letterCase"],
    ["formula=&densityGCm3=1&energiesKeV=20", "/formula", "tooSmall"],
    ["formula=H2O&densityGCm3=0&energiesKeV=20", "/densityGCm3", "tooSmall"],
    ["formula=H2O&densityGCm3=-1&energiesKeV=20", "/densityGCm3", "tooSmall"],
    ["formula=H2O&densityGCm3=500&energiesKeV=20", "/densityGCm3", "tooLarge"],
    ["formula=H2O&densityGCm3=2,7&energiesKeV=20", "/densityGCm3", "decimalComma"],
    ["formula=H2O&densityGCm3=NaN&energiesKeV=20", "/densityGCm3", "notANumber"],
    ["formula=H2O&densityGCm3=Infinity&energiesKeV=20", "/densityGCm3", "notANumber"],
    ["formula=H2O&densityGCm3=1e400&energiesKeV=20", "/densityGCm3", "notFinite"],
    ["formula=H2O&densityGCm3=1e-400&energiesKeV=20", "/densityGCm3", "underflow"],
    ["formula=H2O&densityGCm3=%D9%A3&energiesKeV=20", "/densityGCm3", "notANumber"],
    ["formula=H2O&densityGCm3=0x10&energiesKeV=20", "/densityGCm3", "notANumber"],
    ["formula=H2O&densityGCm3=1+g/cm3&energiesKeV=20", "/densityGCm3", "notANumber"],
    ["materialId=water&energiesKeV=0", "/energiesKeV", "outOfRange"],
    ["materialId=water&energiesKeV=-8", "/energiesKeV", "outOfRange"],
    ["materialId=water&energiesKeV=20+keV", "/energiesKeV", "notANumber"],
    ["materialId=water&energiesKeV=20;30", "/energiesKeV", "notANumber"],
    ["materialId=water&energiesKeV=5-60", "/energiesKeV", "notANumber"],
    ["materialId=water&energiesKeV=500", "/energiesKeV/0", "outsideTable"],
    ["materialId=water&energiesKeV=20,0.01", "/energiesKeV/1", "outsideTable"],
    [`materialId=water&energiesKeV=${Array(2001).fill("20").join(",")}`, "/energiesKeV", "tooLong"],
    ["materialId=&energiesKeV=20", "/materialId", "tooSmall"],
    ["materialId=water&energiesKeV=20&tabulation=EPDL97", "/tabulation", "notAChoice"],
  ])("GET constants?%.60s at %s as %s", async (query, path, code) => {
    expect(refused(await call(`/constants?${query}`), "invalid").errors?.[0]).toMatchObject({ path, code });
  });

  it("an unknown id is not found, at its key", async () => {
    for (const id of ["no-such", "constructor", "1%20OR%201%3D1", "Water"])
      expect(refused(await call(`/constants?materialId=${id}&energiesKeV=20`), "notFound").errors?.[0]?.path).toBe(
        "/materialId",
      );
  });

  it("names bounds of the table in use", async () => {
    const answer = await post("/constants", { material: WATER, energiesKeV: [40], tabulation: "henke93" });
    expect(refused(answer, "invalid").errors?.[0]?.message).toMatch(/40 keV.*henke93.*0\.03 to 30 keV/);
  });

  it("takes the revision there is, and no other", async () => {
    const ask = (revision: unknown) =>
      post("/constants", { material: { materialId: "water", revision }, energiesKeV: [20] });
    good(await ask(1));
    expect(refused(await ask(2), "notFound").detail).toContain("2");
    for (const revision of [0, 1.5, "1"]) refused(await ask(revision), "invalid");
  });
});

describe("ids with characters of every kind", () => {
  it.each(["1%20OR%201%3D1", "x%3D%201", "a%20b", "caf%C3%A9", "x%26y", "x%40", "constructor", "__proto__", "x=1"])(
    "%s is a problem, not a page",
    async (id) => {
      refused(await call(`/materials/${id}`), "notFound");
      refused(await call(`/elements/${id}/factors`), "notFound");
    },
  );

  it("unknown addresses below the API are problems too", async () => {
    for (const path of [
      "",
      "/",
      "/nothing",
      "/constants/nothing",
      "/elements/Fe",
      "/elements/Fe/",
      "/materials/pmma/x",
    ])
      refused(await call(path), "notFound");
  });
});

describe("a batch", () => {
  it("judges every item by itself, malformed ones too", async () => {
    const answer = good<{ results: { status?: number; errors?: { path: string }[]; rows?: unknown[] }[] }>(
      await post("/constants/batch", {
        items: [
          { material: WATER, energiesKeV: [10] },
          { material: { formula: "H2O", densityGCm3: 0 }, energiesKeV: [10] },
          null,
          { material: WATER, energiesKeV: [10], unit: "keV" },
          { material: WATER, energiesKeV: { from: 10, to: 20, count: 4 } },
        ],
      }),
    );
    constantsBatchAnswerSchema.parse(answer);
    expect(answer.results.map((result) => result.rows?.length ?? result.errors?.[0]?.path)).toEqual([
      1,
      "/material/densityGCm3",
      "",
      "/unit",
      4,
    ]);
  });

  it("refuses a frame that is none", async () => {
    for (const body of [{}, { items: [] }, { items: {} }, { items: [], more: 1 }, []])
      expect(refused(await post("/constants/batch", body), "invalid").errors?.length).toBeGreaterThan(0);
  });

  it("lets others be answered while a large one is computed", async () => {
    const every = "HHeLiBeBCNOFNeNaMgAlSiPSClArKCaScTiVCrMnFeCoNiCuZnGaGeAsSeBrKrRbSrYZrNbMoTcRuRhPdAgCdInSnSbTeIXe";
    const item = { material: { formula: every, densityGCm3: 1 }, energiesKeV: { from: 1, to: 400, count: 100 } };
    let done = false;
    const large = post("/constants/batch", { items: Array(100).fill(item) }).finally(() => (done = true));
    let answered = 0;
    while (!done) {
      good(await call("/materials/pmma"));
      answered++;
    }
    const { results } = good<{ results: ConstantsAnswer[] }>(await large);
    expect(results).toHaveLength(100);
    expect(answered).toBeGreaterThan(2);
  });
});

describe("input made to cost time", () => {
  it.each([
    ["an unclosed text of escapes", `{"material":"${'\\"'.repeat(130_000)}`],
    ["brackets", "[".repeat(262_000)],
    ["numbers that are too large", `{"energiesKeV":[${"1e400,".repeat(43_000)}1]}`],
    ["zeros below a long key", `{"${"k".repeat(130_000)}":[${"0,".repeat(65_000)}0]}`],
    ["unknown keys", `{${Array.from({ length: 20_000 }, (_, index) => `"k${index}":1`).join(",")}}`],
  ])("256 KiB of %s are refused within two seconds, in an answer of bounded length", async (_, body) => {
    const start = performance.now();
    const answer = await postText("/constants", body);
    expect([400, 422]).toContain(answer.status);
    expect(answer.body.length).toBeLessThan(10_000);
    expect(performance.now() - start).toBeLessThan(2000);
  });

  it("pages read hostile fields as fast", async () => {
    const site = inject("baseUrl");
    for (const [field, text] of [
      ["list", "a".repeat(3900)],
      ["list", "m*".repeat(1500)],
      ["energy", "8 ".repeat(1900)],
      ["density", "9".repeat(3900)],
      ["material", "(".repeat(2500)],
      ["parts", "-".repeat(3900)],
      ["parts", "1;".repeat(1900)],
      ["with", " ;".repeat(1900)],
      ["thickness", "5 mm ".repeat(700)],
    ] as const) {
      const start = performance.now();
      const answer = await fetch(`${site}/constants?${new URLSearchParams({ [field]: text })}`);
      expect(answer.status, field).toBe(200);
      expect(performance.now() - start, field).toBeLessThan(2000);
    }
  });
});

describe("B3: random requests", () => {
  const seen = (answer: ApiAnswer, what: unknown): void => {
    expect([200, 400, 404, 422], `${answer.status} for ${JSON.stringify(what).slice(0, 300)}`).toContain(answer.status);
    if (answer.status !== 200) problemSchema.parse(JSON.parse(answer.body));
    expect(answer.body).not.toMatch(/NaN|Infinity|undefined/);
  };
  const text = fc.oneof(
    fc.string({ maxLength: 12 }),
    fc.constantFrom("H2O", "water", "20", "1", "0", "-1", "1e400", "epdl97", ""),
  );

  it("of GET constants, materials and elements are answered or refused", async () => {
    const queries = fc.dictionary(
      fc.oneof(
        fc.constantFrom(
          "formula",
          "densityGCm3",
          "materialId",
          "energiesKeV",
          "tabulation",
          "query",
          "limit",
          "cursor",
          "version",
        ),
        text,
      ),
      text,
      { maxKeys: 5 },
    );
    const paths = fc.oneof(
      fc.constantFrom("/constants", "/materials", "/elements/Fe/factors"),
      text.map((id) => `/materials/${encodeURIComponent(id)}`),
    );
    const schemas: Readonly<Record<string, { parse(value: unknown): unknown }>> = {
      "/constants": constantsAnswerSchema,
      "/materials": materialsListSchema,
      "/elements/Fe/factors": factorsAnswerSchema,
    };
    await fc.assert(
      fc.asyncProperty(paths, queries, async (path, query) => {
        const answer = await call(`${path}?${new URLSearchParams(query)}`);
        seen(answer, [path, query]);
        if (answer.status === 200) schemas[path]?.parse(JSON.parse(answer.body));
      }),
      { numRuns: 300, seed: 20261201 },
    );
  });

  it("of solutions and nested mixtures are answered or refused, and good answers are as promised", async () => {
    const number = fc.oneof(
      fc.double({ min: 0.01, max: 3, noNaN: true }),
      fc.constantFrom(0, -1, 1, 0.5, 1e-300, 5e-324, 50, 51, 1e308),
    );
    const leaf = fc.oneof(
      fc.record(
        { formula: fc.constantFrom("H2O", "KI", "CaCO3", "Au", "Xx"), densityGCm3: number },
        { requiredKeys: ["formula"] },
      ),
      fc.record({ materialId: fc.constantFrom("water", "pmma", "vacuum", "none") }),
    );
    const { material } = fc.letrec<{ material: unknown }>((tie) => ({
      material: fc.oneof(
        { maxDepth: 3, withCrossShrink: true },
        leaf,
        fc.record(
          {
            components: fc
              .array(
                fc.tuple(tie("material"), number).map(([part, fraction]) => ({ ...(part as object), fraction })),
                { minLength: 1, maxLength: 3 },
              )
              .map(normalised),
            basis: fc.constantFrom("mass", "volume", "mole"),
            densityGCm3: number,
            solidFraction: number,
          },
          { requiredKeys: ["components", "basis"] },
        ),
        fc.record(
          {
            solvent: tie("material"),
            solutes: fc.array(
              fc.tuple(tie("material"), number).map(([part, share]) => ({ ...(part as object), mgPerMl: 100 * share })),
              { minLength: 1, maxLength: 2 },
            ),
            densityGCm3: number,
          },
          { requiredKeys: ["solvent", "solutes"] },
        ),
      ),
    }));
    let answered = 0;
    await fc.assert(
      fc.asyncProperty(material, async (stated) => {
        const answer = await post("/constants", { material: stated, energiesKeV: [5, 20, 60] });
        seen(answer, stated);
        if (answer.status !== 200) return;
        answered++;
        const { material: found, rows } = constantsAnswerSchema.parse(JSON.parse(answer.body));
        const sum = Object.values(found.massFractions).reduce((total, share) => total + share, 0);
        if (found.densityGCm3 > 0) expect(sum).toBeGreaterThan(1 - 1e-9);
        expect(sum).toBeLessThan(1 + 1e-9);
        for (const row of rows) expect(row.muTotalPerCm).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 300, seed: 20261201 },
    );
    expect(answered).toBeGreaterThan(60);
  });
});

/** Shares made to sum to 1 where they can be, so that random mixtures are not all refused for their sum. */
function normalised(components: { fraction: number }[]): { fraction: number }[] {
  const sum = components.reduce((total, { fraction }) => total + fraction, 0);
  return sum > 0 && sum < 1e6
    ? components.map((component) => ({ ...component, fraction: component.fraction / sum }))
    : components;
}
