/**
 * Check values of plans: an independent program's, made with the published equations that each function names (two digits more
 * than the tolerances need), and picks that practice accepts. Tolerances: 1 % (values, gains), 5 % (cone beam), energies of
 * picks 15 %, their distances a factor of 1.5: they were found with steps of 0.5 to 2 keV and 8 % in distance.
 */
import { describe, expect, it } from "vitest";
import {
  evaluatePoint,
  type PlanTask,
  type PointFigures,
  rankPlan,
  type RankedPlan,
  retrievalGains,
  type Use,
} from "#src/lib/physics/index.ts";
import {
  ADIPOSE,
  air,
  byMass,
  compound,
  fibre,
  grid,
  hydroxyapatite,
  IDEAL,
  pmma,
  setup,
  SOFT_TISSUE,
  sphere,
  tables,
  task,
  um,
  water,
} from "./plan-cases.ts";

const per = (value: number | null, unit: number): number => (value ?? Number.NaN) / unit;
const UM2 = 1e-12;
const ideal = setup(30, 50, 2, 1, IDEAL);
const at = (plan: PlanTask, energyKeV: number, distanceM: number): PointFigures =>
  evaluatePoint(plan, energyKeV * 1000, distanceM, tables)!.figures;

describe("pairs", () => {
  it.each([
    {
      name: "PMMA fibre in water, 20 keV",
      figures: at(task(pmma, fibre(20, 100), water, 5, ideal), 20, 0.3),
      values: [0.66703, -0.12963, 8.992e-8, -1406, 0.29703, 0.8668, 0.9233, 8.78e-5, 40.6, 0.007149, 75.18],
    },
    {
      name: "hydroxyapatite sphere in water, 25 keV",
      figures: at(task(hydroxyapatite, sphere(10), water, 5, ideal), 25, 0.2),
      values: [0.77557, 10.496, 6.796e-7, 164.1, 0.19868, 0.8553, 2.95, 3.718e-3, 10.93, 0.00119, 0.9437],
    },
  ])("$name: transmission, contrast, geometry, signals, fluence, dose within 1 %", ({ figures, values }) => {
    const { beam, geometry } = figures;
    const computed = [
      beam.transmission,
      beam.deltaMuPerM / 100,
      beam.deltaDelta,
      beam.gamma!,
      geometry.effectiveDistanceM,
      per(geometry.sigmaM, 1e-6),
      per(figures.signalM2, UM2),
      per(figures.absorptionSignalM2, UM2),
      per(figures.fluencePerM2, 1e12),
      figures.entranceDoseGy!,
      figures.absorptionEntranceDoseGy!,
    ];
    for (const [index, value] of values.entries()) expect(computed[index]!).toAgreeWithin(value, 0.01);
  });

  it("gives the feature's dose over the host's: hydroxyapatite in water at 25 keV 11.4", () => {
    const figures = at(task(hydroxyapatite, sphere(10), water, 5, ideal), 25, 0.2);
    expect(figures.featureDoseGy! / figures.entranceDoseGy!).toAgreeWithin(11.4, 0.01);
  });

  it.each([
    [0.02, 1.0003],
    [0.2, 1.028],
    [0.4, 1.125],
  ])("a bandwidth of %d changes the signal by %d", (bandwidth, ratio) => {
    const plan = task(pmma, fibre(20, 100), water, 5, { ...ideal, bandwidth });
    const one = at(task(pmma, fibre(20, 100), water, 5, ideal), 20, 0.3).signalM2!;
    expect(at(plan, 20, 0.3).signalM2! / one).toAgreeWithin(ratio, 0.01);
  });
});

