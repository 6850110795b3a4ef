/** TRUST 6 for the look-up endpoints: formulas, densities, energies, mixtures, JSON. Each gets the stated answer; nothing dies. */
import { afterAll, describe, expect, it } from "vitest";
import fc from "fast-check";
import { call, good, post, postText, refused, WATER } from "#tests/support/api.ts";

afterAll(async () => {
  good(await call("/health"));
});

const constants = (material: unknown, energiesKeV: unknown = [20]) => post("/constants", { material, energiesKeV });

describe("formulas", () => {
  const cases: [string, string, string, RegExp][] = [
    ["F2", "C".repeat(257), "tooLong", /256/],
    ["F3", "Xx2O", "unknownElement", /'Xx' at 1/],
    ["F4", "h2o", "letterCase", /H2O/],
    ["F5", "H0O", "countZero", /at 2/],
    ["F6", "H-2O", "unexpectedCharacter", /'-' at 2/],
    ["F7", "C1e308", "countMalformed", /exponent/],
    ["F8", "C99999999999", "countTooLarge", /1000000/],
    ["F9", "(".repeat(1000), "tooDeep", /8 deep/],
    ["F10", "Fe(OH", "unclosedBracket", /opened at 3/],
    ["F11", "СO2", "foreignLetter", /Cyrillic/],
    ["F13", "H2\u200bO", "invisibleCharacter", /U\+200B/],
    ["F14", "constructor", "letterCase", /capital/],
    ["F14", "__proto__", "unexpectedCharacter", /at 1/],
    ["F15", "H2O'); DROP TABLE plan;--", "unexpectedCharacter", /at 4/],
    ["F16", "<svg onload=1>", "unexpectedCharacter", /at 1/],
    ["F17", "=H2O", "unexpectedCharacter", /at 1/],
    ["F18", "CuSO4·0H2O", "countZero", /at 7/],
    ["F18", "CuSO4.5H2O", "ambiguousHydrate", /CuSO4·5H2O.*CuSO4\.5\(H2O\)/],
    ["F19", `${"C".repeat(26)}!`, "unexpectedCharacter", /'!' at 27/],
  ];
  it.each(cases)("%s %s is refused as %s", async (_, formula, code, message) => {
    const problem = refused(await constants({ formula, densityGCm3: 1 }), "invalid");
    expect(problem.errors?.[0]).toMatchObject({ path: "/material/formula", code });
    expect(problem.errors?.[0]?.message).toMatch(message);
    expect(problem.errors?.[0]?.message.length).toBeLessThan(300);
  });

  it("F1 nothing is refused", async () => {
    expect(refused(await constants({ formula: "", densityGCm3: 1 }), "invalid").errors?.[0]?.path).toBe(
      "/material/formula",
    );
  });

  it("F12 a control character is malformed, in the body and in the query", async () => {
    refused(
      await postText("/constants", '{"material":{"formula":"H2\\u0000O","densityGCm3":1},"energiesKeV":[20]}'),
      "malformed",
    );
    expect((await call("/constants?formula=H2%01O&densityGCm3=1&energiesKeV=20")).status).toBe(400);
  });
});

describe("densities", () => {
  it.each([
    ["N1", 0],
    ["N2", -2.7],
    ["N3", "NaN"],
    ["N9", 500],
    ["N11", [2.7]],
    ["J8", "2.7"],
    ["null", null],
  ])("%s %j is refused at its place", async (_, densityGCm3) => {
    expect(refused(await constants({ formula: "SiO2", densityGCm3 }), "invalid").errors?.[0]?.path).toBe(
      "/material/densityGCm3",
    );
  });

  it.each([
    ["N4", "1e400", "notFinite"],
    ["N5", "1e-400", "underflow"],
    ["J10", "9007199254740993", "unsafeInteger"],
  ])("%s %s is refused as %s", async (_, number, code) => {
    const problem = refused(
      await postText("/constants", `{"material":{"formula":"SiO2","densityGCm3":${number}},"energiesKeV":[20]}`),
      "invalid",
    );
    expect(problem.errors?.[0]).toMatchObject({ path: "/material/densityGCm3", code });
  });

  it.each([
    ["N6", "2.7 kg", "notANumber"],
    ["N7", "2,7", "decimalComma"],
    ["N8", "2.7;import({})", "notANumber"],
    ["N3", "NaN", "notANumber"],
    ["N4", "1e400", "notFinite"],
    ["E10", "٣", "notANumber"],
  ])("%s %s in the query is refused as %s", async (_, text, code) => {
    const problem = refused(
      await call(`/constants?formula=SiO2&densityGCm3=${encodeURIComponent(text)}&energiesKeV=20`),
      "invalid",
    );
    expect(problem.errors?.[0]).toMatchObject({ path: "/densityGCm3", code });
  });

  it("N10 100 kB of digits are refused", async () => {
    const answer = await postText(
      "/constants",
      `{"material":{"formula":"SiO2","densityGCm3":${"9".repeat(100_000)}},"energiesKeV":[20]}`,
    );
    expect([413, 422]).toContain(answer.status);
  });
});

