/** Bands of a plane: thresholds in 1-2-5 steps, and the shade of each. What is wanted most stands out most from the ground. */
import { tickText } from "./layout.ts";
import type { Better, Grid } from "./types.ts";

const MOST_BANDS = 7;
/** Shades seq-0 (nearest the ground) to seq-7. */
const STRONGEST = 7;
/** Below this ratio of largest to smallest value, steps are even; above, they go 1, 2, 5, 10. */
const LOG_FROM = 5;

/**
 * At most seven thresholds, ascending, each strictly between the smallest and the largest value: 1-2-5 steps of a log scale,
 * decades where those would leave more than half of the plane in one band, even 1-2-5 steps where values differ by less than
 * five times or are not all positive. Where more would fit, those next to the wanted end are kept. Empty for one value alone.
 */
export function niceBands(values: Grid<number | null>, better: Better = "less"): number[] {
  const known = values
    .flat()
    .filter((value) => value !== null && Number.isFinite(value))
    .map(Number)
    .sort((a, b) => a - b);
  const [low, high] = [known[0], known.at(-1)];
  if (low === undefined || high === undefined || low === high) return [];
  if (low <= 0 || high / low < LOG_FROM) return evenSteps(low, high);
  const middle = known[known.length >> 1]!;
  const keep = (steps: readonly number[]): number[] =>
    better === "less" ? steps.slice(0, MOST_BANDS) : steps.slice(-MOST_BANDS);
  const reaches = (steps: readonly number[]): boolean =>
    better === "less" ? (steps.at(-1) ?? low) >= middle : (steps[0] ?? high) <= middle;
  const fine = logSteps(low, high, [1, 2, 5]);
  const decades = logSteps(low, high, [1]);
  return fine.length <= MOST_BANDS || reaches(keep(fine)) || decades.length < 2 ? keep(fine) : keep(decades);
}

function logSteps(low: number, high: number, digits: readonly number[]): number[] {
  const steps: number[] = [];
  for (let power = Math.floor(Math.log10(low)) - 1; power <= Math.ceil(Math.log10(high)); power++) {
    for (const digit of digits) steps.push(Number(`${digit}e${power}`));
  }
  return steps.filter((step) => step > low && step < high);
}

/** Multiples of the smallest 1-2-5 step that leaves seven or fewer strictly inside. */
function evenSteps(low: number, high: number): number[] {
  const start = Math.floor(Math.log10((high - low) / MOST_BANDS)) - 1;
  for (let power = start; power < start + 4; power++) {
    for (const digit of [1, 2, 5]) {
      const step = Number(`${digit}e${power}`);
      const first = Math.floor(low / step) + 1;
      const count = Math.ceil(high / step) - first;
      if (count > MOST_BANDS) continue;
      return Array.from({ length: Math.max(count, 0) }, (_, index) => Number(((first + index) * step).toPrecision(12)));
    }
  }
  return [];
}

/** Shade 0 to 7 of band `band` (0 below the first threshold) among `thresholds` + 1 bands. */
export function shadeOf(band: number, thresholds: number, better: Better = "less"): number {
  if (thresholds === 0) return STRONGEST - 2;
  const rank = better === "less" ? thresholds - band : band;
  return Math.round((rank / thresholds) * STRONGEST);
}

/** A threshold as its label: the number alone, in the quantity's unit. */
export const bandText = (threshold: number): string => tickText(threshold);
