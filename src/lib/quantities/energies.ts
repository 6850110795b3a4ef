/** Energies as people give them: one value, a list, a pasted column, a range. Each entry may carry its own unit. */
import { QuantityError } from "./errors.ts";
import { parseQuantity, unitOf } from "./parse.ts";

/** Most energies of one list. */
export const MAX_ENERGIES = 2000;
const DEFAULT_STEPS = 50;
/** Longest text of a list. */
const LIST_CHARACTERS = 64 * MAX_ENERGIES;

export interface Energies {
  readonly energiesEv: readonly number[];
  readonly kind: "single" | "list" | "range";
}

/**
 * "24 keV"; "12, 18, 24 keV" or lines of a column; "5 to 60 keV", "5 to 60 keV in 200 steps", "5 to 60 keV step 0.5".
 * A unit at the end holds for the entries before it that have none. A range without steps has 50, spaced evenly in log
 * energy; with a step it is even in the unit written. Order and repeats are kept.
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
  const range = /^\s*(\S+(?: ?[^\s\d.,;]+)?)\s*(?:\bto\b|–|—|\.\.|…)\s*(\S.*?)\s*$/is.exec(text);
  if (range && !/[,;\n\t]/.test(text.trim().replace(/\d,\d/g, "")))
    return parseRange(range[1] ?? "", range[2] ?? "", options.defaultUnit);
  return parseList(text, options.defaultUnit);
}

function parseList(text: string, defaultUnit: string): Energies {
  // "2,7" without a space is a decimal comma, not two entries.
  const comma = /(?:^|[\s;])(\d+),(\d+)(?=$|[\s;a-zA-ZÅµμ])/.exec(text);
  if (comma && !/\d,\d+,\d/.test(text)) {
    throw new QuantityError({
      code: "decimalComma",
      position: comma.index + 1,
      message: `Write ${comma[1]}.${comma[2]} with a point, or put a space after a comma between two energies.`,
    });
  }
  const entries: { words: string; offset: number }[] = [];
  for (const match of text.matchAll(/[^,;\n\t]+/g)) {
    if (match[0].trim() !== "") entries.push({ words: match[0], offset: match.index });
    if (entries.length > MAX_ENERGIES)
      throw new QuantityError({
        code: "tooMany",
        position: match.index + 1,
        message: `More than ${MAX_ENERGIES} energies. Take fewer, or a coarser range.`,
      });
  }
  const spread = entries.flatMap(splitBySpaces);
  if (spread.length > MAX_ENERGIES)
    throw new QuantityError({
      code: "tooMany",
      position: 1,
      message: `More than ${MAX_ENERGIES} energies. Take fewer, or a coarser range.`,
    });
  if (spread.length === 0)
    throw new QuantityError({ code: "empty", position: 1, message: "No energy is written. Write one such as 20 keV." });
  // Backwards, so that "8, 12, 20 eV" is read in eV throughout.
  let unit = defaultUnit;
  const energiesEv: number[] = [];
  for (const { words, offset } of spread.toReversed()) {
    const own = unitOf(words);
    if (own !== "") unit = own;
    energiesEv.push(parseQuantity(words, "energy", { defaultUnit: unit }, offset));
  }
  return { energiesEv: energiesEv.reverse(), kind: spread.length === 1 ? "single" : "list" };
}

/** "8 12 20 keV": numbers parted by spaces alone; a unit belongs to the number before it. */
function splitBySpaces({ words, offset }: { words: string; offset: number }): { words: string; offset: number }[] {
  const parts: { words: string; offset: number }[] = [];
  for (const match of words.matchAll(/\S+/g)) {
    const last = parts.at(-1);
    if (last && !/^[+\-−]?[\d.]/.test(match[0])) last.words += ` ${match[0]}`;
    else parts.push({ words: match[0], offset: offset + match.index });
  }
  return parts;
}

function parseRange(fromText: string, rest: string, defaultUnit: string): Energies {
  const steps = /^(.*?)(?:\s+in\s+(\d{1,12})\s*(?:steps?|points?)?|\s+steps?\s+(?:of\s+)?(\S.*))$/i.exec(rest);
  const toText = (steps?.[1] ?? rest).trim();
  const toUnit = unitOf(toText) || defaultUnit;
  const from = parseQuantity(fromText, "energy", { defaultUnit: toUnit });
  const to = parseQuantity(toText, "energy", { defaultUnit: toUnit });
  if (from === to)
    throw new QuantityError({
      code: "rangeReversed",
      position: 1,
      message: "The range begins and ends at the same energy. Write one energy alone.",
    });
  // A range of wavelengths rises while its energies fall; both are taken as written. In energies the start must be below the end.
  const isWavelength = !/eV$/i.test(toUnit.trim());
  if (from > to !== isWavelength)
    throw new QuantityError({
      code: "rangeReversed",
      position: 1,
      message: `${fromText.trim()} to ${toText} runs downwards. Write the smaller value first.`,
    });
  return {
    energiesEv: steps?.[3] === undefined ? byCount(from, to, steps?.[2]) : byStep(fromText, toText, steps[3], toUnit),
    kind: "range",
  };
}

function byCount(from: number, to: number, count: string | undefined): number[] {
  const number = count === undefined ? DEFAULT_STEPS : Number(count);
  if (number < 1)
    throw new QuantityError({ code: "stepNotPositive", position: 1, message: "A range needs at least one step." });
  if (number + 1 > MAX_ENERGIES) throw tooMany(number + 1);
  const energies = Array.from({ length: number + 1 }, (_, index) =>
    Number((from * (to / from) ** (index / number)).toPrecision(7)),
  );
  energies[0] = from;
  energies[number] = to;
  return energies;
}

function byStep(fromText: string, toText: string, stepText: string, unit: string): number[] {
  const number = (text: string): number =>
    Number(/^[+\-−]?[\d.]+(?:[eE][+-]?\d+)?/.exec(text.trim().replace(/−/g, "-"))?.[0] ?? "NaN");
  const [start, end, step] = [number(fromText), number(toText), number(stepText)];
  const stepUnit = unitOf(stepText);
  if (stepUnit !== "" && stepUnit !== unit) {
    throw new QuantityError({
      code: "unknownUnit",
      position: 1,
      message: `Write the step in ${unit}, like the range.`,
    });
  }
  if (!(step > 0))
    throw new QuantityError({
      code: "stepNotPositive",
      position: 1,
      message: `A step of ${stepText.trim().slice(0, 20)} leads nowhere. Write one above 0.`,
    });
  const count = Math.floor((end - start) / step + 1e-9);
  if (!(count + 1 <= MAX_ENERGIES)) throw tooMany(count + 1);
  return Array.from({ length: count + 1 }, (_, index) =>
    parseQuantity(`${Number((start + index * step).toPrecision(12))} ${unit}`, "energy", { defaultUnit: unit }),
  );
}

function tooMany(count: number): QuantityError {
  return new QuantityError({
    code: "tooMany",
    position: 1,
    message: `That would be ${count > 1e7 ? "far too many" : count} energies. At most ${MAX_ENERGIES} are taken.`,
  });
}
