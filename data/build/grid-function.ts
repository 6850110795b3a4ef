/**
 * A tabulated function that may jump: ascending energies, a repeated energy is a jump (value below, then above). Log-log
 * between rows; linear where a value is zero; nothing is drawn across a jump.
 */
export type Side = "below" | "above";

export class GridFunction {
  constructor(
    readonly energies: readonly number[],
    readonly values: readonly number[],
  ) {}

  /** The value at an energy; exactly at a jump the side decides. Outside the rows: 0 below, the last segment's power law above. */
  at(energy: number, side: Side): number {
    const { energies, values } = this;
    const last = energies.length - 1;
    if (energy < energies[0]!) return 0;
    let low = 0;
    let high = last + 1;
    // Last row at or below the energy.
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (energies[middle]! <= energy) low = middle;
      else high = middle;
    }
    if (energies[low] === energy) {
      if (side === "above") return values[low]!;
      let first = low;
      while (first > 0 && energies[first - 1] === energy) first--;
      return values[first]!;
    }
    return low === last
      ? interpolate(energies[last - 1]!, values[last - 1]!, energies[last]!, values[last]!, energy)
      : interpolate(energies[low]!, values[low]!, energies[low + 1]!, values[low + 1]!, energy);
  }
}

/** Log-log through two points; linear where one of the values is not positive. */
export function interpolate(x0: number, y0: number, x1: number, y1: number, x: number): number {
  if (y0 > 0 && y1 > 0) return y0 * (x / x0) ** (Math.log(y1 / y0) / Math.log(x1 / x0));
  return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0);
}
