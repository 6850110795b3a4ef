/** Values of a material at energies, each with what the other tables say and the notes it needs. */
import {
  compareTabulations,
  type ConstantsNote,
  type Edge,
  edgesOf,
  FREE_ATOM_LIMIT_EV,
  type Material,
  nearestEdgeInBand,
  type OpticalConstants,
  type ScatteringTables,
  type Spread,
  type TabulationKey,
} from "#src/lib/physics/index.ts";

export interface ValueRow {
  readonly energyEv: number;
  readonly constants: OpticalConstants | null;
  readonly byTabulation: ReadonlyMap<TabulationKey, OpticalConstants | null>;
  readonly spread: Spread | null;
  readonly notes: readonly ConstantsNote[];
  readonly edgeNear: Edge | null;
}

/** One row an energy (eV), in the order given. */
export function valueRows(
  material: Material,
  energiesEv: readonly number[],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): ValueRow[] {
  const allEdges = edgesOf(material, tables, [0, Infinity]);
  return compareTabulations(material, energiesEv, tables, tabulation).map((row, index) => {
    const energyEv = energiesEv[index] as number;
    const edgeNear = nearestEdgeInBand(allEdges, energyEv);
    const notes: ConstantsNote[] = [];
    if (edgeNear) notes.push("nearEdge");
    if (energyEv < FREE_ATOM_LIMIT_EV) notes.push("belowOneKeV");
    if (!row.constants) notes.push("notInTable");
    if (material.densityEstimated) notes.push("densityEstimated");
    return { energyEv, ...row, notes, edgeNear };
  });
}
