/**
 * What a person asks of the plan page, as text in the address: a link reproduces the plan. Every field may be left out.
 * Nothing here judges the text; read-question.ts does.
 */
import { DEFAULT_TABULATION, TABULATION_KEYS, type TabulationKey } from "#src/lib/physics/index.ts";
import { OBJECTIVES, SHAPES, USES } from "#src/lib/schemas/plan-choices.ts";
import { MIXTURE_BASES, type MixtureBasisChoice } from "#src/lib/lookup/question.ts";

export type Shape = (typeof SHAPES)[number];
export type Use = (typeof USES)[number];
export type Objective = (typeof OBJECTIVES)[number];

/** A setup typed in for this plan only. */
export const OWN_SETUP = "own";

export interface PlanQuestion {
  readonly shape: Shape;
  /** Diameter of a sphere or fibre, depth of a layer along the beam, with a unit. */
  readonly size: string;
  /** Visible length of a fibre or layer; empty: five times the size. */
  readonly length: string;
  /** Of a layer, across the beam. */
  readonly width: string;
  /** Handbook id or name, or a formula; a recipe (lookup/recipe.ts) stands for it where it is not empty. */
  readonly feature: string;
  readonly featureDensity: string;
  readonly featureParts: string;
  readonly featureBy: MixtureBasisChoice;
  readonly host: string;
  readonly hostDensity: string;
  readonly hostParts: string;
  readonly hostBy: MixtureBasisChoice;
  readonly thickness: string;
  /** One a line, in beam order: `before; 1 mm; polypropylene; density`, or `after; …`; the density may be left out. */
  readonly layers: string;
  /** Id of an example setup, or `own`. */
  readonly setup: string;
  /** Own setup: source distance with a unit, or `parallel`. */
  readonly source: string;
  readonly sourceSize: string;
  readonly blur: string;
  readonly pixel: string;
  /** Empty: the default screen; `100 %`: that share of photons; `Lu3Al5O12; 20 um; 6.73 g/cm3`: a screen. */
  readonly screen: string;
  readonly bandwidth: string;
  /** Photons per second and mm², such as `1e9`, or rows `energy; flux`; empty: not known. */
  readonly flux: string;
  /** Range or list; empty: the setup's. */
  readonly energies: string;
  readonly distances: string;
  readonly use: Use;
  readonly projections: string;
  readonly nearField: string;
  readonly dose: string;
  readonly time: string;
  /** Transmission allowed, such as `10 to 90 %`; empty: any. */
  readonly pass: string;
  readonly threshold: string;
  readonly counts: string;
  /** Empty: dose where the host holds hydrogen, otherwise time or fluence. */
  readonly objective: Objective | "";
  readonly table: TabulationKey;
}

export type PlanField = keyof PlanQuestion;

export const DEFAULT_PLAN: PlanQuestion = {
  shape: "fibre",
  size: "20 um",
  length: "",
  width: "",
  feature: "pmma",
  featureDensity: "",
  featureParts: "",
  featureBy: "mass",
  host: "water",
  hostDensity: "",
  hostParts: "",
  hostBy: "mass",
  thickness: "5 mm",
  layers: "",
  setup: "fine-parallel",
  source: "parallel",
  sourceSize: "50 um",
  blur: "2 um",
  pixel: "1 um",
  screen: "",
  bandwidth: "",
  flux: "",
  energies: "",
  distances: "",
  use: "direct",
  projections: "",
  nearField: "",
  dose: "",
  time: "",
  pass: "",
  threshold: "",
  counts: "",
  objective: "",
  table: DEFAULT_TABULATION,
};

/** Longest text of one field; the address as a whole is limited to 8 KiB. */
export const FIELD_CHARACTERS = 4000;
/** Addresses up to this length are taken; a longer plan says that it is too long to link. */
export const ADDRESS_CHARACTERS = 8000;

function oneOf<T extends string>(choices: readonly T[], value: string | null, otherwise: T): T {
  return choices.find((choice) => choice === value) ?? otherwise;
}

const CHOICES = {
  shape: SHAPES,
  featureBy: MIXTURE_BASES,
  hostBy: MIXTURE_BASES,
  use: USES,
  objective: [...OBJECTIVES, ""],
  table: TABULATION_KEYS,
} as const;
/** Fields of several lines, whose line ends count. */
const LINES: ReadonlySet<string> = new Set(["featureParts", "hostParts", "layers", "flux"]);

/** Reads the address. Unknown keys are ignored, unknown choices fall back to the default. */
export function readPlanQuestion(query: URLSearchParams): PlanQuestion {
  const fields = Object.keys(DEFAULT_PLAN).map((key) => {
    const field = key as PlanField;
    const given = query.get(field);
    const otherwise = DEFAULT_PLAN[field];
    if (Object.hasOwn(CHOICES, field))
      return [field, oneOf<string>(CHOICES[field as keyof typeof CHOICES], given, otherwise)];
    const text = (given ?? otherwise).slice(0, FIELD_CHARACTERS).replace(/\r\n?/g, "\n");
    return [field, LINES.has(field) ? text : text.trim()];
  });
  return Object.fromEntries(fields) as PlanQuestion;
}

/** The address's query for a plan: what differs from the defaults; feature, host and setup always. */
export function writePlanQuestion(question: PlanQuestion): URLSearchParams {
  const query = new URLSearchParams();
  for (const key of Object.keys(DEFAULT_PLAN) as PlanField[]) {
    const value = question[key];
    const always = key === "feature" || key === "host" || key === "setup";
    if (always || value !== DEFAULT_PLAN[key]) query.set(key, value);
  }
  return query;
}

/** One of the layers as it stands in the question. */
export interface LayerLine {
  readonly position: "before" | "after";
  readonly thickness: string;
  readonly material: string;
  readonly density: string;
}

export function readLayerLines(text: string): LayerLine[] {
  return text
    .split("\n")
    .filter((line) => line.trim() !== "")
    .map((line) => {
      const [position = "", thickness = "", material = "", density = ""] = line
        .split(/[;\t]/)
        .map((field) => field.trim());
      return { position: position.toLowerCase() === "after" ? "after" : "before", thickness, material, density };
    });
}

export function writeLayerLines(lines: readonly LayerLine[]): string {
  return lines
    .map(({ position, thickness, material, density }) =>
      [position, thickness, material, ...(density === "" ? [] : [density])].join("; "),
    )
    .join("\n");
}

/** Words of the question that may name a kept material, each once. */
export function namedWords({ feature, host, featureParts, hostParts, layers, screen }: PlanQuestion): string[] {
  const words = [feature, host, featureParts, hostParts, layers, screen]
    .flatMap((text) => text.split(/[;\n\t]/))
    .map((word) => word.trim());
  return [...new Set(words)].filter((word) => word !== "");
}
