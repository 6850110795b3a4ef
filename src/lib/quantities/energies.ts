/** Energies as people give them: one value, a list, a pasted column, a range. Each entry may carry its own unit. */
import { QuantityError } from "./errors.ts";
import { factorOf, parseQuantity, scanQuantity } from "./parse.ts";
import { parseRange, splitRange } from "./range.ts";
import { MAX_ENERGIES, tooMany } from "./too-many.ts";

/** Longest text of a list. */
const LIST_CHARACTERS = 64 * MAX_ENERGIES;

export interface Energies {
  readonly energiesEv: readonly number[];
  readonly kind: "single" | "list" | "range";
}

interface Entry {
  words: string;
  /** Where it begins in the whole text, from 0. */
  readonly offset: number;
}

/**
 * "24 keV"; "12, 18, 24 keV", or lines of a column with or without its heading; "5 to 60 keV", "5–60 keV in 200 steps",
 * "5 to 60 keV, 111 points", "5 to 60 keV step 0.5". A unit holds for the entries before it that have none. A range without
 * steps has 50, spaced evenly in log energy; with a step it is even in the unit written. Order and repeats are kept.
 * @returns at most 2,000 finite energies above 0, in eV
 * @throws QuantityError
 */
export function parseEnergies(text: string, options: { defaultUnit: string }): Energies {
  if (text.length > LIST_CHARACTERS) {
    throw new QuantityError({
      code: "tooLong",
      position: LIST_CHARACTERS + 1,
      message: `The list is too long. At most ${MAX_ENERGIES} energies are taken.`,
    });
  }
  const range = splitRange(text);
  if (range) return { energiesEv: parseRange(range, options.defaultUnit), kind: "range" };
  return parseList(text, options.defaultUnit);
}

function parseList(text: string, defaultUnit: string): Energies {
  refuseDecimalComma(text);
  const entries: Entry[] = [];
  let heading = true;
  let unit = defaultUnit;
  for (const match of text.matchAll(/[^,;\n\r\t]+/g)) {
    if (match[0].trim() === "") continue;
    const named = heading ? unitOfHeading(match[0]) : null;
    heading = false;
    if (named !== null) unit = named;
    else for (const entry of splitAtNumbers(match[0], match.index)) entries.push(entry);
    if (entries.length > MAX_ENERGIES) throw tooMany(null, match.index + 1);
  }
  if (entries.length === 0)
    throw new QuantityError({ code: "empty", position: 1, message: "No energy is written. Write one such as 20 keV." });
  // Backwards, so that "8, 12, 20 eV" is read in eV throughout.
  const energiesEv: number[] = [];
  for (const { words, offset } of entries.toReversed()) {
    refuseThousands(words, offset);
    unit = scanQuantity(words, offset).unit || unit;
    energiesEv.push(parseQuantity(words, "energy", { defaultUnit: unit }, offset));
  }
  return { energiesEv: energiesEv.reverse(), kind: entries.length === 1 ? "single" : "list" };
}

/** "2,7" without a space is a decimal comma, not two entries; "12,18,24" is a list. */
function refuseDecimalComma(text: string): void {
  const comma = /(^|[\s;])([+\-−]?\d{1,16}),(\d{1,16})(?![\d,.])/.exec(text);
  if (!comma) return;
  throw new QuantityError({
    code: "decimalComma",
    position: comma.index + (comma[1] as string).length + 1,
    message: `Write ${comma[2]}.${comma[3]} with a point, or put a space after a comma between two energies.`,
  });
}

/** "000" after a space is the end of 10 000, not an energy. */
function refuseThousands(words: string, offset: number): void {
  if (!/^0\d\d(\D|$)/.test(words)) return;
  throw new QuantityError({
    code: "notANumber",
    position: offset + 1,
    message: "A space parts two energies. Write thousands without one, such as 10000 eV.",
  });
}

/** The unit that a column's heading names: "keV", "E (keV)", "Energy [eV]"; or null where the words are no heading. */
function unitOfHeading(words: string): string | null {
  const plain = words.trim();
  if (/\d/.test(plain) || plain.length > 64) return null;
  const unit = /[([]([^()[\]]{1,16})[)\]]$/.exec(plain)?.[1] ?? plain;
  return factorOf(unit, "energy") === null && factorOf(unit, "length") === null ? null : unit.trim();
}

/** "8 12 20 keV": numbers parted by spaces alone; a unit belongs to the number before it. */
function splitAtNumbers(words: string, offset: number): Entry[] {
  const parts: Entry[] = [];
  for (const match of words.matchAll(/\S+/g)) {
    const last = parts.at(-1);
    if (last && !/^[+\-−]?\.?\d/.test(match[0])) last.words += ` ${match[0]}`;
    else parts.push({ words: match[0], offset: offset + match.index });
  }
  return parts;
}
