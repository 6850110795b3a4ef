/** Text with a unit, as people write it, to a number in SI (energies in eV). One scanner, no expression is ever evaluated. */
import { energyEvFromWavelength } from "#src/lib/physics/index.ts";
import { QuantityError } from "./errors.ts";
import { type Dimension, foldUnit, unitNames, UNITS } from "./units.ts";

/** Longest text of one quantity. */
export const QUANTITY_CHARACTERS = 64;

interface Scanned {
  readonly value: number;
  readonly unit: string;
  /** From 1. */
  readonly unitPosition: number;
}

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,4})?/;

/** What follows the number in a written quantity; empty where nothing does. */
export function unitOf(text: string): string {
  return text.trim().replace(/−/g, "-").replace(NUMBER, "").trim();
}

/** A number and the rest as its unit. `offset` is where the text stands in what was written, for positions. */
function scan(text: string, offset: number): Scanned {
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
  if (/[\p{Nd}]/u.test(plain.replace(/[0-9]/g, ""))) {
    throw new QuantityError({
      code: "foreignDigits",
      position,
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
  const number = NUMBER.exec(plain)?.[0];
  if (number === undefined)
    throw new QuantityError({
      code: "notANumber",
      position,
      message: `“${shorten(plain)}” does not begin with a number. Write for example 20.`,
    });
  const value = Number(number);
  if (!Number.isFinite(value))
    throw new QuantityError({ code: "notFinite", position, message: `${number} is too large to be a number here.` });
  if (value === 0 && /[1-9]/.test(number.split(/[eE]/)[0] ?? "")) {
    throw new QuantityError({ code: "underflow", position, message: `${number} is too small: it would become 0.` });
  }
  return { value, unit: plain.slice(number.length).trim(), unitPosition: position + number.length };
}

const shorten = (text: string): string => (text.length > 24 ? `${text.slice(0, 23)}…` : text);

/**
 * One quantity: "1.19 g/cm3", "20 µm", "20 %", "50 mg/mL", "8.05 keV". Without a unit the default is taken; a fraction written
 * as a bare number up to 1 is a fraction, above it a percentage of the default. Energies also come as wavelengths.
 * Signs and zero pass: whether they make sense is the caller's to say, except for energies, which are above 0.
 * @throws QuantityError
 */
export function parseQuantity(
  text: string,
  dimension: Dimension,
  options: { defaultUnit: string },
  offset = 0,
): number {
  const { value, unit, unitPosition } = scan(text, offset);
  if (dimension === "energy") return energyEv(value, unit === "" ? options.defaultUnit : unit, unitPosition);
  if (dimension === "fraction" && unit === "" && value <= 1) return value;
  const name = unit === "" ? options.defaultUnit : foldUnit(unit);
  const entry = Object.hasOwn(UNITS[dimension], name) ? UNITS[dimension][name] : undefined;
  if (!entry) throw unitError(unit, dimension, unitPosition);
  return value * entry.factor;
}

function energyEv(value: number, written: string, position: number): number {
  const name = foldUnit(written);
  const asEnergy = Object.hasOwn(UNITS.energy, name) ? UNITS.energy[name] : undefined;
  const asLength = Object.hasOwn(UNITS.length, name) ? UNITS.length[name] : undefined;
  const entry = asEnergy ?? asLength;
  if (!entry) throw unitError(written, "energy", position);
  if (!(value > 0))
    throw new QuantityError({
      code: "notPositive",
      position: 1,
      message: `${value} ${shorten(written)} is not a photon's. Energies and wavelengths are above 0.`,
    });
  const energy = asEnergy ? value * asEnergy.factor : energyEvFromWavelength(value * entry.factor);
  if (!Number.isFinite(energy) || energy === 0)
    throw new QuantityError({
      code: "notFinite",
      position: 1,
      message: "That energy is beyond what a number can hold.",
    });
  // 0.1 + 0.2 must not show: written values have far fewer digits.
  return Number(energy.toPrecision(14));
}

function unitError(written: string, dimension: Dimension, position: number): QuantityError {
  const accepted = dimension === "energy" ? ["keV", "eV", "Å", "nm"] : unitNames(dimension);
  const name = foldUnit(written);
  const other = (Object.keys(UNITS) as Dimension[]).find(
    (candidate) => candidate !== dimension && Object.hasOwn(UNITS[candidate], name),
  );
  return other
    ? new QuantityError({
        code: "wrongDimension",
        position,
        message: `${shorten(written)} is a unit of ${other}. Accepted are ${accepted.join(", ")}.`,
      })
    : new QuantityError({
        code: "unknownUnit",
        position,
        message: `“${shorten(written)}” is not a unit that is read here. Accepted are ${accepted.join(", ")}.`,
      });
}
