/** Text with a unit, as people write it, to a number in SI (energies in eV). One scanner, no expression is ever evaluated. */
import { energyEvFromWavelength } from "#src/lib/physics/index.ts";
import { QuantityError } from "./errors.ts";
import { type Dimension, foldUnit, FOREIGN_UNITS, unitNames, UNITS } from "./units.ts";

/** Longest text of one quantity. */
export const QUANTITY_CHARACTERS = 64;

export interface Scanned {
  readonly value: number;
  /** As written; empty where none is. */
  readonly unit: string;
  /** Where number and unit stand in the whole text, from 1. */
  readonly position: number;
  readonly unitPosition: number;
}

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,4})?/;
// Line breaks and tabs count as spaces.
const INVISIBLE = /(?![\t\n\r])[\p{Cc}\p{Cf}\p{Cs}]/u;

/** A number and the rest as its unit. `offset` is where the text stands in what was written, for positions. @throws QuantityError */
export function scanQuantity(text: string, offset = 0): Scanned {
  const start = text.length - text.trimStart().length;
  const plain = text.trim().replace(/−/g, "-");
  const position = offset + start + 1;
  if (plain === "")
    throw new QuantityError({
      code: "empty",
      position,
      message: "Nothing is written here. Write a number with its unit.",
    });
  if (plain.length > QUANTITY_CHARACTERS) {
    throw new QuantityError({
      code: "tooLong",
      position: position + QUANTITY_CHARACTERS,
      message: `More than ${QUANTITY_CHARACTERS} characters. Write one number with its unit.`,
    });
  }
  refuseCharacters(plain, position);
  const number = NUMBER.exec(plain)?.[0];
  if (number === undefined)
    throw new QuantityError({
      code: "notANumber",
      position,
      message: `“${shorten(plain)}” does not begin with a number. Write for example 20.`,
    });
  const value = Number(number);
  if (!Number.isFinite(value)) throw tooLarge(number, position);
  if (value === 0 && /[1-9]/.test(number.split(/[eE]/)[0] ?? "")) throw tooSmall(number, position);
  const rest = plain.slice(number.length);
  const unit = rest.trim();
  return { value, unit, position, unitPosition: position + number.length + (rest.length - rest.trimStart().length) };
}

function refuseCharacters(plain: string, position: number): void {
  const invisible = INVISIBLE.exec(plain);
  if (invisible) {
    const code = (invisible[0].codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0");
    throw new QuantityError({
      code: "invisibleCharacter",
      position: position + invisible.index,
      message: `An invisible character (U+${code}) stands at ${position + invisible.index}. Delete it, or type the value again.`,
    });
  }
  const foreign = /(?![0-9])\p{Nd}/u.exec(plain);
  if (foreign) {
    throw new QuantityError({
      code: "foreignDigits",
      position: position + foreign.index,
      message: "Digits of another script are not read. Write the digits 0 to 9.",
    });
  }
  const comma = /^[+-]?(\d+),(\d+)/.exec(plain);
  if (comma)
    throw new QuantityError({
      code: "decimalComma",
      position,
      message: `Write ${comma[1]}.${comma[2]}, with a point.`,
    });
}

const shorten = (text: string): string => (text.length > 24 ? `${text.slice(0, 23)}…` : text);

const tooLarge = (number: string, position: number): QuantityError =>
  new QuantityError({ code: "notFinite", position, message: `${shorten(number)} is too large to be a number here.` });
const tooSmall = (number: string, position: number): QuantityError =>
  new QuantityError({ code: "underflow", position, message: `${shorten(number)} is too small: it would become 0.` });

/**
 * One quantity: "1.19 g/cm3", "20 µm", "20 %", "50 mg/mL", "8.05 keV". Without a unit the default is taken; a fraction written
 * as a bare number up to 1 is a fraction, above it a percentage of the default. Energies also come as wavelengths.
 * Signs and zero pass: whether they make sense is the caller's to say, except for energies, which are above 0.
 * @returns a finite number
 * @throws QuantityError
 */
export function parseQuantity(
  text: string,
  dimension: Dimension,
  options: { defaultUnit: string },
  offset = 0,
): number {
  const scanned = scanQuantity(text, offset);
  const { value, unit, position } = scanned;
  if (dimension === "energy") return energyEv(scanned, options.defaultUnit);
  if (dimension === "fraction" && unit === "" && value <= 1) return value;
  const factor = factorOf(unit === "" ? options.defaultUnit : unit, dimension);
  if (factor === null) throw unitError(unit, dimension, scanned.unitPosition);
  return kept(value * factor, value, position, 15);
}

/** Factor of a unit however it is spelt, to SI (energies to eV), or null where the dimension has no such unit. */
export function factorOf(written: string, dimension: Dimension): number | null {
  const name = foldUnit(written);
  return Object.hasOwn(UNITS[dimension], name) ? (UNITS[dimension][name]?.factor ?? null) : null;
}

/** The product's last bits are cut: 20 µm are 0.00002 m. */
function kept(product: number, value: number, position: number, digits: number): number {
  if (!Number.isFinite(product)) throw tooLarge(String(value), position);
  if (product === 0 && value !== 0) throw tooSmall(String(value), position);
  return Number(product.toPrecision(digits));
}

function energyEv({ value, unit, position, unitPosition }: Scanned, defaultUnit: string): number {
  const written = unit === "" ? defaultUnit : unit;
  const asEnergy = factorOf(written, "energy");
  const factor = asEnergy ?? factorOf(written, "length");
  if (factor === null) throw unitError(written, "energy", unitPosition);
  if (!(value > 0))
    throw new QuantityError({
      code: "notPositive",
      position,
      message: `${value} ${shorten(written)} is not a photon's. Energies and wavelengths are above 0.`,
    });
  return kept(asEnergy === null ? energyEvFromWavelength(value * factor) : value * factor, value, position, 14);
}

export function unitError(written: string, dimension: Dimension, position: number): QuantityError {
  const accepted = `Accepted are ${unitNames(dimension).join(", ")}.`;
  const name = foldUnit(written);
  const other = (Object.keys(UNITS) as Dimension[]).find(
    (candidate) => candidate !== dimension && Object.hasOwn(UNITS[candidate], name),
  );
  const measures = other ? other : Object.hasOwn(FOREIGN_UNITS, name) ? FOREIGN_UNITS[name] : undefined;
  return measures === undefined
    ? new QuantityError({
        code: "unknownUnit",
        position,
        message: `“${shorten(written)}” is not a unit that is read here. ${accepted}`,
      })
    : new QuantityError({
        code: "wrongDimension",
        position,
        message: `${shorten(written)} is a unit of ${measures}, not of ${dimension}. ${accepted}`,
      });
}