describe("retrieval and tomography", () => {
  // Square band; γ, N_F: G₂D, G_CT.
  it.each([
    [800, 10, 9.0, 31.5],
    [800, 2, 20.03, 129.8],
    [800, 1, 28.3, 243.2],
    [1000, 4, 15.84, 85.2],
    [1000, 1, 31.64, 298.2],
  ])("gains at γ %d, Fresnel number %d: %d and %d", (gamma, fresnel, image, tomography) => {
    const gains = retrievalGains((Math.PI * gamma) / (4 * fresnel));
    expect(gains.image).toAgreeWithin(image, 0.01);
    expect(gains.tomography).toAgreeWithin(tomography, 0.01);
  });

  it.each([
    {
      distanceM: 0.005,
      signal: [9.843e-3, 6.325e-3, 6.46, 17.8, 6.881e-3, 2.32e-3],
      need: [4685, 1.389e4, 0.51, 1.512],
      regime: [0.3798, 0.1123],
    },
    {
      distanceM: 0.02,
      signal: [5.737e-2, 1.678e-2, 12.8, 58.3, 2.346e-2, 2.32e-3],
      need: [1374, 1.389e4, 0.1496, 1.512],
      regime: [0.3799, 0.4495],
    },
  ])("hydroxyapatite at $distanceM m", ({ distanceM, signal, need, regime }) => {
    const retrieval = at(task(hydroxyapatite, sphere(10), water, 5, ideal, { use: "retrieval" }), 25, distanceM);
    const volume = at(task(hydroxyapatite, sphere(10), water, 5, ideal, { use: "tomography" }), 25, distanceM);
    const computed = [
      per(retrieval.signalM2, UM2),
      per(retrieval.rankedSignalM2, UM2),
      retrieval.gain2d,
      retrieval.gainCt,
      per(volume.rankedSignalM2, UM2),
      per(volume.absorptionSignalM2, UM2),
      per(volume.fluencePerM2, 1e12),
      per(volume.absorptionFluencePerM2, 1e12),
      volume.entranceDoseGy!,
      volume.absorptionEntranceDoseGy!,
      per(retrieval.geometry.resolutionPerM, 1e6),
      retrieval.nearFieldMeasure,
    ];
    for (const [index, value] of [...signal, ...need, ...regime].entries())
      expect(computed[index]!).toAgreeWithin(value, 0.01);
    // The absorption form beside retrieval, any R' alike.
    expect(per(retrieval.absorptionSignalM2, UM2)).toAgreeWithin(3.171e-3, 0.01);
    expect(per(retrieval.absorptionFluencePerM2, 1e12)).toAgreeWithin(1.017e4, 0.01);
    expect(retrieval.absorptionEntranceDoseGy!).toAgreeWithin(1.106, 0.01);
  });

  it.each([
    [0.005, 0.281, 0.1513, 0.0933, 0.0423],
    [0.02, 0.56, 0.1513, 0.2353, 0.0423],
  ])("volume signals of a layer and a fibre at %d m", (distanceM, layer, layerAlone, rod, rodAlone) => {
    const volume = { use: "tomography" } as const;
    const film = { kind: "layer", sizeM: um(10), widthM: um(20), lengthM: um(100) } as const;
    const ofLayer = at(task(hydroxyapatite, film, water, 5, ideal, volume), 25, distanceM);
    const ofFibre = at(task(hydroxyapatite, fibre(10, 100), water, 5, ideal, volume), 25, distanceM);
    expect(per(ofLayer.rankedSignalM2, UM2)).toAgreeWithin(layer, 0.01);
    expect(per(ofLayer.absorptionSignalM2, UM2)).toAgreeWithin(layerAlone, 0.01);
    expect(per(ofFibre.rankedSignalM2, UM2)).toAgreeWithin(rod, 0.01);
    expect(per(ofFibre.absorptionSignalM2, UM2)).toAgreeWithin(rodAlone, 0.01);
  });

  it("an air sphere in water: retrieval's signal 0.250, the ideal observer's 5.58 µm²", () => {
    const plan = task(air, sphere(50), water, 10, setup(50, 50, 6, 3, IDEAL), { use: "retrieval" });
    const figures = at(plan, 29.5, 0.375);
    expect(per(figures.rankedSignalM2, UM2)).toAgreeWithin(0.25, 0.01);
    expect(per(figures.signalM2, UM2)).toAgreeWithin(5.58, 0.01);
  });
});

type Range = readonly [number, number, number];
const ranked = (plan: PlanTask, energies: Range, distances: Range): RankedPlan =>
  rankPlan(plan, grid(plan, energies, distances), tables);

describe("cone beam", () => {
  const alloy = byMass({ Ti: 0.9, Al: 0.06, V: 0.04 }, 4.43);
  const plan = (use: Use): PlanTask =>
    task(air, sphere(20), alloy, 5, setup(0.05, 5, 200, 100), { use, minimumCounts: 100 });
  const range: readonly [Range, Range] = [
    [20, 150, 101],
    [0.05, 1, 40],
  ];

  it("does not starve absorption of magnification", () => {
    const { candidates, absorptionBest, doseAdvantage } = ranked(plan("direct"), ...range);
    const [first, alone] = [candidates[0]!.figures, absorptionBest!.figures];
    expect(first.energyEv).toAgreeWithin(74_000, 0.05);
    expect(first.geometry.distanceM).toBe(1);
    expect(first.entranceDoseGy!).toAgreeWithin(4.8, 0.05);
    expect(alone.energyEv).toAgreeWithin(72_000, 0.05);
    expect(alone.geometry.distanceM).toBe(1);
    expect(alone.entranceDoseGy!).toAgreeWithin(17.98, 0.05);
    expect(doseAdvantage!).toAgreeWithin(3.75, 0.05);
    expect(ranked(plan("tomography"), ...range).doseAdvantage!).toAgreeWithin(4.16, 0.05);
  });

  it("does not allow the shortest distance, where pixels span more than a third of the feature", () => {
    const { plane } = ranked(plan("direct"), ...range);
    expect(plane.forbidden.filter((_, place) => place % plane.grid.distancesM.length === 0)).toSatisfy(
      (codes: (string | null)[]) => codes.every((code) => code === "undersampled"),
    );
  });
});

