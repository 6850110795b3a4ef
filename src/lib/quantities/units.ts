/**
 * The units that people may write, by dimension, with their factor to the SI unit (energies: to eV). A small table instead of
 * a units library in the browser, which would weigh more than the rest of the page; a test holds every factor to mathjs.
 */

export type Dimension = "energy" | "length" | "density" | "fraction" | "concentration";

interface UnitEntry {
  readonly factor: number;
  /** Spelling for mathjs, for the test; null where it has no such unit. */
  readonly mathjs: string | null;
}

const unit = (factor: number, mathjs: string | null): UnitEntry => ({ factor, mathjs });

/** By dimension, in the order they are offered in messages. µ (U+00B5), μ (U+03BC), Å (U+00C5 and U+212B) are folded first. */
export const UNITS: Readonly<Record<Dimension, Readonly<Record<string, UnitEntry>>>> = {
  energy: {
    keV: unit(1e3, "keV"),
    eV: unit(1, "eV"),
    MeV: unit(1e6, "MeV"),
  },
  length: {
    mm: unit(1e-3, "mm"),
    µm: unit(1e-6, "um"),
    um: unit(1e-6, "um"),
    nm: unit(1e-9, "nm"),
    Å: unit(1e-10, "angstrom"),
    A: unit(1e-10, "angstrom"),
    angstrom: unit(1e-10, "angstrom"),
    pm: unit(1e-12, "pm"),
    cm: unit(1e-2, "cm"),
    m: unit(1, "m"),
  },
  density: {
    "g/cm3": unit(1e3, "g/cm^3"),
    "g/cc": unit(1e3, "g/cc"),
    "g/mL": unit(1e3, "g/ml"),
    "kg/m3": unit(1, "kg/m^3"),
    "mg/cm3": unit(1, "mg/cm^3"),
    "kg/L": unit(1e3, "kg/l"),
  },
  fraction: {
    "%": unit(1e-2, null),
    "": unit(1, null),
  },
  concentration: {
    "mg/mL": unit(1, "mg/ml"),
    "g/L": unit(1, "g/l"),
    "g/mL": unit(1e3, "g/ml"),
  },
};

/** One spelling for every way a unit is written: superscripts, carets, micro and ångström signs, litres. */
export function foldUnit(written: string): string {
  return written
    .replace(/[\u03bc]/g, "µ")
    .replace(/[\u212b]/g, "Å")
    .replace(/\^|\*\*/g, "")
    .replace(/²/g, "2")
    .replace(/³/g, "3")
    .replace(/\s+/g, "")
    .replace(/ml$/, "mL")
    .replace(/l$/, (end) => (/\/m?l$/.test(written.trim()) ? "L" : end));
}

export const unitNames = (dimension: Dimension): string[] =>
  Object.keys(UNITS[dimension]).filter((name) => name !== "");