describe("energies", () => {
  it.each([
    ["E1", [0]],
    ["E2", [-8]],
    ["E4", { from: 60, to: 5, count: 10 }],
    ["E5", { from: 5, to: 60, count: 0 }],
    ["E6", { from: 5, to: 60, count: 1e9 }],
    ["E8", ["8 keV/0"]],
    ["none", []],
    ["text", "20"],
    ["2,001 energies", Array(2001).fill(20)],
  ])("%s is refused", async (_, energiesKeV) => {
    expect(refused(await constants(WATER, energiesKeV), "invalid").errors?.[0]?.path).toMatch(/^\/energiesKeV/);
  });

  it.each([
    ["epdl97", 0.05],
    ["epdl97", 451],
    ["henke93", 30.5],
    ["chantler95", 434],
  ])("E3 outside %s at %d keV is refused with the bounds, never extrapolated", async (tabulation, energyKeV) => {
    const problem = refused(
      await post("/constants", { material: WATER, energiesKeV: [20, energyKeV], tabulation }),
      "invalid",
    );
    expect(problem.errors).toEqual([
      expect.objectContaining({
        path: "/energiesKeV/1",
        code: "outsideTable",
        message: expect.stringMatching(/covers [\d.]+ to [\d.]+ keV/),
      }),
    ]);
  });

  it("2,000 of them are answered", async () => {
    expect(good<{ rows: unknown[] }>(await constants(WATER, Array(2000).fill(20))).rows).toHaveLength(2000);
  });
});

describe("mixtures", () => {
  const part = (formula: string, fraction: number) => ({ formula, densityGCm3: 1, fraction });
  const mixture = (components: unknown[], more: object = {}) => constants({ components, basis: "mass", ...more });

  it("X1 a sum of 0.98 is refused and stated", async () => {
    expect(refused(await mixture([part("C", 0.5), part("O", 0.48)]), "invalid").detail).toContain("0.98");
  });
  it("X2 a negative part is refused", async () => {
    expect(refused(await mixture([part("C", 1.2), part("O", -0.2)]), "invalid").errors?.length).toBeGreaterThan(0);
  });
  it("X3 all zero is refused", async () => {
    expect(refused(await mixture([part("C", 0), part("O", 0)]), "invalid").errors?.[0]?.code).toBe("fractionsAllZero");
  });
  it("X4 33 parts are refused with the limit", async () => {
    expect(
      refused(await mixture(Array.from({ length: 33 }, (_, i) => part(`C${i + 1}`, 1 / 33))), "invalid").errors?.[0]
        ?.message,
    ).toContain("32");
  });
  it("X5 the same part twice is refused at its second place", async () => {
    expect(refused(await mixture([part("C", 0.5), part("C", 0.5)]), "invalid").errors?.[0]).toMatchObject({
      path: "/material/components/1",
      code: "partRepeated",
    });
  });
  it("X6 an unknown basis, or two, are refused", async () => {
    expect(refused(await constants({ components: [part("C", 1)], basis: "atomic" }), "invalid").errors?.[0]?.path).toBe(
      "/material/basis",
    );
    expect(
      refused(await constants({ components: [{ ...part("C", 1), atomicFraction: 1 }], basis: "mass" }), "invalid")
        .errors?.[0],
    ).toMatchObject({ code: "unknownKey" });
  });
  it("X8 an id that is none is not found", async () => {
    refused(await mixture([{ materialId: "somebodys", fraction: 1 }]), "notFound");
  });
  it("X10 six levels are refused", async () => {
    let inner: object = { formula: "C", densityGCm3: 1 };
    for (let depth = 0; depth < 6; depth++) inner = { components: [{ ...inner, fraction: 1 }], basis: "mass" };
    expect(refused(await constants(inner), "invalid").errors?.[0]?.code).toBe("nestedTooDeep");
  });
  it("a part without the density or molar mass its basis needs is named", async () => {
    expect(
      refused(
        await constants({ components: [{ formula: "C", fraction: 0.5 }, part("O", 0.5)], basis: "volume" }),
        "invalid",
      ).errors?.[0],
    ).toMatchObject({ path: "/material/components/0", code: "densityMissing" });
    // Tissues are known by mass only: they have no molar mass.
    const { items } = good<{ items: { id: string; formula: string | null; massFractions: object | null }[] }>(
      await call("/materials?query=tissue&limit=20"),
    );
    const tissue = items.find((item) => item.formula === null && item.massFractions !== null)!;
    const byMole = refused(
      await constants({ components: [{ materialId: tissue.id, fraction: 1 }], basis: "mole" }),
      "invalid",
    );
    expect(byMole.errors?.[0]).toMatchObject({ path: "/material/components/0", code: "molarMassMissing" });
  });
  it("a solution without room for its solvent is refused", async () => {
    expect(
      refused(
        await constants({
          solvent: { materialId: "water" },
          solutes: [{ formula: "KI", densityGCm3: 3.12, mgPerMl: 4000 }],
        }),
        "invalid",
      ).errors?.[0]?.code,
    ).toBe("concentrationTooHigh");
  });
});

