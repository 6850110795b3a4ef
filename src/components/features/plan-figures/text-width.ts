/** Widths of text before anything is drawn, so that server and browser lay figures out alike. */

/** The site's hands: running text, its bold, and the figures of axes. */
export type Hand = "text" | "bold" | "figures";

/** Advance of Atkinson Hyperlegible in hundredths of an em, bold, by letters of like width; bold is the wider. */
const WIDTHS: readonly (readonly [string, number])[] = [
  ["\u202f", 16],
  [".,", 24],
  ["ijlI'|", 32],
  [" \u00a0", 32],
  ["frt-()/", 38],
  ["1⁰¹²³⁴⁵⁶⁷⁸⁹⁻", 46],
  ["csvxyz", 53],
  ["mwMWOQ%", 86],
  ["ABCDGHKNRUVXY0", 70],
];
const OTHERS = 61;
/** Advance of the mono, with the letter spacing of an axis. */
const FIGURE_WIDTH = 63;

/** Width in px, never less than the site's fonts draw it; a fallback font may run a little wider. */
export function textWidth(text: string, sizePx: number, hand: Hand = "text"): number {
  let hundredths = 0;
  for (const letter of text) {
    hundredths +=
      hand === "figures" ? FIGURE_WIDTH : (WIDTHS.find(([letters]) => letters.includes(letter))?.[1] ?? OTHERS);
  }
  return (hundredths * sizePx) / 100;
}

/** Words on as few lines as a width allows; a word wider than that stands alone. No-break spaces hold. */
export function wrapWords(text: string, widthPx: number, sizePx: number, hand: Hand = "text"): string[] {
  const lines: string[] = [];
  for (const word of text.split(" ")) {
    const last = lines.at(-1);
    const longer = last === undefined ? word : `${last} ${word}`;
    if (last === undefined || textWidth(longer, sizePx, hand) > widthPx) lines.push(word);
    else lines[lines.length - 1] = longer;
  }
  return lines;
}
