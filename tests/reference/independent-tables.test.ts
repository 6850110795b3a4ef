/** The tables against what others computed: Berger and Hubbell's totals, f1 of Henke 1993, and the limits of f1. */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { relativisticLimit } from "#data/build/dispersion.ts";
import {
  edgesOf,
  elementByNumber,
  factorsAt,
  type Material,
  nearestEdgeInBand,
  opticalConstants,
  withDensity,
} from "#src/lib/physics/index.ts";

const tables = committedTables();
const element = (atomicNumber: number): Material =>
  withDensity({ massFractions: new Map([[atomicNumber, 1]]), molarMassGPerMol: null }, 1000);

describe("total attenuation, Z 1 to 92, 5 to 150 keV", () => {
  const { energiesKeV, totals } = JSON.parse(
    readFileSync(new URL("./fixtures/berger-hubbell.json", import.meta.url), "utf8"),
  ) as {
    energiesKeV: number[];
    totals: Record<string, number[]>;
  };
  /** Just below the K edge of heavy elements the two evaluations part by more: seen up to 3.6 %. */
  const BELOW_HEAVY_K_EDGES = new Set(["79 at 80", "87 at 100"]);

  it("agrees with Berger and Hubbell within 3 % outside edges", () => {
    let compared = 0;
    let nearEdges = 0;
    const off: string[] = [];
    for (let atomicNumber = 1; atomicNumber <= 92; atomicNumber++) {
      const edges = edgesOf(element(atomicNumber), tables, [0, Infinity]);
      for (const [index, energyKeV] of energiesKeV.entries()) {
        if (nearestEdgeInBand(edges, energyKeV * 1000)) {
          nearEdges++;
          continue;
        }
        const computed = opticalConstants(element(atomicNumber), energyKeV * 1000, tables)!.muTotalPerM / 100;
        const difference = Math.abs(computed / totals[atomicNumber]![index]! - 1);
        const place = `${atomicNumber} at ${energyKeV}`;
        compared++;
        if (difference > (BELOW_HEAVY_K_EDGES.has(place) ? 0.04 : 0.03))
          off.push(`${place} keV: ${(difference * 100).toFixed(2)} %`);
      }
    }
    expect(off).toEqual([]);
    expect(compared + nearEdges).toBe(92 * 13);
    // Edges were in the set, and only few values were left out for them.
    expect(nearEdges).toBeGreaterThan(5);
    expect(nearEdges).toBeLessThan(25);
  });
});

describe("f1", () => {
  it("agrees with Henke 1993 within 0.5 % for Z up to 30, from 2 keV, a fifth of its energy away from every edge", () => {
    const off: string[] = [];
    let compared = 0;
    for (let atomicNumber = 1; atomicNumber <= 30; atomicNumber++) {
      const edges = edgesOf(element(atomicNumber), tables, [0, Infinity]);
      const { energiesEv, f1 } = tables.tabulations.henke93.elements.get(atomicNumber)!;
      const own = tables.tabulations.epdl97.elements.get(atomicNumber)!;
      const out = { f1: 0, f2: 0, coherentM2: 0, incoherentM2: 0, energyAbsorptionM2: 0 };
      for (const [index, energyEv] of energiesEv.entries()) {
        if (energyEv < 2000 || edges.some((edge) => Math.abs(energyEv / edge.energyEv - 1) < 0.2)) continue;
        factorsAt(own, energyEv, out);
        const difference = Math.abs(out.f1 / f1[index]! - 1);
        compared++;
        // The source has a bump of 1 % in silicon at 9.8 keV, and parts by 0.8 % below potassium's K edge.
        const known =
          (atomicNumber === 14 && energyEv > 9300 && energyEv < 10_100) || (atomicNumber === 19 && energyEv < 3000);
        if (!(difference <= (known ? 0.011 : 0.005)))
          off.push(`${elementByNumber(atomicNumber).symbol} at ${energyEv} eV: ${difference}`);
      }
    }
    expect(off).toEqual([]);
    expect(compared).toBeGreaterThan(4500);
  });

  it("goes to Z* far above the edges", () => {
    const out = { f1: 0, f2: 0, coherentM2: 0, incoherentM2: 0, energyAbsorptionM2: 0 };
    for (let atomicNumber = 1; atomicNumber <= 98; atomicNumber++) {
      const factors = tables.tabulations.epdl97.elements.get(atomicNumber)!;
      factorsAt(factors, 450_000, out);
      const k = tables.shells.get(atomicNumber)![0]!.edgeEnergyEv;
      // What is left of the integral falls as (E_K/E)² and a logarithm: for californium (135 keV) 1 %, for light elements nothing.
      expect(Math.abs(out.f1 / relativisticLimit(atomicNumber) - 1), elementByNumber(atomicNumber).symbol).toBeLessThan(
        1e-4 + 0.25 * (k / 450_000) ** 2,
      );
    }
  });

  it("is within 1.5 % of Chantler 1995 for tungsten to uranium at 20, 40 and 60 keV, where the relativistic terms differ", () => {
    for (let atomicNumber = 74; atomicNumber <= 92; atomicNumber++) {
      for (const energyEv of [25_000, 40_000, 60_000]) {
        const edges = edgesOf(element(atomicNumber), tables, [5000, 200_000]);
        if (edges.some((edge) => Math.abs(energyEv / edge.energyEv - 1) < 0.15)) continue;
        const [a, b] = (["epdl97", "chantler95"] as const).map(
          (key) => opticalConstants(element(atomicNumber), energyEv, tables, key)!.delta,
        );
        expect(a!, elementByNumber(atomicNumber).symbol).toAgreeWithin(b!, 0.015);
      }
    }
  });
});