describe("JSON", () => {
  const good = JSON.stringify({ material: WATER, energiesKeV: [20] });
  it.each([
    ["J1", "not json", "malformed"],
    ["J1", "{", "malformed"],
    ["J1", "", "malformed"],
    ["J1", '{"a":01}', "malformed"],
    ["J2", "[]", "invalid"],
    ["J2", "3", "invalid"],
    ["J3", "[".repeat(200_000), "malformed"],
    ["J5", good.replace('"energiesKeV":[20]', '"energiesKeV":[20],"energiesKeV":[30]'), "repeatedKey"],
    ["J5", good.replace('"energiesKeV"', '"energies\\u004beV":[1],"energiesKeV"'), "repeatedKey"],
    ["J6", good.replace("{", '{"__proto__":{"admin":true},'), "forbiddenKey"],
    ["J6", good.replace("{", '{"constructor":{"prototype":{}},'), "forbiddenKey"],
    ["J7", good.replace("{", '{"teamId":"x",'), "invalid"],
    ["J9", good.replace("[20]", "[1e400]"), "invalid"],
    ["J11", good.replace("H2O", "H2O\\ud800"), "invalid"],
  ] as const)("%s is answered with the stated problem", async (_, body, code) => {
    refused(await postText("/constants", body), code);
  });

  it("J12 another content type is refused", async () => {
    refused(await postText("/constants", good, { "content-type": "text/plain" }), "unsupportedMediaType");
    refused(
      await postText("/constants", good, { "content-type": "application/json; charset=utf-16" }),
      "unsupportedMediaType",
    );
  });

  it("B3 random requests are answered or refused, never with a fault of ours", async () => {
    const leaf = fc.oneof(
      fc.string(),
      fc.double({ noNaN: true, noDefaultInfinity: true }),
      fc.integer(),
      fc.boolean(),
      fc.constant(null),
      fc.constantFrom("H2O", "water", "mass", "C5H8O2", 20, 1),
    );
    const material = fc.oneof(
      fc.record(
        { formula: fc.oneof(fc.constantFrom("H2O", "SiO2", "Fe(OH)3", "h2o"), fc.string()), densityGCm3: leaf },
        { requiredKeys: [] },
      ),
      fc.record({ materialId: leaf, revision: leaf }, { requiredKeys: ["materialId"] }),
      fc.record(
        {
          components: fc.array(fc.record({ formula: fc.constantFrom("C", "O", "x"), fraction: leaf }), {
            maxLength: 4,
          }),
          basis: leaf,
          densityGCm3: leaf,
        },
        { requiredKeys: [] },
      ),
      leaf,
    );
    const energies = fc.oneof(
      fc.array(leaf, { maxLength: 5 }),
      fc.record({ from: leaf, to: leaf, count: leaf }, { requiredKeys: [] }),
      leaf,
    );
    const statuses = new Map<number, number>();
    await fc.assert(
      fc.asyncProperty(
        fc.record({ material, energiesKeV: energies, tabulation: leaf }, { requiredKeys: [] }),
        async (body) => {
          const answer = await post("/constants", body);
          statuses.set(answer.status, (statuses.get(answer.status) ?? 0) + 1);
          expect(
            [200, 400, 404, 422],
            `${answer.status} for ${JSON.stringify(body).slice(0, 300)}: ${answer.body.slice(0, 200)}`,
          ).toContain(answer.status);
          expect(answer.body).not.toMatch(/NaN|Infinity/);
        },
      ),
      { numRuns: 400, seed: 20261201 },
    );
    expect(statuses.get(422)).toBeGreaterThan(50);
  });
});

describe("queries", () => {
  it.each([
    ["formula=H2O&energiesKeV=20", "/densityGCm3"],
    ["densityGCm3=1&energiesKeV=20", ""],
    ["materialId=water&formula=H2O&densityGCm3=1&energiesKeV=20", ""],
    ["materialId=water", "/energiesKeV"],
    ["materialId=water&energiesKeV=", "/energiesKeV"],
    ["materialId=water&energiesKeV=20,,30", "/energiesKeV"],
    ["materialId=water&energiesKeV=20&units=eV", "/units"],
  ])("%s is refused", async (query, path) => {
    expect(refused(await call(`/constants?${query}`), "invalid").errors?.[0]?.path).toBe(path);
  });
});
