/**
 * Numbers as people read them: significant digits, true minus, narrow thousands, powers of ten as parts.
 * Nothing else in the product rounds. Full precision stays in the API and in exports.
 */

const MINUS = "\u2212";
const NARROW_SPACE = "\u202f";
const NO_BREAK_SPACE = "\u00a0";

/** Significant digits shown unless a place asks for others. */
export const DEFAULT_DIGITS = 4;

/** Plain notation from here … */
const PLAIN_FROM = 1e-3;
/** … to below here; a power of ten outside. */
const PLAIN_BELOW = 1e5;

export interface NumberParts {
  /** Digits with sign and separators, for example `−1.094` or `2 425`. */
  readonly mantissa: string;
  /** Power of ten to show as `× 10ⁿ`; null in plain notation. */
  readonly exponent: number | null;
}

/**
 * A value rounded to `digits` significant digits (1 to 15). Trailing zeros stay, since they say how exact the value is.
 * Null for what has no value: null itself, NaN and the infinities.
 * @example formatSignificant(4.6217e-7, 3) // { mantissa: "4.62", exponent: -7 }
 */
export function formatSignificant(value: number | null, digits: number = DEFAULT_DIGITS): NumberParts | null {
  if (value === null || !Number.isFinite(value)) return null;
  if (value === 0) return { mantissa: "0", exponent: null };
  const [significand = "", power = "0"] = Math.abs(value)
    .toExponential(digits - 1)
    .split("e");
  const exponent = Number(power);
  const rounded = Number(`${significand}e${power}`);
  const sign = value < 0 ? MINUS : "";
  if (rounded < PLAIN_FROM || rounded >= PLAIN_BELOW) return { mantissa: sign + significand, exponent };
  return { mantissa: sign + groupThousands(plainDigits(significand.replace(".", ""), exponent)), exponent: null };
}

/** A constant or another exact number with every digit it has, in powers of ten outside 0.001 to 100 000. */
export function formatExact(value: number): NumberParts {
  const digits = Math.abs(value).toExponential().split("e")[0]!.replace(".", "").length;
  const parts = formatSignificant(value, Math.min(digits, 17));
  if (parts === null) throw new RangeError("A constant without a finite value cannot be shown.");
  return parts;
}

/** `formatSignificant` as one line of text, for titles, labels and copied sentences: `4.62 × 10⁻⁷`. */
export function significantText(value: number | null, digits: number = DEFAULT_DIGITS): string {
  const parts = formatSignificant(value, digits);
  return parts === null ? "no value" : partsText(parts);
}

/** Parts as text with Unicode superscripts. */
export function partsText({ mantissa, exponent }: NumberParts): string {
  if (exponent === null) return mantissa;
  return `${mantissa}${NO_BREAK_SPACE}×${NO_BREAK_SPACE}10${superscriptText(exponent)}`;
}

/**
 * A value that was typed or stands in a table, such as an energy: at most `digits` significant digits, no trailing zeros.
 * @example formatGiven(33.1694, 4) // "33.17", formatGiven(20) // "20"
 */
export function formatGiven(value: number, digits: number = 6): string {
  const rounded = Number(value.toPrecision(digits));
  if (rounded !== 0 && (Math.abs(rounded) < 1e-6 || Math.abs(rounded) >= 1e15)) return significantText(value, digits);
  return groupThousands(String(rounded).replace("-", MINUS));
}

/** Fixed number of decimals, for columns that must align. */
export function formatFixed(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  const sign = value < 0 && Number(text) !== 0 ? MINUS : "";
  return sign + groupThousands(text);
}

/**
 * A share as percent with `digits` significant digits; what is smaller than 0.01 % either way reads "below 0.01 %".
 * @example formatPercent(0.0312) // "3.1 %"
 */
export function formatPercent(share: number, digits: number = 2): string {
  const percent = share * 100;
  if (percent === 0) return `0${NO_BREAK_SPACE}%`;
  const magnitude = Math.abs(percent);
  const sign = percent < 0 ? MINUS : "";
  if (magnitude < 0.01) return `below 0.01${NO_BREAK_SPACE}%`;
  return `${sign}${groupThousands(Number(magnitude.toPrecision(digits)).toString())}${NO_BREAK_SPACE}%`;
}

/** The same with its sign always written, for differences: `+0.8 %`. */
export function formatSignedPercent(share: number, digits: number = 2): string {
  const text = formatPercent(share, digits);
  return share > 0 && !text.startsWith("below") ? `+${text}` : text;
}

/** Two bounds in one notation: `4.07 to 4.10`, with the power of ten written once where both share it. */
export function formatRange(
  [low, high]: readonly [number, number],
  digits: number = DEFAULT_DIGITS,
): { low: NumberParts | null; high: NumberParts | null; sharedExponent: number | null } {
  const lowParts = formatSignificant(low, digits);
  const highParts = formatSignificant(high, digits);
  const shared =
    lowParts !== null && highParts !== null && lowParts.exponent === highParts.exponent ? lowParts.exponent : null;
  return { low: lowParts, high: highParts, sharedExponent: shared };
}

/** Bounds as text: `4.07 to 4.10 × 10⁻⁷`. */
export function rangeText(bounds: readonly [number, number], digits: number = DEFAULT_DIGITS): string {
  const { low, high, sharedExponent } = formatRange(bounds, digits);
  if (low === null || high === null) return "no value";
  const first = sharedExponent === null ? partsText(low) : low.mantissa;
  return `${first} to ${partsText(high)}`;
}

/** What sets bounds apart: the bounds, or where they are printed alike, by how much of the first the other is apart. */
export function spreadText(bounds: readonly [number, number], unit = ""): string {
  const { low, high } = formatRange(bounds);
  if (low === null || high === null) return "no value";
  return partsText(low) === partsText(high)
    ? `spread ${formatPercent(Math.abs(bounds[1] / bounds[0] - 1))}`
    : `tables: ${rangeText(bounds)}${unit === "" ? "" : `\u00a0${unit}`}`;
}

/** Integer as Unicode superscript: `−7` becomes `⁻⁷`. */
export function superscriptText(exponent: number): string {
  const digits = "⁰¹²³⁴⁵⁶⁷⁸⁹";
  return [...String(exponent)].map((character) => (character === "-" ? "⁻" : digits[Number(character)])).join("");
}

/** A count with narrow spaces between thousands. */
export function formatCount(value: number): string {
  return groupThousands(String(Math.round(value)).replace("-", MINUS));
}

/** Digit string d₁d₂d₃… with the decimal point after d₁ × 10^exponent, written out. */
function plainDigits(digits: string, exponent: number): string {
  if (exponent < 0) return `0.${"0".repeat(-exponent - 1)}${digits}`;
  const whole = digits.slice(0, exponent + 1).padEnd(exponent + 1, "0");
  const rest = digits.slice(exponent + 1);
  return rest === "" ? whole : `${whole}.${rest}`;
}

function groupThousands(text: string): string {
  const [whole = "", rest] = text.split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, NARROW_SPACE);
  return rest === undefined ? grouped : `${grouped}.${rest}`;
}
