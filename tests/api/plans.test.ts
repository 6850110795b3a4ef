/** Plans over the API: the figures of a known pair, the shortlist, and everything that is refused. */
import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import type { EvaluateAnswer, RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import { call, good, post, postText, refused, WATER } from "#tests/support/api.ts";

afterAll(async () => {
  good(await call("/health"));
});

const PMMA = { formula: "C5H8O2", densityGCm3: 1.19 };
const INSTRUMENT = { sourceDistanceM: 30, sourceFwhmUm: 50, detectorFwhmUm: 2, pixelUm: 1, efficiency: 1 };
const SETUP = {
  ...INSTRUMENT,
  efficiency: null,
  energiesKeV: { from: 8, to: 40, count: 24 },
  distancesM: { from: 0.003, to: 3, count: 20 },
};
const FIBRE = { material: PMMA, shape: "fibre", sizeUm: 20, lengthUm: 100 };
const HOST = { material: WATER, thicknessMm: 5 };
const rankBody = (more: object = {}) => ({ feature: FIBRE, host: HOST, setup: SETUP, use: "direct", ...more });
const pointBody = (more: object = {}) => ({
  feature: FIBRE,
  host: HOST,
  setup: INSTRUMENT,
  use: "direct",
  minimumCounts: 0,
  energyKeV: 20,
  distanceM: 0.3,
  ...more,
});
const evaluate = async (more: object = {}) =>
  good<EvaluateAnswer>(await post("/plans/evaluate", pointBody(more))).candidate;
const rank = async (more: object = {}) => good<RankAnswer>(await post("/plans/rank", rankBody(more)));

describe("evaluate", () => {
  // Reference: the PMMA pair of tests/reference/plan-values.test.ts, in the API's units.
  it("gives the PMMA fibre in water its figures", async () => {
    const candidate = await evaluate();
    const values: [keyof typeof candidate, number][] = [
      ["transmission", 0.66703],
      ["deltaMuPerCm", -0.12963],
      ["deltaDelta", 8.992e-8],
      ["gamma", -1406],
      ["effectiveDistanceM", 0.29703],
      ["signalUm2", 0.9233],
      ["absorptionSignalUm2", 8.78e-5],
      ["fluencePerUm2", 40.6],
      ["entranceDoseGy", 0.007149],
      ["absorptionEntranceDoseGy", 75.18],
    ];
    for (const [key, value] of values) expect(candidate[key] as number, key).toAgreeWithin(value, 0.01);
    expect(candidate.blurFwhmUm / 2.3548).toAgreeWithin(0.8668, 0.01);
    expect(candidate).toMatchObject({
      technique: "phase",
      why: [],
      plateau: null,
      agreesInAllTables: null,
      timeS: null,
    });
  });

  it("computes what the use forbids, and says so", async () => {
    const retrieval = await evaluate({ use: "retrieval" });
    expect(retrieval.allowed).toBe(false);
    expect(retrieval.warnings.map(({ code }) => code)).toEqual(
      expect.arrayContaining(["nearFieldLeft", "opposedPair"]),
    );
    expect(retrieval.entranceDoseGy).toBeGreaterThan(0);
    const inside = await evaluate({ distanceM: 0.001 });
    expect(inside).toMatchObject({ allowed: false });
    expect(inside.warnings.map(({ code }) => code)).toContain("insideSample");
    const coarse = await evaluate({ setup: { ...INSTRUMENT, pixelUm: 10 } });
    expect(coarse).toMatchObject({ allowed: false });
    expect(coarse.warnings.map(({ code }) => code)).toContain("undersampled");
  });

  it("goes over to absorption as the distance goes to nothing", async () => {
    const contact = await evaluate({ distanceM: 0 });
    expect(contact.signalUm2!).toAgreeWithin(contact.absorptionSignalUm2!, 1e-9);
    expect(contact).toMatchObject({ fresnelResolution: null, fresnelFeature: null, magnification: 1 });
  });

  it("takes an example setup by its id", async () => {
    const candidate = await evaluate({ setup: { setupId: "fine-parallel" } });
    expect(candidate.timeS).toBeGreaterThan(0);
  });
});

describe("rank", () => {
  it("lists candidates, absorption's best, and the whole plane", async () => {
    const answer = await rank();
    expect(answer.candidates[0]).toMatchObject({ technique: "phase", allowed: true });
    expect(answer.candidates[0]!.why[0]).toBe("leastDose");
    expect(answer.absorptionBest).toMatchObject({ technique: "absorption", why: ["leastDose"] });
    expect(answer.verdict.choice).toBe("phase");
    expect(answer.plane.objective).toHaveLength(answer.plane.energiesKeV.length);
    expect(answer.plane.objective[0]).toHaveLength(20);
    expect(answer.citation).toMatch(/EPDL97/);
  });

  it("a dose limit turns the verdict, and absorption's best is not bound by it", async () => {
    const answer = await rank({ limits: { doseGy: 0.001 } });
    expect(answer.verdict).toMatchObject({ choice: "none", doseAdvantage: null });
    expect(answer.verdict.summary).toContain("1\u00a0mGy");
    expect(answer.candidates).toEqual([]);
    expect(answer.absorptionBest).toMatchObject({ allowed: false });
    expect(answer.plane.forbiddenBy.flat()).toContain("overDose");
  });

  it("adds two energies beside each edge of a range, and none to a list", async () => {
    const iodine = { formula: "KI", densityGCm3: 3.12 };
    const feature = { material: iodine, shape: "sphere", sizeUm: 20 };
    const ranged = await rank({ feature, setup: { ...SETUP, energiesKeV: { from: 20, to: 50, count: 10 } } });
    for (const energy of [33.1694 * 0.995, 33.1694 * 1.005])
      expect(ranged.plane.energiesKeV.filter((each) => Math.abs(each - energy) < 1e-3)).toHaveLength(1);
    const listed = await rank({ feature, setup: { ...SETUP, energiesKeV: [34, 20, 34, 33.2] } });
    expect(listed.plane.energiesKeV).toEqual([20, 33.2, 34]);
    expect(new Set(listed.plane.forbiddenBy[1])).toEqual(new Set(["nearEdge"]));
  });

  it("refuses several distances by naming the four uses", async () => {
    const problem = refused(await post("/plans/rank", rankBody({ use: "several" })), "invalid");
    expect(problem.errors?.[0]).toMatchObject({ path: "/use", code: "useNotOffered" });
    expect(problem.errors?.[0]?.message).toMatch(/absorption, direct, retrieval or tomography/);
  });
});

describe("what is refused", () => {
  const cases: [string, object, string, string][] = [
    ["a size of 0", { feature: { ...FIBRE, sizeUm: 0 } }, "/feature/sizeUm", "tooSmall"],
    ["a negative size", { feature: { ...FIBRE, sizeUm: -20 } }, "/feature/sizeUm", "tooSmall"],
    ["a size as text", { feature: { ...FIBRE, sizeUm: "20 um" } }, "/feature/sizeUm", "wrongType"],
    ["a feature larger than its host", { feature: { ...FIBRE, sizeUm: 5001 } }, "/feature/sizeUm", "featureTooLarge"],
    ["a layer without width", { feature: { ...FIBRE, shape: "layer" } }, "/feature/widthUm", "missing"],
    ["a fibre with width", { feature: { ...FIBRE, widthUm: 3 } }, "/feature/widthUm", "notForThisShape"],
    ["an unknown shape", { feature: { ...FIBRE, shape: "cube" } }, "/feature/shape", "notAChoice"],
    ["no host", { host: undefined }, "/host", "missing"],
    [
      "eleven layers",
      { layers: Array(11).fill({ material: WATER, thicknessMm: 1, position: "before" }) },
      "/layers",
      "tooLong",
    ],
    [
      "a layer of no thickness",
      { layers: [{ material: WATER, thicknessMm: 0, position: "before" }] },
      "/layers/0/thicknessMm",
      "tooSmall",
    ],
    [
      "a layer beside",
      { layers: [{ material: WATER, thicknessMm: 1, position: "beside" }] },
      "/layers/0/position",
      "notAChoice",
    ],
    [
      "a source inside the sample",
      { setup: { ...SETUP, sourceDistanceM: 0.002 } },
      "/setup/sourceDistanceM",
      "sourceInsideSample",
    ],
    [
      "a source inside a layer before it",
      {
        setup: { ...SETUP, sourceDistanceM: 0.011 },
        layers: [{ material: WATER, thicknessMm: 9, position: "before" }],
      },
      "/setup/sourceDistanceM",
      "sourceInsideSample",
    ],
    [
      "201 energies",
      { setup: { ...SETUP, energiesKeV: Array.from({ length: 201 }, (_, i) => 10 + i / 10) } },
      "/setup/energiesKeV",
      "tooLong",
    ],
    [
      "a count of 0",
      { setup: { ...SETUP, energiesKeV: { from: 8, to: 40, count: 0 } } },
      "/setup/energiesKeV/count",
      "tooSmall",
    ],
    [
      "a count of 1e9",
      { setup: { ...SETUP, distancesM: { from: 0.1, to: 4, count: 1e9 } } },
      "/setup/distancesM/count",
      "tooLarge",
    ],
    [
      "more than 20,000 points",
      {
        setup: { ...SETUP, energiesKeV: { from: 8, to: 40, count: 200 }, distancesM: { from: 0.1, to: 4, count: 101 } },
      },
      "/setup/distancesM",
      "planeTooLarge",
    ],
    [
      "a range downwards",
      { setup: { ...SETUP, energiesKeV: { from: 40, to: 8, count: 5 } } },
      "/setup/energiesKeV/from",
      "rangeReversed",
    ],
    [
      "even log steps from 0",
      { setup: { ...SETUP, distancesM: { from: 0, to: 1, count: 5, spacing: "log" } } },
      "/setup/distancesM/spacing",
      "logOfZero",
    ],
    [
      "energies outside the table",
      { setup: { ...SETUP, energiesKeV: [20, 500] } },
      "/setup/energiesKeV",
      "outsideTable",
    ],
    ["an efficiency of 2", { setup: { ...SETUP, efficiency: 2 } }, "/setup/efficiency", "tooLarge"],
    ["a bandwidth of 2", { setup: { ...SETUP, bandwidth: 2 } }, "/setup/bandwidth", "tooLarge"],
    [
      "a falling flux curve",
      {
        setup: {
          ...SETUP,
          fluxPerSMm2: [
            [20, 1e9],
            [10, 1e9],
          ],
        },
      },
      "/setup/fluxPerSMm2",
      "energiesNotRising",
    ],
    ["time without flux", { objective: "time" }, "/objective", "fluxMissing"],
    ["a near-field limit beyond π/2", { nearFieldLimit: 2 }, "/nearFieldLimit", "tooLarge"],
    ["a threshold of 0", { threshold: 0 }, "/threshold", "tooSmall"],
    ["a limit of 0 Gy", { limits: { doseGy: 0 } }, "/limits/doseGy", "tooSmall"],
    [
      "a transmission range downwards",
      { limits: { transmission: [0.9, 0.1] } },
      "/limits/transmission",
      "rangeReversed",
    ],
    ["half a projection", { projections: 0.5 }, "/projections", "wrongType"],
    ["an unknown key", { colour: 1 }, "/colour", "unknownKey"],
    [
      "a formula that is none",
      { feature: { ...FIBRE, material: { formula: "Xx", densityGCm3: 1 } } },
      "/feature/material/formula",
      "unknownElement",
    ],
    ["a wave check", { waveCheck: true }, "/waveCheck", "notAChoice"],
  ];
  it.each(cases)("%s", async (_, more, path, code) => {
    const problem = refused(await post("/plans/rank", rankBody(more)), "invalid");
    expect(problem.errors?.map((error) => [error.path, error.code])).toContainEqual([path, code]);
  });

  it("an unknown material or setup is not found", async () => {
    const feature = { ...FIBRE, material: { materialId: "no-such-material" } };
    expect(refused(await post("/plans/rank", rankBody({ feature })), "notFound").errors?.[0]?.path).toMatch(
      /^\/feature\/material/,
    );
    expect(
      refused(await post("/plans/rank", rankBody({ setup: { setupId: "none" } })), "notFound").errors?.[0],
    ).toMatchObject({
      path: "/setup/setupId",
      code: "setupNotFound",
    });
  });

  it("numbers that JSON cannot mean", async () => {
    for (const size of ["1e400", "9007199254740993"])
      refused(
        await postText("/plans/rank", JSON.stringify(rankBody()).replace('"sizeUm":20', `"sizeUm":${size}`)),
        "invalid",
      );
    expect((await postText("/plans/rank", "{")).status).toBe(400);
    expect((await call("/plans/rank")).status).toBe(405);
  });
});

describe("extremes", () => {
  it.each([
    ["a host that nothing passes", { host: { material: { formula: "Pb", densityGCm3: 11.35 }, thicknessMm: 10_000 } }],
    ["a pair of one material", { feature: { ...FIBRE, material: WATER } }],
    [
      "vacuum in vacuum",
      {
        feature: { ...FIBRE, material: { materialId: "vacuum" } },
        host: { material: { materialId: "vacuum" }, thicknessMm: 5 },
      },
    ],
    ["the finest feature", { feature: { ...FIBRE, sizeUm: 0.001 } }],
    [
      "a feature as large as its host",
      { feature: { material: PMMA, shape: "sphere", sizeUm: 10_000_00 }, host: { material: WATER, thicknessMm: 1000 } },
    ],
    ["no blur at all", { setup: { ...SETUP, sourceFwhmUm: 0, detectorFwhmUm: 0 } }],
    ["contact", { setup: { ...SETUP, distancesM: [0] } }],
    ["a very broad band", { setup: { ...SETUP, bandwidth: 0.6 } }],
    ["one energy, one distance", { setup: { ...SETUP, energiesKeV: [20], distancesM: [0.3] } }],
  ])("%s is answered without a number that is none", async (_, more) => {
    for (const use of ["absorption", "direct", "retrieval", "tomography"]) {
      const answer = await post("/plans/rank", rankBody({ ...more, use }));
      expect(answer.status, answer.body.slice(0, 300)).toBe(200);
      expect(answer.body).not.toMatch(/NaN|Infinity/);
    }
  });
});

describe("random requests", () => {
  it("are answered or refused, never with a fault of ours", async () => {
    const odd = fc.oneof(
      fc.constantFrom(
        0,
        -1,
        1e-30,
        1e30,
        0.5,
        3,
        "20",
        null,
        true,
        [],
        {},
        [20],
        { from: 1, to: 2, count: 3 },
        "direct",
      ),
      fc.double({ noNaN: true, noDefaultInfinity: true }),
      fc.string({ maxLength: 12 }),
    );
    const paths = [
      ["feature", "sizeUm"],
      ["feature", "shape"],
      ["feature", "material"],
      ["feature", "widthUm"],
      ["host", "thicknessMm"],
      ["host", "material"],
      ["layers"],
      ["setup", "sourceDistanceM"],
      ["setup", "detectorFwhmUm"],
      ["setup", "pixelUm"],
      ["setup", "efficiency"],
      ["setup", "bandwidth"],
      ["setup", "fluxPerSMm2"],
      ["setup", "energiesKeV"],
      ["setup", "distancesM"],
      ["use"],
      ["objective"],
      ["limits"],
      ["threshold"],
      ["minimumCounts"],
      ["projections"],
    ];
    const changes = fc.array(fc.tuple(fc.constantFrom(...paths), odd), { minLength: 1, maxLength: 3 });
    const statuses = new Map<number, number>();
    for (const changed of fc.sample(changes, { numRuns: 400, seed: 9 })) {
      const body = structuredClone(rankBody()) as Record<string, unknown>;
      for (const [[first, second], value] of changed) {
        if (second === undefined) body[first!] = value;
        else (body[first!] as Record<string, unknown>)[second] = value;
      }
      const { status, body: text } = await post("/plans/rank", body);
      statuses.set(status, (statuses.get(status) ?? 0) + 1);
      expect([200, 400, 404, 422], text.slice(0, 300)).toContain(status);
      expect(text).not.toMatch(/NaN|Infinity/);
    }
    expect(statuses.get(200)!).toBeGreaterThan(10);
    expect(statuses.get(422)!).toBeGreaterThan(100);
  });
});
