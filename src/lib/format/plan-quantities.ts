/** Doses, times, distances and fluences as plans speak of them: three digits in the unit that reads best. */
import { formatGiven, formatSignificant, partsText } from "./numbers.ts";

const SPACE = "\u00a0";

interface Step {
  readonly from: number;
  readonly per: number;
  readonly unit: string;
}

/** From the largest unit down; below the last one too. */
function scaled(value: number, steps: readonly Step[], digits: number): string {
  const size = Math.abs(value);
  const step = steps.find(({ from }) => size >= from) ?? (steps.at(-1) as Step);
  return `${rounded(value / step.per, digits)}${SPACE}${step.unit}`;
}

/** Given digits, but no zeros behind the point that say nothing: 5 m, not 5.00 m; powers of ten outside 0.001 to 100 000. */
export function rounded(value: number, digits = 3): string {
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e5) return formatGiven(value, digits);
  const parts = formatSignificant(value, digits);
  return parts === null ? "no value" : partsText(parts);
}

/** kGy from 1000 Gy, mGy below 0.1 Gy, µGy below 0.1 mGy. */
export const doseText = (doseGy: number, digits = 3): string =>
  scaled(
    doseGy,
    [
      { from: 1e9, per: 1, unit: "Gy" },
      { from: 1e6, per: 1e6, unit: "MGy" },
      { from: 1e3, per: 1e3, unit: "kGy" },
      { from: 0.1, per: 1, unit: "Gy" },
      { from: 1e-4, per: 1e-3, unit: "mGy" },
      { from: 0, per: 1e-6, unit: "µGy" },
    ],
    digits,
  );

export const timeText = (timeS: number, digits = 3): string =>
  scaled(
    timeS,
    [
      { from: 7200, per: 3600, unit: "h" },
      { from: 120, per: 60, unit: "min" },
      { from: 0.1, per: 1, unit: "s" },
      { from: 1e-4, per: 1e-3, unit: "ms" },
      { from: 0, per: 1e-6, unit: "µs" },
    ],
    digits,
  );

/** Metres from 0.1 m, then millimetres and micrometres; 0 is contact. */
export const distanceText = (distanceM: number, digits = 3): string =>
  distanceM === 0
    ? "0 m"
    : scaled(
        distanceM,
        [
          { from: 0.1, per: 1, unit: "m" },
          { from: 1e-3, per: 1e-3, unit: "mm" },
          { from: 0, per: 1e-6, unit: "µm" },
        ],
        digits,
      );

/** Of what lies in a sample: mm from 1 mm, else µm, nm below 0.1 µm. */
export const lengthText = (lengthM: number, digits = 4): string =>
  scaled(
    lengthM,
    [
      { from: 1, per: 1, unit: "m" },
      { from: 1e-3, per: 1e-3, unit: "mm" },
      { from: 1e-7, per: 1e-6, unit: "µm" },
      { from: 0, per: 1e-9, unit: "nm" },
    ],
    digits,
  );

export const energyText = (energyKeV: number, digits = 4): string => `${rounded(energyKeV, digits)}${SPACE}keV`;

/** Photons per µm². */
export const fluenceText = (perUm2: number, digits = 3): string => `${rounded(perUm2, digits)}${SPACE}per${SPACE}µm²`;

/** A ratio such as a gain: two digits from 10, three below, no decimals from 100. */
export const ratioText = (ratio: number): string => rounded(ratio, ratio >= 100 ? 3 : ratio >= 10 ? 3 : 2);

/** A share as percent with three digits. */
export const percentText = (share: number, digits = 3): string => `${rounded(share * 100, digits)}${SPACE}%`;
