/** Questions of the plan page as people write them: what is read, and what each fault says. */
import { describe, expect, it } from "vitest";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import {
  ADDRESS_CHARACTERS,
  DEFAULT_PLAN,
  type PlanField,
  type PlanQuestion,
  readLayerLines,
  readPlanQuestion,
  writeLayerLines,
  writePlanQuestion,
} from "#src/lib/plans/question.ts";
import { readDistances } from "#src/lib/plans/read-distances.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";
import type { StatedSetup } from "#src/lib/schemas/plan.ts";
import { allMaterials } from "#src/lib/services/materials.ts";

const finder = materialFinder(allMaterials());
const read = (fields: Partial<PlanQuestion>) => readPlan({ ...DEFAULT_PLAN, ...fields }, finder);
const own = (fields: Partial<PlanQuestion>): StatedSetup => {
  const { request, faults } = read({ setup: "own", ...fields });
  expect(faults).toEqual([]);
  return request!.setup as StatedSetup;
};

describe("the address", () => {
  it("holds what differs from the defaults, and gives the question back", () => {
    const question: PlanQuestion = {
      ...DEFAULT_PLAN,
      feature: "Ca5(PO4)3OH",
      featureDensity: "3.16 g/cm3",
      layers: "before; 1 mm; polypropylene\nafter; 0.1 mm; Al; 2.7",
      dose: "10 Gy",
      use: "tomography",
    };
    const query = writePlanQuestion(question);
    expect(readPlanQuestion(new URLSearchParams(query.toString()))).toEqual(question);
    expect(query.has("size")).toBe(false);
    expect(readPlanQuestion(new URLSearchParams("use=dancing&shape=cube&table=x&nonsense=1"))).toEqual(DEFAULT_PLAN);
  });

  it("can be too long for a link, which the page says", () => {
    const flux = Array.from({ length: 300 }, (_, row) => `${10 + row / 10}; 1e9`).join("\n");
    expect(
      writePlanQuestion({ ...DEFAULT_PLAN, flux, featureParts: flux, hostParts: flux }).toString().length,
    ).toBeGreaterThan(ADDRESS_CHARACTERS);
    expect(writePlanQuestion(DEFAULT_PLAN).toString().length).toBeLessThan(100);
  });

  it("keeps layers as lines", () => {
    const lines = readLayerLines("before; 1 mm; polypropylene\nAFTER; 2 mm; Al; 2.7\n\n");
    expect(lines.map(({ position }) => position)).toEqual(["before", "after"]);
    expect(readLayerLines(writeLayerLines(lines))).toEqual(lines);
  });
});

describe("what is read", () => {
  it("an example setup stays its id until energies or distances are narrowed", () => {
    expect(read({}).request!.setup).toEqual({ setupId: "fine-parallel" });
    const narrowed = read({ energies: "12 to 30 keV", distances: "0.1, 0.3 m" }).request!.setup as StatedSetup;
    expect(narrowed.energiesKeV).toMatchObject({ from: 12, to: 30 });
    expect(narrowed.distancesM).toEqual([0.1, 0.3]);
    expect(narrowed.pixelUm).toBe(1);
  });

  it("a setup of one's own in any unit", () => {
    expect(
      own({
        source: "145 m",
        sourceSize: "0.05 mm",
        blur: "2 um",
        pixel: "650 nm",
        screen: "40 %",
        bandwidth: "2 %",
        flux: "1e9",
      }),
    ).toMatchObject({
      sourceDistanceM: 145,
      sourceFwhmUm: 50,
      detectorFwhmUm: 2,
      pixelUm: 0.65,
      efficiency: 0.4,
      bandwidth: 0.02,
      fluxPerSMm2: 1e9,
    });
    expect(own({ source: "parallel", screen: "Gd2O2S; 20 um; 7.3 g/cm3" })).toMatchObject({
      sourceDistanceM: null,
      efficiency: { scintillator: { formula: "Gd2O2S", densityGCm3: 7.3 }, thicknessUm: 20 },
    });
    expect(own({ flux: "10; 1e9\n20 keV; 2e9 /s/mm2\n30; 0" }).fluxPerSMm2).toEqual([
      [10, 1e9],
      [20, 2e9],
      [30, 0],
    ]);
  });

  it("distances as lists and ranges", () => {
    expect(readDistances("3 mm to 3 m", 0.01)).toEqual({ from: 0.003, to: 3, count: 64, spacing: "log" });
    expect(readDistances("up to 3 m", 0.0025)).toEqual({ from: 0.0025, to: 3, count: 64, spacing: "log" });
    expect(readDistances("0 to 1 m in 10 steps", 0)).toEqual({ from: 0, to: 1, count: 11, spacing: "linear" });
    expect(readDistances("0.1 to 0.5 m step 0.1", 0)).toMatchObject({ count: 5, spacing: "linear" });
    expect(readDistances("5, 10, 50 mm", 0)).toEqual([0.005, 0.01, 0.05]);
    expect(readDistances("0.3 m", 0)).toEqual([0.3]);
  });

  it("proposes dose where the host holds hydrogen, else time with a flux, else fluence", () => {
    expect(read({}).request!.objective).toBe("dose");
    const metal = { host: "Al", hostDensity: "2.7", feature: "air-dry" };
    expect(read({ ...metal }).request!.objective).toBe("time");
    expect(read({ ...metal, setup: "microfocus-cabinet" }).request!.objective).toBe("fluence");
    expect(read({ ...metal, objective: "dose" })).toMatchObject({
      request: { objective: "dose" },
      objectiveProposed: false,
    });
  });

  it("limits with units", () => {
    expect(read({ dose: "5 mGy", time: "2 min", pass: "10 to 90 %" }).request!.limits).toEqual({
      doseGy: 0.005,
      timeS: 120,
      transmission: [0.1, 0.9],
    });
  });
});

