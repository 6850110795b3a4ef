/** The grid of a plan: its energies, those beside edges included, and its distances. */
import { type Edge, edgeBandEv, edgesOf } from "../edges.ts";
import type { ScatteringTables } from "../scattering.ts";
import type { PlanTask } from "./task.ts";

/** Even steps from first to last, in the logarithm or not. One value alone is `from`. */
export function steps(from: number, to: number, count: number, spacing: "log" | "linear"): number[] {
  return Array.from({ length: count }, (_, index) => {
    if (index === 0) return from;
    if (index === count - 1) return to;
    const share = index / (count - 1);
    const value = spacing === "log" ? from * (to / from) ** share : from + (to - from) * share;
    // The last bits of a power differ between machines.
    return Number(value.toPrecision(12));
  });
}

/** Half-width in eV of the band around an edge where no candidate stands: max(50 eV, 0.5 %, bandwidth) (PHYSICS 6). */
export function candidateBandEv(edgeEv: number, bandwidth: number): number {
  return Math.max(edgeBandEv(edgeEv), bandwidth * edgeEv);
}

/** Edges of feature, host and layers between two energies (eV), ascending, each energy once. */
export function planEdges(
  { sample }: Pick<PlanTask, "sample">,
  tables: ScatteringTables,
  rangeEv: readonly [number, number],
): Edge[] {
  const materials = [sample.feature.material, sample.host.material, ...sample.layers.map((layer) => layer.material)];
  const edges = new Map<string, Edge>();
  for (const material of materials) {
    for (const edge of edgesOf(material, tables, rangeEv)) edges.set(`${edge.element} ${edge.shell}`, edge);
  }
  return [...edges.values()].sort((a, b) => a.energyEv - b.energyEv);
}

/** The edge whose candidate band holds the energy, the nearest one; or null. Exactly at the band's border is outside. */
export function edgeNear(edges: readonly Edge[], energyEv: number, bandwidth: number): Edge | null {
  let nearest: Edge | null = null;
  for (const edge of edges) {
    const away = Math.abs(energyEv - edge.energyEv);
    if (away >= candidateBandEv(edge.energyEv, bandwidth) * (1 - 1e-9)) continue;
    if (!nearest || away < Math.abs(energyEv - nearest.energyEv)) nearest = edge;
  }
  return nearest;
}

/** Energies of a range with two more for each edge, exactly at the borders of its band where they lie in the range; ascending. */
export function withEdgeEnergies(energiesEv: readonly number[], edges: readonly Edge[], bandwidth: number): number[] {
  const [first, last] = [energiesEv[0]!, energiesEv.at(-1)!];
  const beside = edges.flatMap(({ energyEv }) => {
    const away = candidateBandEv(energyEv, bandwidth);
    return [energyEv - away, energyEv + away].map((value) => Number(value.toPrecision(12)));
  });
  const inside = beside.filter((energyEv) => energyEv > first && energyEv < last);
  return sorted([...energiesEv, ...inside]);
}

/** Ascending, repeats dropped. */
export function sorted(values: readonly number[]): number[] {
  return [...new Set(values)].sort((a, b) => a - b);
}
