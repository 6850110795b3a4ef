/** Ranges of energies as people write them: two ends, and how many steps or how wide a step. */
import { wavelengthM } from "#src/lib/physics/index.ts";
import { QuantityError } from "./errors.ts";
import { factorOf, parseQuantity, scanQuantity, unitError } from "./parse.ts";
import { MAX_ENERGIES, tooMany } from "./too-many.ts";

const DEFAULT_STEPS = 50;
/** A longer text is a list: two ends and a step need far less. */
const RANGE_CHARACTERS = 200;

interface Words {
  readonly text: string;
  /** Where it begins in the whole text, from 0. */
  readonly offset: number;
}

export interface WrittenRange {
  readonly from: Words;
  readonly to: Words;
  /** Number of intervals, or null where a step or nothing is written. */
  readonly steps: { readonly count: number; readonly position: number } | null;
  readonly step: Words | null;
}

// "to" between spaces, a dash, two or three dots; a hyphen right after a number or unit, or with spaces on both sides: elsewhere
// it is a sign or part of an exponent.
const SEPARATOR = /\s+to\s+|\s*(?:–|—|…|\.{2,3})\s*|\s+[-−]\s+|([^\seE,;])[-−](?=[\d.])/i;
// ", 200 points", "in 200 steps", "in 200"; a hundred digits are as good as a number that is too large.
const COUNT = /(?:\s+in|,|(?=\s\d+\s*(?:steps?|points?)$))\s*(\d+)\s*(steps?|points?)?$/i;
const STEP = /[\s,]\s*(?:steps?(?:\s+of)?|by|every)\s+(\S.*)$/i;

/** The parts of a range, or null where the text is not one. */
export function splitRange(text: string): WrittenRange | null {
  if (text.length > RANGE_CHARACTERS) return null;
  const end = text.trimEnd();
  const separator = SEPARATOR.exec(end);
  if (!separator) return null;
  const from = { text: end.slice(0, separator.index) + (separator[1] ?? ""), offset: 0 };
  if (from.text.trim() === "") return null;
  const offset = separator.index + separator[0].length;
  const rest = end.slice(offset);
  const count = COUNT.exec(rest);
  const step = count ? null : STEP.exec(rest);
  const to = { text: rest.slice(0, (count ?? step)?.index), offset };
  // More entries beside it: a list, which says itself what it cannot read.
  if (/[;\n\r\t]|,(?!\d)/.test(from.text + to.text)) return null;
  return {
    from,
    to,
    steps: count ? stepsOf(count[1] as string, /^p/i.test(count[2] ?? ""), offset + count.index + 1) : null,
    step: step
      ? { text: step[1] as string, offset: offset + step.index + step[0].length - (step[1] as string).length }
      : null,
  };
}

/** n points lie at the ends of n − 1 steps. */
function stepsOf(digits: string, arePoints: boolean, position: number): { count: number; position: number } {
  return { count: Number(digits) - (arePoints ? 1 : 0), position };
}

/** @returns energies in eV, both ends included where the step fits */
export function parseRange({ from, to, steps, step }: WrittenRange, defaultUnit: string): number[] {
  const toScan = scanQuantity(to.text, to.offset);
  const fromScan = scanQuantity(from.text, from.offset);
  const unit = toScan.unit || fromScan.unit || defaultUnit;
  const toEv = parseQuantity(to.text, "energy", { defaultUnit: unit }, to.offset);
  const fromEv = parseQuantity(from.text, "energy", { defaultUnit: unit }, from.offset);
  if (fromEv === toEv)
    throw reversed("The range begins and ends at the same energy. Write one energy alone.", toScan.position);
  // A range of wavelengths rises while its energies fall; both are taken as written.
  const isWavelength = factorOf(unit, "energy") === null;
  if (fromEv > toEv !== isWavelength) {
    throw reversed(
      `${from.text.trim()} to ${to.text.trim()} runs downwards. Write the smaller value first.`,
      fromScan.position,
    );
  }
  if (step) return byStep(fromEv, toEv, step, unit);
  return byCount(fromEv, toEv, steps ?? { count: DEFAULT_STEPS, position: 1 });
}

function byCount(fromEv: number, toEv: number, { count, position }: { count: number; position: number }): number[] {
  if (count < 1)
    throw new QuantityError({ code: "stepNotPositive", position, message: "A range needs at least one step." });
  if (!(count + 1 <= MAX_ENERGIES)) throw tooMany(count + 1, position);
  return Array.from({ length: count + 1 }, (_, index) => {
    if (index === 0) return fromEv;
    return index === count ? toEv : Number((fromEv * (toEv / fromEv) ** (index / count)).toPrecision(7));
  });
}

/** Even steps in the range's unit; a step may be written in another unit of the same kind. */
function byStep(fromEv: number, toEv: number, words: Words, unit: string): number[] {
  const { value, unit: own, position, unitPosition } = scanQuantity(words.text, words.offset);
  const dimension = factorOf(unit, "energy") === null ? "length" : "energy";
  const factor = factorOf(unit, dimension) as number;
  const stepFactor = own === "" ? factor : factorOf(own, dimension);
  if (stepFactor === null) throw unitError(own, dimension, unitPosition);
  if (!(value > 0)) {
    throw new QuantityError({
      code: "stepNotPositive",
      position,
      message: `A step of ${words.text.trim().slice(0, 20)} leads nowhere. Write one above 0.`,
    });
  }
  const inUnit = (energyEv: number): number =>
    tidy((dimension === "energy" ? energyEv : wavelengthM(energyEv)) / factor);
  const [start, end, step] = [inUnit(fromEv), inUnit(toEv), (value * stepFactor) / factor];
  const count = Math.floor((end - start) / step + 1e-9);
  if (!(count + 1 <= MAX_ENERGIES)) throw tooMany(count + 1, position);
  return Array.from({ length: count + 1 }, (_, index) =>
    parseQuantity(`${tidy(start + index * step)} ${unit}`, "energy", { defaultUnit: unit }),
  );
}

// 5 + 7 × 0.1 must read 5.7.
const tidy = (value: number): number => Number(value.toPrecision(12));

const reversed = (message: string, position: number): QuantityError =>
  new QuantityError({ code: "rangeReversed", position, message });
