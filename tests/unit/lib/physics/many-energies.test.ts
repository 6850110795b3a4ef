/** Short cuts of long look-ups change no number. */
import fc from "fast-check";
import { expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import {
  compositionOfFormula,
  constantsOfAllTabulations,
  constantsOverEnergy,
  type Edge,
  edgeBandEv,
  edgesOf,
  nearestEdgeInBand,
  parseFormula,
  TABULATION_KEYS,
  withDensity,
} from "#src/lib/physics/index.ts";

const tables = committedTables();
const material = withDensity(compositionOfFormula(parseFormula("Pb3CsIFeCa5O13H2He")), 3160);
const energies = fc.sample(fc.double({ min: 40, max: 460_000, noNaN: true }), { numRuns: 300, seed: 3 });

it("constants of all tabulations are those of each alone, in whatever order energies are asked for", () => {
  const ascending = [...energies].sort((a, b) => a - b);
  for (const list of [energies, ascending, ascending.toReversed()]) {
    const all = constantsOfAllTabulations(material, list, tables);
    for (const key of TABULATION_KEYS) {
      const alone = constantsOverEnergy(material, list, tables, key);
      for (const [index, energyEv] of list.entries()) {
        const single = constantsOverEnergy(material, [energyEv], tables, key);
        for (const column of ["delta", "beta", "muPhotoPerM"] as const) {
          expect(all[key][column][index]).toBe(single[column][0]);
          expect(alone[column][index]).toBe(single[column][0]);
        }
        if (!Number.isNaN(single.delta[0]!)) {
          expect(all[key].muCoherentPerM[index]).toBe(single.muCoherentPerM[0]);
          expect(all[key].muEnergyAbsorptionPerM[index]).toBe(single.muEnergyAbsorptionPerM[0]);
        }
      }
    }
  }
});

it("the nearest edge is the one that a look at every edge finds", () => {
  const edges = edgesOf(material, tables, [0, Infinity]);
  const slowly = (energyEv: number): Edge | null =>
    edges
      .filter((edge) => Math.abs(energyEv - edge.energyEv) < edgeBandEv(edge.energyEv))
      .reduce<Edge | null>(
        (best, edge) =>
          best && Math.abs(energyEv - best.energyEv) <= Math.abs(energyEv - edge.energyEv) ? best : edge,
        null,
      );
  const around = edges.flatMap(({ energyEv }) => [0.99, 0.9951, 0.9999, 1, 1.0049, 1.006].map((by) => energyEv * by));
  let near = 0;
  for (const energyEv of [...energies, ...around]) {
    const found = nearestEdgeInBand(edges, energyEv);
    expect(found).toBe(slowly(energyEv));
    if (found) near++;
  }
  expect(near).toBeGreaterThan(100);
});
