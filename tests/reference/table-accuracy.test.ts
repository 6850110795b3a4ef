/**
 * The accuracy that the tables state: interpolation against the full calculation, the dispersion integral against a closed
 * form, and what must hold whatever the source: edges where they were measured, scattering per electron.
 */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { SUBSHELLS } from "#data/build/align-edges.ts";
import { committedTables } from "#data/build/committed-tables.ts";
import { dispersionNodes, f1At, relativisticLimit } from "#data/build/dispersion.ts";
import { kleinNishinaEnergyShare } from "#data/build/energy-absorption.ts";
import { calculateElement, type ElementSource } from "#data/build/epdl97.ts";
import { ELECTRON_REST_ENERGY, factorsAt, M2_PER_BARN } from "#src/lib/physics/index.ts";

const { tabulations, shells } = committedTables();
const { elements } = tabulations.epdl97;

describe("interpolation in epdl97", () => {
  it.each(["oxygen", "aluminium", "iron", "ruthenium"])(
    "of %s stays within 0.1 % of the full calculation (f1: 0.002 electrons or 0.02 %), 2 eV from edges and further",
    (name) => {
      const source = JSON.parse(
        readFileSync(new URL(`./fixtures/raw/${name}.json`, import.meta.url), "utf8"),
      ) as ElementSource;
      const { aligned, rowAt } = calculateElement(source);
      const edges = [...aligned.jumpsEv];
      const energies = Array.from({ length: 500 }, (_, index) => 100 * 4500 ** ((index + 0.37) / 500));
      for (const edge of edges)
        for (let distance = 2.01; distance < 0.1 * edge; distance *= 1.37)
          energies.push(edge - distance, edge + distance);
      const out = { f1: 0, f2: 0, coherentM2: 0, incoherentM2: 0, energyAbsorptionM2: 0 };
      const off: string[] = [];
      let compared = 0;
      for (const energyEv of energies) {
        if (energyEv < 100 || energyEv > 450_000 || edges.some((edge) => Math.abs(edge - energyEv) < 2)) continue;
        const full = rowAt(energyEv, "");
        factorsAt(elements.get(source.atomicNumber)!, energyEv, out);
        compared++;
        if (Math.abs(out.f1 - full.f1) > Math.max(0.002, 2e-4 * Math.abs(full.f1)))
          off.push(`f1 at ${energyEv} eV: ${out.f1}, in full ${full.f1}`);
        for (const [column, value, whole] of [
          ["f2", out.f2, full.f2],
          ["coherent", out.coherentM2, full.coherentBarn * M2_PER_BARN],
          ["incoherent", out.incoherentM2, full.incoherentBarn * M2_PER_BARN],
          ["energy absorption", out.energyAbsorptionM2, full.energyAbsorptionBarn * M2_PER_BARN],
        ] as const)
          if (!(Math.abs(value / whole - 1) <= 1e-3)) off.push(`${column} at ${energyEv} eV: ${value / whole}`);
      }
      expect(off).toEqual([]);
      expect(compared).toBeGreaterThan(500);
    },
  );
});

describe("the dispersion integral", () => {
  // f2 = 4 (ε₀/ε)² from ε₀ on, in closed form: f1 − Z* = (4/π)(ε₀/E)² ln|(E/ε₀)² − 1|.
  const onset = 1000;
  const energies = Array.from({ length: 140 }, (_, index) => onset * 1.05 ** index);
  const nodes = dispersionNodes(energies, new Set([onset]), (energyEv, side) =>
    energyEv < onset || (energyEv === onset && side === "below") ? 0 : 4 * (onset / energyEv) ** 2,
  );
  it.each([300, 700, 950, 998, 999.9, 1000.1, 1002, 1100, 1300, 1900, 8048, 60_000])(
    "agrees with its closed form for a power law with an edge at 1 keV, at %d eV",
    (energyEv) => {
      const expected = (4 / Math.PI) * (onset / energyEv) ** 2 * Math.log(Math.abs((energyEv / onset) ** 2 - 1));
      expect(f1At(nodes, 8, energyEv) - relativisticLimit(8)).toAgreeWithin(expected, 1e-4);
    },
  );
});

describe("the share of energy that incoherent scattering gives to the electron", () => {
  it("is E/(m_e c²) at low energy, and the published 13.8 % at 100 keV and 44 % at 1 MeV", () => {
    expect(kleinNishinaEnergyShare(1)).toAgreeWithin(1 / ELECTRON_REST_ENERGY.value, 1e-5);
    // Johns and Cunningham, The Physics of Radiology (from memory): mean energies 13.8 keV and 440 keV.
    expect(kleinNishinaEnergyShare(100_000)).toAgreeWithin(0.138, 0.005);
    expect(kleinNishinaEnergyShare(1_000_000)).toAgreeWithin(0.44, 0.005);
  });
});

describe("epdl97 as a whole", () => {
  it("has both sides of every K, L and M edge above 100 eV at its published energy", () => {
    let found = 0;
    for (const [atomicNumber, { energiesEv, f2 }] of elements) {
      for (const { shell, edgeEnergyEv } of shells.get(atomicNumber)!) {
        if (!SUBSHELLS.includes(shell as (typeof SUBSHELLS)[number]) || edgeEnergyEv <= 100) continue;
        const below = energiesEv.indexOf(edgeEnergyEv);
        expect(below, `${atomicNumber} ${shell} at ${edgeEnergyEv} eV`).toBeGreaterThanOrEqual(0);
        expect(energiesEv[below + 1], `${atomicNumber} ${shell}`).toBe(edgeEnergyEv);
        expect(f2[below + 1]! / f2[below]!, `${atomicNumber} ${shell}`).toBeGreaterThan(1);
        found++;
      }
    }
    expect(found).toBeGreaterThan(600);
  });

  it("scatters incoherently, per electron, as the neighbours in the table do: no element has another's weight", () => {
    const perElectron = (atomicNumber: number): number => {
      const out = { f1: 0, f2: 0, coherentM2: 0, incoherentM2: 0, energyAbsorptionM2: 0 };
      factorsAt(elements.get(atomicNumber)!, 300_000, out);
      return out.incoherentM2 / atomicNumber;
    };
    for (let atomicNumber = 2; atomicNumber < 98; atomicNumber++) {
      const neighbours = (perElectron(atomicNumber - 1) + perElectron(atomicNumber + 1)) / 2;
      // Interpolation takes 0.1 %, weights in the source that differ in their fourth digit the rest.
      expect(perElectron(atomicNumber), `atomic number ${atomicNumber}`).toAgreeWithin(neighbours, 0.002);
    }
  });
});