describe("picks that practice accepts", () => {
  const floor = { minimumCounts: 100 } as const;
  const fine = setup(30, 50, 2, 1);
  const tissue = byMass(SOFT_TISSUE, 1.06);
  const aluminium = compound("Al", 2.7);
  const polymer: readonly [Range, Range] = [
    [8, 60, 101],
    [0.003, 3, 90],
  ];
  const fat: readonly [Range, Range] = [
    [10, 100, 101],
    [0.03, 10, 76],
  ];
  const pore: readonly [Range, Range] = [
    [10, 100, 101],
    [0.005, 2, 78],
  ];
  const inWater = (more: Partial<PlanTask>): PlanTask => task(pmma, fibre(20, 100), water, 5, fine, more);
  const inTissue = (use: Use): PlanTask =>
    task(byMass(ADIPOSE, 0.95), sphere(200), tissue, 50, setup(25, 100, 100, 50), { use, ...floor });
  const inMetal = (more: Partial<PlanTask>): PlanTask =>
    task(air, sphere(10), aluminium, 5, setup(50, 50, 2, 1), { objective: "fluence", ...more });
  const cases: readonly (readonly [string, PlanTask, readonly [Range, Range], number, number | null])[] = [
    ["PMMA, direct", inWater({ use: "direct", ...floor }), polymer, 18, 0.099],
    ["PMMA, direct, no floor", inWater({ use: "direct" }), polymer, 16.5, 0.091],
    ["PMMA, retrieval", inWater({ use: "retrieval", ...floor }), polymer, 17.5, 0.024],
    ["PMMA, tomography", inWater({ use: "tomography", ...floor }), polymer, 20.5, 0.029],
    ["PMMA, absorption", inWater({ use: "absorption", ...floor }), polymer, 11.5, null],
    ["adipose, direct", inTissue("direct"), fat, 33, 10],
    ["adipose, retrieval", inTissue("retrieval"), fat, 32, 10],
    ["adipose, tomography", inTissue("tomography"), fat, 32, 10],
    ["adipose, absorption", inTissue("absorption"), fat, 30, 10],
    ["pore in aluminium, retrieval", inMetal({ use: "retrieval", ...floor }), pore, 28, 0.039],
    ["pore in aluminium, tomography", inMetal({ use: "tomography", ...floor }), pore, 28, 0.039],
    ["pore in aluminium, direct, no floor", inMetal({ use: "direct" }), pore, 30, 0.16],
    ["pore in aluminium, direct", inMetal({ use: "direct", ...floor }), pore, 64, null],
  ];
  it.each(cases)("%s", (_, plan, [energies, distances], energyKeV, distanceM) => {
    const first = ranked(plan, energies, distances).candidates[0]!.figures;
    expect(first.energyEv).toAgreeWithin(energyKeV * 1000, 0.15);
    if (distanceM === null) return;
    expect(first.geometry.distanceM / distanceM).toBeGreaterThan(1 / 1.5);
    expect(first.geometry.distanceM / distanceM).toBeLessThan(1.5);
  });

  it("iodine in tissue: absorption just above the K edge, and a third more dose below it", () => {
    const iodine = byMass(
      { ...Object.fromEntries(Object.entries(SOFT_TISSUE).map(([name, share]) => [name, share * 0.97])), I: 0.03 },
      1.085,
    );
    const plan = task(iodine, sphere(20), tissue, 5, setup(50, 50, 6, 3), { use: "absorption", ...floor });
    const { candidates, plane } = ranked(plan, [10, 60, 101], [0.01, 2, 40]);
    const best = candidates[0]!.figures;
    expect(best.energyEv).toBeGreaterThan(33_300);
    expect(best.energyEv).toBeLessThan(33_400);
    const below = plane.grid.energiesEv.map((energyEv, i) =>
      energyEv < 33_169
        ? Math.min(
            ...plane.grid.distancesM.map((__, j) => {
              const place = i * plane.grid.distancesM.length + j;
              return plane.forbidden[place] === null ? plane.objective[place]! : Infinity;
            }),
          )
        : Infinity,
    );
    const least = Math.min(...below);
    expect(plane.grid.energiesEv[below.indexOf(least)]! / 13_500).toBeGreaterThan(0.85);
    expect(plane.grid.energiesEv[below.indexOf(least)]! / 13_500).toBeLessThan(1.15);
    expect(least / best.entranceDoseGy!).toAgreeWithin(1.35, 0.05);
  });
});
