/** Limits that optical constants must keep whatever the table says. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import {
  compositionOfFormula,
  constantsOverEnergy,
  dosePerFluenceGyM2,
  edgesOf,
  energiesForTransmission,
  halfValueThicknessM,
  mix,
  nearestEdgeInBand,
  opticalConstants,
  pairContrast,
  parseFormula,
  spreadOf,
  TABULATION_KEYS,
  thicknessForTransmissionM,
  transmission,
  VACUUM,
  withDensity,
} from "#src/lib/physics/index.ts";

const tables = committedTables();
const compound = (formula: string, densityKgPerM3 = 1000) =>
  withDensity(compositionOfFormula(parseFormula(formula)), densityKgPerM3);
const at = (formula: string, energyEv: number, density = 1000) =>
  opticalConstants(compound(formula, density), energyEv, tables)!;

describe("optical constants", () => {
  it("are proportional to density", () => {
    const [thin, thick] = [at("SiO2", 20_000, 1100), at("SiO2", 20_000, 2200)];
    for (const key of ["delta", "beta", "muTotalPerM", "muEnergyAbsorptionPerM"] as const)
      expect(thick[key]).toAgreeWithin(2 * thin[key], 1e-12);
    expect(thick.deltaOverBeta).toAgreeWithin(thin.deltaOverBeta!, 1e-12);
  });

  it("add up over the parts of a mixture, which is its compound", () => {
    const water = compositionOfFormula(parseFormula("H2O"));
    const parts = [
      { ...compositionOfFormula(parseFormula("H")), densityKgPerM3: null },
      { ...compositionOfFormula(parseFormula("O")), densityKgPerM3: null },
    ];
    const mixed = withDensity(mix(parts, [2 / 3, 1 / 3], "mole").composition, 1000);
    for (const energyEv of [500, 5000, 20_000, 100_000]) {
      const [a, b] = [
        opticalConstants(mixed, energyEv, tables)!,
        opticalConstants(withDensity(water, 1000), energyEv, tables)!,
      ];
      expect(a.delta).toAgreeWithin(b.delta, 1e-12);
      expect(a.muTotalPerM).toAgreeWithin(b.muTotalPerM, 1e-12);
    }
  });

  it("fall as λ² in δ far above every edge", () => {
    for (const formula of ["H2O", "SiO2", "Al"]) {
      expect(at(formula, 200_000).delta * 16).toAgreeWithin(at(formula, 50_000).delta, 0.002);
    }
  });

  it("keep n = 1 − δ + iβ consistent: β from μ_photo, β_eff from μ_total", () => {
    const c = at("CuSO4·5H2O", 8048, 2286);
    expect(c.beta).toAgreeWithin((c.muPhotoPerM * c.wavelengthM) / (4 * Math.PI), 1e-9);
    expect(c.betaEffective).toAgreeWithin((c.muTotalPerM * c.wavelengthM) / (4 * Math.PI), 1e-9);
    expect(c.muTotalPerM).toAgreeWithin(c.muPhotoPerM + c.muCoherentPerM + c.muIncoherentPerM, 1e-12);
    expect(c.phasePerM).toAgreeWithin((2 * Math.PI * c.delta) / c.wavelengthM, 1e-12);
  });

  it("take scattering out of the beam: 43 % of PMMA's attenuation at 20 keV, 93 % of water's at 60 keV", () => {
    const pmma = at("C5H8O2", 20_000);
    expect(1 - pmma.muPhotoPerM / pmma.muTotalPerM).toAgreeWithin(0.43, 0.01);
    const water = at("H2O", 60_000);
    expect(1 - water.muPhotoPerM / water.muTotalPerM).toAgreeWithin(0.93, 0.01);
  });

  it("have an attenuation that falls with energy between edges above 1 keV", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 98 }),
        fc.double({ min: Math.log(1001), max: Math.log(440_000), noNaN: true }),
        fc.double({ min: 0.001, max: 0.02, noNaN: true }),
        (atomicNumber, logEnergy, step) => {
          const material = withDensity({ massFractions: new Map([[atomicNumber, 1]]), molarMassGPerMol: null }, 1000);
          const from = Math.exp(logEnergy);
          const to = from * (1 + step);
          const factors = tables.tabulations.epdl97.elements.get(atomicNumber)!;
          // Edges of the table itself, outer shells included: its repeated energies.
          const crossed = factors.energiesEv.some(
            (energy, index) => energy === factors.energiesEv[index + 1] && energy > from && energy <= to,
          );
          if (crossed) return;
          const photo = constantsOverEnergy(material, [from, to], tables).muPhotoPerM;
          expect(photo[1]!).toBeLessThan(photo[0]!);
        },
      ),
      { numRuns: 2000, seed: 3 },
    );
  });

  it("jump at an edge, which belongs to the side above it", () => {
    const k = edgesOf(compound("Fe"), tables, [5000, 10_000])[0]!;
    const below = at("Fe", k.energyEv * (1 - 1e-9));
    const above = at("Fe", k.energyEv);
    expect(above.muPhotoPerM / below.muPhotoPerM).toBeGreaterThan(5);
    expect(at("Fe", k.energyEv * (1 + 1e-9)).muPhotoPerM).toAgreeWithin(above.muPhotoPerM, 1e-6);
  });

  it("are null outside a table or where it lacks an element, and zero for vacuum", () => {
    expect(opticalConstants(compound("H2O"), 99, tables)).toBeNull();
    expect(opticalConstants(compound("H2O"), 450_001, tables)).toBeNull();
    expect(opticalConstants(compound("Pu"), 20_000, tables, "henke93")).toBeNull();
    const nothing = opticalConstants(VACUUM, 20_000, tables)!;
    expect(nothing).toMatchObject({
      delta: 0,
      beta: 0,
      muTotalPerM: 0,
      attenuationLengthM: null,
      deltaOverBeta: null,
      criticalAngleRad: 0,
    });
    expect(dosePerFluenceGyM2(nothing, 0)).toBeNull();
  });

  it("give the same at one energy as among many, in any order", () => {
    const energies = [60_000, 5000, 20_000, 5000];
    const columns = constantsOverEnergy(compound("Ca5P3O13H", 3160), energies, tables);
    for (const [index, energyEv] of energies.entries())
      expect(columns.delta[index]).toBe(at("Ca5P3O13H", energyEv, 3160).delta);
  });
});

describe("spread", () => {
  it("holds every table that covers the energy, hydrogen included", () => {
    const by = new Map(TABULATION_KEYS.map((key) => [key, opticalConstants(compound("H2O"), 20_000, tables, key)]));
    const spread = spreadOf(by)!;
    expect(spread.tabulations).toEqual(["epdl97", "henke93", "chantler95"]);
    for (const constants of by.values()) {
      expect(constants!.beta).toBeGreaterThanOrEqual(spread.beta[0]);
      expect(constants!.beta).toBeLessThanOrEqual(spread.beta[1]);
    }
    // The tables differ by a few percent in the weak photoelectric part of light elements, and hardly at all in δ.
    expect((spread.beta[1] - spread.beta[0]) / spread.beta[0]).toBeLessThan(0.1);
    expect((spread.delta[1] - spread.delta[0]) / spread.delta[0]).toBeLessThan(0.001);
  });

  it("is none where one table covers the energy", () => {
    expect(spreadOf(new Map([["epdl97", at("H2O", 20_000)]]))).toBeNull();
  });
});

describe("edges", () => {
  it("are named by element and shell, and known to be near within max(50 eV, 0.5 %)", () => {
    const edges = edgesOf(compound("CsI"), tables, [30_000, 40_000]);
    expect(edges.map(({ element, shell }) => `${element} ${shell}`)).toEqual(["I K", "Cs K"]);
    const iodine = edges[0]!.energyEv;
    expect(nearestEdgeInBand(edges, iodine * 1.0049)?.element).toBe("I");
    expect(nearestEdgeInBand(edges, iodine * 1.0051)).toBeNull();
    const iron = edgesOf(compound("Fe"), tables, [5000, 10_000]);
    expect(nearestEdgeInBand(iron, iron[0]!.energyEv - 49.9)?.shell).toBe("K");
    expect(nearestEdgeInBand(iron, iron[0]!.energyEv - 50)).toBeNull();
  });
});

describe("transmission", () => {
  it("and thickness undo each other", () => {
    const { muTotalPerM } = at("Al", 20_000, 2700);
    const thickness = thicknessForTransmissionM(muTotalPerM, 0.2)!;
    expect(transmission(muTotalPerM, thickness)).toAgreeWithin(0.2, 1e-12);
    expect(transmission(muTotalPerM, halfValueThicknessM(muTotalPerM)!)).toAgreeWithin(0.5, 1e-12);
    expect(thicknessForTransmissionM(0, 0.2)).toBeNull();
    expect(thicknessForTransmissionM(muTotalPerM, 1)).toBe(0);
  });

  it("is found again at each energy that gives it, across edges too", () => {
    const silver = compound("Ag", 10_500);
    const found = energiesForTransmission(silver, 50e-6, 0.2, tables, "epdl97", [5000, 100_000]);
    // Once below silver's K edge at 25.5 keV, in its jump, and once above it.
    expect(found.map(({ atEdge }) => atEdge)).toEqual([false, true, false]);
    expect(found.map(({ energyEv }) => energyEv)).toEqual(found.map(({ energyEv }) => energyEv).sort((a, b) => a - b));
    for (const { energyEv } of found.filter(({ atEdge }) => !atEdge)) {
      expect(transmission(opticalConstants(silver, energyEv, tables)!.muTotalPerM, 50e-6)).toAgreeWithin(0.2, 1e-6);
    }
  });

  it("is said to lie in an edge's jump where it does, and nowhere where it does not", () => {
    const silver = compound("Ag", 10_500);
    const k = edgesOf(silver, tables, [20_000, 30_000])[0]!.energyEv;
    const [above, below] = [k, k * (1 - 1e-9)].map(
      (energyEv) => opticalConstants(silver, energyEv, tables)!.muTotalPerM,
    );
    const between = transmission(0.5 * (above! + below!), 50e-6);
    const found = energiesForTransmission(silver, 50e-6, between, tables, "epdl97", [24_000, 26_000]);
    expect(found).toEqual([{ energyEv: k, atEdge: true }]);
    expect(energiesForTransmission(silver, 50e-6, 0.999, tables, "epdl97", [5000, 20_000])).toEqual([]);
  });
});

describe("pairs", () => {
  it("of PMMA in water at 20 keV are opposed, as an independent program has it", () => {
    // Independent program, same recipe: Δμ −0.12963 1/cm, Δδ 8.992e-8, γ −1406.
    const pair = pairContrast(at("C5H8O2", 20_000, 1190), at("H2O", 20_000))!;
    expect(pair.deltaMuPerM / 100).toAgreeWithin(-0.12963, 0.01);
    expect(pair.deltaDelta).toAgreeWithin(8.992e-8, 0.01);
    expect(pair.gamma).toAgreeWithin(-1406, 0.01);
    expect(pairContrast(null, at("H2O", 20_000))).toBeNull();
  });
});
