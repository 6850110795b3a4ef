/** Absorption edges of a material, and how near one an energy is (PHYSICS 3.1). */
import { elementByNumber } from "./elements.ts";
import type { Composition } from "./material.ts";
import type { ScatteringTables } from "./scattering.ts";

export interface Edge {
  readonly atomicNumber: number;
  readonly element: string;
  /** K, L1 … */
  readonly shell: string;
  readonly energyEv: number;
}

/** Edges of every element of a material between two energies (eV, inclusive), ascending. */
export function edgesOf(
  composition: Composition,
  tables: ScatteringTables,
  rangeEv: readonly [number, number],
): Edge[] {
  const edges: Edge[] = [];
  for (const atomicNumber of composition.massFractions.keys()) {
    for (const { shell, edgeEnergyEv } of tables.shells.get(atomicNumber) ?? []) {
      if (edgeEnergyEv < rangeEv[0] || edgeEnergyEv > rangeEv[1]) continue;
      edges.push({ atomicNumber, element: elementByNumber(atomicNumber).symbol, shell, energyEv: edgeEnergyEv });
    }
  }
  return edges.sort((a, b) => a.energyEv - b.energyEv);
}

/** Half-width in eV of the band around an edge where the free-atom model is limited: max(50 eV, 0.5 %). */
export function edgeBandEv(edgeEnergyEv: number): number {
  return Math.max(50, 0.005 * edgeEnergyEv);
}

/** The edge whose band holds the energy, the closest one where bands overlap, or null. Edges ascending. */
export function nearestEdgeInBand(edges: readonly Edge[], energyEv: number): Edge | null {
  let nearest: Edge | null = null;
  for (const edge of edges) {
    const distance = Math.abs(energyEv - edge.energyEv);
    // Bands grow with the edge by far less than their distance: none further up holds the energy.
    if (edge.energyEv > energyEv && distance >= edgeBandEv(edge.energyEv)) break;
    if (distance >= edgeBandEv(edge.energyEv)) continue;
    if (!nearest || distance < Math.abs(energyEv - nearest.energyEv)) nearest = edge;
  }
  return nearest;
}

/** Below this energy condensed matter departs from free atoms even away from edges. */
export const FREE_ATOM_LIMIT_EV = 1000;

export type ConstantsNote = "nearEdge" | "belowOneKeV" | "notInTable" | "densityEstimated";