describe("faults", () => {
  const cases: [string, Partial<PlanQuestion>, PlanField, RegExp][] = [
    ["a decimal comma", { size: "2,5 um" }, "size", /Write 2\.5/],
    ["a size of nothing", { size: "0 um" }, "size", /above 0/],
    ["a unit of something else", { thickness: "5 keV" }, "thickness", /unit of energy/],
    ["a layer of unknown width", { shape: "layer" }, "width", /width across the beam/],
    ["an unknown material", { feature: "unobtainium" }, "feature", /No material is called/],
    ["a formula without density", { host: "SiO2" }, "hostDensity", /density of SiO2 is needed/],
    ["a wrong formula", { feature: "Xx2O" }, "feature", /Unknown element/],
    ["a layer without thickness", { layers: "before; ; water" }, "layers", /Layer 1/],
    ["eleven layers", { layers: "before; 1 mm; water\n".repeat(11) }, "layers", /at most 10/],
    ["an unknown setup", { setup: "atlantis" }, "setup", /no setup called/],
    ["energies downwards", { energies: "40 to 8 keV" }, "energies", /runs downwards/],
    ["too many energies", { energies: "8 to 40 keV in 500 steps" }, "energies", /at most 200/],
    ["distances downwards", { distances: "3 m to 3 mm" }, "distances", /runs downwards/],
    ["a distance of another planet", { distances: "20000 m" }, "distances", /0 to 10 000 m/],
    ["a screen of nothing", { setup: "own", screen: "0 %" }, "screen", /counts nothing/],
    ["a screen without thickness", { setup: "own", screen: "Gd2O2S" }, "screen", /thickness/],
    ["a bandwidth of 90 %", { setup: "own", bandwidth: "90 %" }, "bandwidth", /0 to 60/],
    ["a flux of nothing", { setup: "own", flux: "0" }, "flux", /above 0/],
    ["a dose in seconds", { dose: "10 s" }, "dose", /unit of time/],
    ["a limit of nothing", { time: "0 s" }, "time", /above 0/],
    ["a transmission that is one number", { pass: "50 %" }, "pass", /as a range/],
    ["a threshold in words", { threshold: "five" }, "threshold", /from 0\.1 to 1000/],
    ["a threshold with a comma", { threshold: "2,5" }, "threshold", /Write 2\.5/],
    ["half a projection too few", { projections: "0" }, "projections", /from 1/],
  ];
  it.each(cases)("%s", (_, fields, field, message) => {
    const { request, faults } = read(fields);
    expect(request).toBeNull();
    expect(faults.map((fault) => fault.field)).toContain(field);
    expect(faults.find((fault) => fault.field === field)!.message).toMatch(message);
  });

  it("tells every field at fault at once", () => {
    expect(read({ size: "x", thickness: "y", dose: "z" }).faults.map(({ field }) => field)).toEqual([
      "size",
      "thickness",
      "dose",
    ]);
  });
});
