/**
 * The units that people may write, by dimension, with their factor to the SI unit (energies: to eV). A small table instead of
 * a units library in the browser, which would weigh more than the rest of the page; a test holds every factor to mathjs.
 */

export type Dimension = "energy" | "length" | "density" | "fraction" | "concentration" | "dose" | "time" | "flux";

interface UnitEntry {
  readonly factor: number;
  /** Spelling for mathjs, for the test; null where it has no such unit. */
  readonly mathjs: string | null;
  /** True for a second spelling, which is read but not offered. */
  readonly again: boolean;
}

const unit = (factor: number, mathjs: string | null): UnitEntry => ({ factor, mathjs, again: false });
const again = (factor: number, mathjs: string | null): UnitEntry => ({ factor, mathjs, again: true });

/** By dimension, in the order they are offered in messages. Spellings are folded first (foldUnit). */
export const UNITS: Readonly<Record<Dimension, Readonly<Record<string, UnitEntry>>>> = {
  energy: {
    keV: unit(1e3, "keV"),
    eV: unit(1, "eV"),
    MeV: unit(1e6, "MeV"),
  },
  length: {
    mm: unit(1e-3, "mm"),
    µm: unit(1e-6, "um"),
    um: again(1e-6, "um"),
    nm: unit(1e-9, "nm"),
    Å: unit(1e-10, "angstrom"),
    A: again(1e-10, "angstrom"),
    angstrom: again(1e-10, "angstrom"),
    pm: unit(1e-12, "pm"),
    cm: unit(1e-2, "cm"),
    m: unit(1, "m"),
  },
  density: {
    "g/cm3": unit(1e3, "g/cm^3"),
    "g/cc": again(1e3, "g/cc"),
    "g/mL": unit(1e3, "g/ml"),
    "kg/m3": unit(1, "kg/m^3"),
    "mg/cm3": unit(1, "mg/cm^3"),
    "kg/L": unit(1e3, "kg/l"),
  },
  fraction: {
    "%": unit(1e-2, null),
    "": again(1, null),
  },
  concentration: {
    "mg/mL": unit(1, "mg/ml"),
    "g/L": unit(1, "g/l"),
    "g/mL": unit(1e3, "g/ml"),
  },
  dose: {
    Gy: unit(1, null),
    mGy: unit(1e-3, null),
    µGy: unit(1e-6, null),
    uGy: again(1e-6, null),
    kGy: unit(1e3, null),
    MGy: unit(1e6, null),
  },
  time: {
    s: unit(1, "s"),
    ms: unit(1e-3, "ms"),
    min: unit(60, "minute"),
    h: unit(3600, "hour"),
  },
  /** Photons per second and m². */
  flux: {
    "/s/mm2": unit(1e6, null),
    "1/s/mm2": again(1e6, null),
    "/(smm2)": again(1e6, null),
    "/s/cm2": unit(1e4, null),
    "/s/m2": unit(1, null),
    "/s/µm2": unit(1e12, null),
    "/s/um2": again(1e12, null),
  },
};

/** Units that are never read, known only so that a message can say what they measure. */
export const FOREIGN_UNITS: Readonly<Record<string, string>> = {
  kg: "mass",
  g: "mass",
  mg: "mass",
  L: "volume",
  mL: "volume",
  K: "temperature",
  "°C": "temperature",
  Sv: "dose equivalent",
  Hz: "frequency",
};

/**
 * One spelling for every way a unit is written: superscripts, carets, negative powers, micro and ångström signs, litres, and
 * the letters of keV and eV in any case, which mean nothing else (MeV and meV would).
 */
export function foldUnit(written: string): string {
  const plain = written
    .replace(/\u03bc/g, "µ")
    .replace(/\u212b/g, "Å")
    .replace(/\^|\*\*/g, "")
    .replace(/[²³⁻]/g, (sign) => ({ "²": "2", "³": "3" })[sign] ?? "-")
    .replace(/[\s·⋅]+/g, "")
    .replace(/(c?m)-3$/, "/$13")
    .replace(/(m?[lL])-1$/, "/$1");
  if (/^k?ev$/i.test(plain)) return plain.length === 3 ? "keV" : "eV";
  return plain.replace(/(^|\/)ml$/, "$1mL").replace(/(^|\/)l$/, "$1L");
}

/** The spellings that messages offer. */
export const unitNames = (dimension: Dimension): string[] =>
  dimension === "energy"
    ? ["keV", "eV", "Å", "nm"]
    : Object.entries(UNITS[dimension]).flatMap(([name, entry]) => (entry.again ? [] : [name]));
