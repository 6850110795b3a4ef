/**
 * What a person asks of the constants pages, as text in the address: a link reproduces the view. Every field may be left out.
 * Nothing here judges the text; answer.ts does.
 */
import { DEFAULT_TABULATION, TABULATION_KEYS, type TabulationKey } from "#src/lib/physics/index.ts";

export const MIXTURE_BASES = ["mass", "volume", "mole", "concentration"] as const;
export type MixtureBasisChoice = (typeof MIXTURE_BASES)[number];

export const CURVES = ["delta-beta", "attenuation", "ratio", "pair-contrast", "pair-gamma"] as const;
export type Curve = (typeof CURVES)[number];

export interface Question {
  /** Handbook id or name, or a formula. */
  readonly material: string;
  /** With a unit, or in g/cm³; empty: the handbook's, or estimated for a mixture. */
  readonly density: string;
  /** A recipe, one part a line (recipe.ts); where it is not empty it stands for the material. */
  readonly parts: string;
  readonly by: MixtureBasisChoice;
  /** Share of the volume that is solid; empty: all. */
  readonly solid: string;
  readonly energy: string;
  /** Energies of the table: a list, a pasted column or a range. */
  readonly list: string;
  /** Further materials, one a line: name; formula; density. */
  readonly with: string;
  readonly table: TabulationKey;
  readonly curve: Curve;
  readonly from: string;
  readonly to: string;
  readonly thickness: string;
  /** Wanted transmission. */
  readonly pass: string;
}

export const DEFAULT_QUESTION: Question = {
  material: "pmma",
  density: "",
  parts: "",
  by: "mass",
  solid: "",
  energy: "20 keV",
  list: "8, 12, 16, 20, 25, 30, 40, 60 keV",
  with: "",
  table: DEFAULT_TABULATION,
  curve: "delta-beta",
  from: "5 keV",
  to: "100 keV",
  thickness: "5 mm",
  pass: "20 %",
};

/** Longest text of one field; the address as a whole is limited to 8 KiB. */
export const FIELD_CHARACTERS = 4000;

function oneOf<T extends string>(choices: readonly T[], value: string | null, otherwise: T): T {
  return choices.find((choice) => choice === value) ?? otherwise;
}

/** Reads the address. Unknown keys are ignored, unknown choices fall back to the default. */
export function readQuestion(query: URLSearchParams): Question {
  const text = (key: keyof Question): string =>
    (query.get(key) ?? DEFAULT_QUESTION[key]).slice(0, FIELD_CHARACTERS).replace(/\r\n?/g, "\n");
  // A recipe or another material without its own density must not inherit one: only the fields sent are taken.
  return {
    material: text("material").trim(),
    density: text("density").trim(),
    parts: text("parts"),
    by: oneOf(MIXTURE_BASES, query.get("by"), DEFAULT_QUESTION.by),
    solid: text("solid").trim(),
    energy: text("energy").trim(),
    list: text("list").trim(),
    with: text("with"),
    table: oneOf(TABULATION_KEYS, query.get("table"), DEFAULT_QUESTION.table),
    curve: oneOf(CURVES, query.get("curve"), DEFAULT_QUESTION.curve),
    from: text("from").trim(),
    to: text("to").trim(),
    thickness: text("thickness").trim(),
    pass: text("pass").trim(),
  };
}

/** The address's query for a question: only what differs from the defaults, the material always. */
export function writeQuestion(question: Question): URLSearchParams {
  const query = new URLSearchParams();
  for (const key of Object.keys(DEFAULT_QUESTION) as (keyof Question)[]) {
    const value = question[key];
    if (key === "material" ? question.parts.trim() === "" : value !== DEFAULT_QUESTION[key]) query.set(key, value);
  }
  return query;
}
