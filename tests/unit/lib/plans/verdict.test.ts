/** Verdicts and warnings in words: each said where its numbers say so, and not elsewhere. */
import { describe, expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { viewJob } from "#src/lib/plans/jobs.ts";
import { DEFAULT_PLAN, type PlanQuestion } from "#src/lib/plans/question.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";
import type { PlanResult } from "#src/lib/plans/view.ts";
import { allMaterials } from "#src/lib/services/materials.ts";

const tables = committedTables();
const finder = materialFinder(allMaterials());
const small = { energies: "10 to 30 keV in 20 steps", distances: "3 mm to 3 m in 20 steps" };

function answer(fields: Partial<PlanQuestion>): PlanResult {
  const { request, faults, objectiveProposed } = readPlan({ ...DEFAULT_PLAN, ...small, ...fields }, finder);
  expect(faults).toEqual([]);
  const { result } = viewJob(request!, objectiveProposed, tables, finder.lookup, new Date(0)).view;
  return result!;
}
const warned = (result: PlanResult): string[] => result.picks[0]!.candidate.warnings.map(({ code }) => code);
const plain = (text: string): string => text.replace(/[\u00a0\u202f]/g, " ");

describe("verdicts", () => {
  it("phase: where, what it needs, and what absorption would need", () => {
    const result = answer({});
    const [first] = result.picks;
    const alone = result.picks.find(({ id }) => id === result.absorptionId)!;
    expect(result.choice).toBe("phase");
    const text = plain(result.sentences.whole);
    expect(text).toMatch(
      /^Use phase contrast at [\d.]+ keV, [\d.]+ (m|mm)\. It needs [\d.]+ mGy in [\d.]+ m?s\. Absorption at its best/,
    );
    expect(text).toContain(`${Number((alone.doseGy! / first!.doseGy!).toPrecision(3))} × the dose of phase`);
  });

  it("absorption, where the filter of an opposed pair only blurs", () => {
    const result = answer({
      feature: "CI4",
      featureDensity: "1.2",
      host: "ptfe",
      use: "retrieval",
      counts: "0",
      distances: "25 mm",
    });
    expect(result.choice).toBe("absorption");
    expect(plain(result.sentences.headline)).toMatch(/^Use absorption at [\d.]+ keV, .*\.$/);
    expect(plain(result.sentences.whole)).toMatch(/Phase at its best/);
  });

  it("either, where a floor of counts decides for both", () => {
    const result = answer({ feature: "gold", size: "60 um", use: "retrieval" });
    expect(result.choice).toBe("either");
    expect(plain(result.sentences.headline)).toBe("Either works: phase and absorption need the same dose.");
  });

  it("none: the nearest miss and single changes, which then are enough", () => {
    const result = answer({ dose: "1 mGy" });
    expect(result.choice).toBe("none");
    expect(plain(result.sentences.headline)).toBe("No choice stays within 1 mGy.");
    expect(plain(result.miss!.words)).toMatch(/^The nearest miss, [\d.]+ keV and .* needs [\d.]+ mGy/);
    const allowed = /^Allow ([\d.]+) mGy\.$/.exec(plain(result.miss!.changes[0]!))![1]!;
    expect(answer({ dose: `${allowed} mGy` }).choice).toBe("phase");
    const pixels = answer({ size: "2 um" });
    expect(pixels.choice).toBe("none");
    const finer = /^Take detector pixels of ([\d.]+) (µm|nm) or less\.$/.exec(plain(pixels.miss!.changes[0]!))!;
    expect(
      answer({ size: "2 um", setup: "own", source: "30 m", pixel: `${finer[1]} ${finer[2]}` }).picks.length,
    ).toBeGreaterThan(0);
  });

  it("absorption alone has no rival", () => {
    const result = answer({ use: "absorption" });
    expect(result).toMatchObject({ choice: "absorption", absorptionId: null, doseAdvantage: null });
    expect(result.plane.equal).toBeNull();
  });

  it("by fluence in metal, with both techniques told where they disagree on dose", () => {
    const result = answer({ host: "aluminium", feature: "air-dry", objective: "fluence" });
    expect(result.objective).toBe("fluence");
    expect(plain(result.sentences.whole)).toMatch(/Use phase contrast/);
  });
});

describe("pairs that explain themselves", () => {
  it("an opposed pair names the host's δ/β to use, in retrieval and tomography only", () => {
    const text = answer({ use: "retrieval" }).picks[0]!.candidate.warnings.find(
      ({ code }) => code === "opposedPair",
    )!.message;
    expect(text).toMatch(/Opposed pair.*use δ\/β of water/);
    expect(warned(answer({ use: "tomography" }))).toContain("opposedPair");
    expect(warned(answer({}))).not.toContain("opposedPair");
    expect(warned(answer({ use: "retrieval", feature: "hydroxyapatite" }))).not.toContain("opposedPair");
  });

  it("a nearly matched pair asks for the densities, and its dose is unsure", () => {
    const matched = answer({ feature: "C5H8O2", featureDensity: "1.04" });
    expect(warned(matched)).toContain("nearlyMatched");
    expect(matched.picks[0]!.candidate.densitySensitivity!).toBeGreaterThan(0.3);
    expect(warned(answer({}))).not.toContain("nearlyMatched");
  });

  it("other warnings are raised where they should be", () => {
    expect(warned(answer({ thickness: "40 mm", energies: "10 keV" }))).toContain("transmissionLow");
    expect(warned(answer({ thickness: "0.1 mm", energies: "40 keV" }))).toContain("transmissionHigh");
    expect(
      warned(answer({ setup: "own", source: "1 m", sourceSize: "100 um", distances: "0.5 m", energies: "60 keV" })),
    ).toContain("sourceBlur");
    expect(warned(answer({ counts: "100000" }))).toContain("countFloor");
    expect(warned(answer({ use: "tomography" }))).toContain("fewCountsPerProjection");
    expect(warned(answer({ feature: "gold", size: "10 um", shape: "sphere" }))).toEqual(
      expect.arrayContaining(["linearTheoryLeft"]),
    );
    expect(warned(answer({ thickness: "200 mm", energies: "60 keV", distances: "0.11 m" }))).toContain("thickSample");
  });
});

describe("checks", () => {
  it("tell what holds with its figures, and count what does not first", () => {
    const { checks } = answer({ counts: "0" }).picks[0]!;
    expect(checks.every(({ state }) => state === "holds")).toBe(true);
    expect(checks.map(({ about }) => about)).toEqual(
      expect.arrayContaining([
        "undersampled",
        "contrastReversal",
        "linearTheoryLeft",
        "refractionShift",
        "tables",
        "density",
      ]),
    );
    for (const { text } of checks) expect(text).toMatch(/^[A-Z0-9].*\.$/);
    const states = answer({ use: "retrieval" }).picks[0]!.checks.map(({ state }) => state);
    expect(states.lastIndexOf("check")).toBeLessThan(states.indexOf("holds"));
  });
});
