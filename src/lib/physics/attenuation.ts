/** Transmission, the thickness for one, and the energies that give one (Beer and Lambert, with μ_total of PHYSICS 3). */
import { edgesOf } from "./edges.ts";
import type { Material } from "./material.ts";
import { constantsOverEnergy } from "./optical-constants.ts";
import type { ScatteringTables, TabulationKey } from "./scattering.ts";

/** T = exp(−μ t), μ in 1/m and t in m, both ≥ 0. */
export function transmission(muTotalPerM: number, thicknessM: number): number {
  return Math.exp(-muTotalPerM * thicknessM);
}

/** t = −ln T / μ in m, for 0 < T ≤ 1 and μ in 1/m; null where nothing attenuates (μ = 0). */
export function thicknessForTransmissionM(muTotalPerM: number, wantedTransmission: number): number | null {
  return muTotalPerM > 0 ? Math.abs(Math.log(wantedTransmission)) / muTotalPerM : null;
}

/** ln 2 / μ in m; null where nothing attenuates. */
export function halfValueThicknessM(muTotalPerM: number): number | null {
  return thicknessForTransmissionM(muTotalPerM, 0.5);
}

/** Thickness in m that retards the wave by 2π: λ/δ; null where δ ≤ 0. */
export function thicknessForTwoPiM(delta: number, wavelengthM: number): number | null {
  return delta > 0 ? wavelengthM / delta : null;
}

export interface TransmissionEnergy {
  readonly energyEv: number;
  /** True where the wanted value lies inside the jump of an edge: no energy gives it exactly, the edge passes it. */
  readonly atEdge: boolean;
}

// Steps per unit of ln E between edges; μ is smooth there, and roots are then refined by bisection.
const STEPS_PER_LOG_ENERGY = 60;

/**
 * Every energy (eV, ascending) in `rangeEv` at which `thicknessM` of the material transmits `wantedTransmission`.
 * Between edges μ falls above 1 keV, so that there is one crossing a branch; edges add more. Empty where none exists.
 * Energies are found to 1e-9 relative.
 */
export function energiesForTransmission(
  material: Material,
  thicknessM: number,
  wantedTransmission: number,
  tables: ScatteringTables,
  tabulation: TabulationKey,
  rangeEv: readonly [number, number],
): TransmissionEnergy[] {
  const wantedMu = -Math.log(wantedTransmission) / thicknessM;
  const excessOf = (energiesEv: readonly number[]): number[] => {
    const { muPhotoPerM, muCoherentPerM, muIncoherentPerM } = constantsOverEnergy(
      material,
      energiesEv,
      tables,
      tabulation,
    );
    return energiesEv.map((_, i) => muPhotoPerM[i]! + muCoherentPerM[i]! + muIncoherentPerM[i]! - wantedMu);
  };
  const excessAt = (energyEv: number): number => excessOf([energyEv])[0] as number;
  const grid = branchGrid(material, tables, rangeEv);
  const excess = excessOf(grid.map(({ energyEv }) => energyEv));
  const found: TransmissionEnergy[] = [];
  for (const [index, { energyEv, isEdge }] of grid.entries()) {
    const value = excess[index] as number;
    const before = grid[index - 1];
    const valueBefore = excess[index - 1] ?? Number.NaN;
    if (value === 0) found.push({ energyEv, atEdge: false });
    else if (before && valueBefore * value < 0) {
      if (isEdge) found.push({ energyEv, atEdge: true });
      else found.push({ energyEv: bisect(excessAt, before.energyEv, energyEv, valueBefore), atEdge: false });
    }
  }
  return found;
}

interface GridPoint {
  readonly energyEv: number;
  /** The edge itself, which belongs to the branch above it; the point before it lies just below. */
  readonly isEdge: boolean;
}

/** Energies (eV, ascending) close enough that μ crosses a value at most once between two of them, edges aside. */
function branchGrid(material: Material, tables: ScatteringTables, rangeEv: readonly [number, number]): GridPoint[] {
  const inside = edgesOf(material, tables, rangeEv).map((edge) => edge.energyEv);
  const borders = [...new Set([rangeEv[0], ...inside, rangeEv[1]])];
  const grid: GridPoint[] = [{ energyEv: rangeEv[0], isEdge: false }];
  for (let branch = 0; branch + 1 < borders.length; branch++) {
    const start = borders[branch] as number;
    const border = borders[branch + 1] as number;
    const isLast = branch + 2 === borders.length;
    const end = isLast ? border : border * (1 - 1e-12);
    const steps = Math.max(2, Math.ceil(Math.log(end / start) * STEPS_PER_LOG_ENERGY));
    for (let step = 1; step < steps; step++)
      grid.push({ energyEv: start * (end / start) ** (step / steps), isEdge: false });
    grid.push({ energyEv: end, isEdge: false });
    if (!isLast) grid.push({ energyEv: border, isEdge: true });
  }
  return grid;
}

function bisect(value: (energyEv: number) => number, startEv: number, endEv: number, startValue: number): number {
  let low = startEv;
  let high = endEv;
  while (high - low > 1e-9 * high) {
    const middle = 0.5 * (low + high);
    if (value(middle) * startValue > 0) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
