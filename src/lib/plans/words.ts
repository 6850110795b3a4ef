/** A plan's question as its sentence reads: every blank in words. A text that cannot be read stands as it was typed. */
import { formulaText } from "#src/lib/format/formula.ts";
import { inSentence } from "#src/lib/format/sentence.ts";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import { readRecipe } from "#src/lib/lookup/recipe.ts";
import { FormulaError, parseFormula } from "#src/lib/physics/index.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import { exampleSetup } from "./examples.ts";
import { layersText } from "./layer-words.ts";
import { OWN_SETUP, type PlanQuestion, readLayerLines, type Shape, type Use } from "./question.ts";
import { distancesText, energiesText, joined, type LiveField, liveReading, offeredRanges } from "./read-live.ts";

export interface PlanWords {
  readonly size: string;
  readonly shape: string;
  readonly feature: string;
  readonly thickness: string;
  readonly host: string;
  /** "between" before layers on both sides or none; else where the host stands. */
  readonly layersLead: string;
  readonly layers: string;
  readonly setup: string;
  readonly energies: string;
  readonly distances: string;
  readonly use: string;
  readonly dose: string;
  readonly time: string;
  /** What differs from the usual and has no blank, such as "detected means 3 times the noise". */
  readonly also: readonly string[];
}

export const SHAPE_WORDS: Readonly<Record<Shape, string>> = { sphere: "spheres", fibre: "fibres", layer: "layers" };

export const USE_WORDS: Readonly<Record<Use, string>> = {
  direct: "looking directly",
  retrieval: "retrieving from one distance",
  tomography: "tomography",
  absorption: "absorption alone",
};

/** @param find a kept material by any of its names, or null */
export function planWords(question: PlanQuestion, find: (words: string) => KnownMaterial | null): PlanWords {
  const read = (field: LiveField, empty: string): string => {
    if (question[field].trim() === "") return empty;
    const reading = liveReading(question, field);
    return reading?.ok ? reading.words : question[field];
  };
  const material = (which: "feature" | "host"): string =>
    question[`${which}Parts`].trim() === ""
      ? materialText(question[which], question[`${which}Density`], find)
      : mixtureText(question[`${which}Parts`], find);
  const layers = layersText(readLayerLines(question.layers), (words) => nameText(words, find));
  const offered = offeredRanges(question.setup);
  return {
    size: read("size", "a size"),
    shape: SHAPE_WORDS[question.shape],
    feature: material("feature"),
    thickness: read("thickness", "a thickness"),
    host: material("host"),
    layersLead: layers.lead,
    layers: layers.text,
    setup: setupText(question),
    energies: read("energies", energiesText(offered.energiesKeV)),
    distances: read("distances", distancesText(offered.distancesM)),
    use: useText(question),
    dose: read("dose", "no dose limit"),
    time: read("time", "no time limit"),
    also: alsoText(question, read),
  };
}

/** A kept material's name, else a formula with its subscripts, else the words as typed. */
function nameText(words: string, find: (words: string) => KnownMaterial | null): string {
  const kept = find(words);
  if (kept) return inSentence(kept.name);
  try {
    return formulaText(parseFormula(words).text);
  } catch (error) {
    if (error instanceof FormulaError) return words;
    throw error;
  }
}

function materialText(words: string, density: string, find: (words: string) => KnownMaterial | null): string {
  if (words.trim() === "") return "a material";
  const name = nameText(words, find);
  return density.trim() === "" ? name : `${name} (${densityText(density)})`;
}

function densityText(text: string): string {
  try {
    return `${Number((parseQuantity(text, "density", { defaultUnit: "g/cm3" }) / 1000).toPrecision(6))}\u00a0g/cm³`;
  } catch (error) {
    if (error instanceof QuantityError) return text.trim();
    throw error;
  }
}

/** Longest mixture that is spelt out. */
const SPELT_PARTS = 3;

function mixtureText(parts: string, find: (words: string) => KnownMaterial | null): string {
  const names = readRecipe(parts)
    .filter((line) => line.depth === 0)
    .map((line) => nameText(line.material, find));
  return names.length > SPELT_PARTS ? `a mixture of ${names.length} parts` : `a mixture of ${joined(names)}`;
}

function setupText(question: PlanQuestion): string {
  const { setup } = question;
  if (setup !== OWN_SETUP) return exampleSetup(setup)?.name ?? (setup || "a setup");
  const source = liveReading(question, "source");
  const pixel = liveReading(question, "pixel");
  const beam = source?.ok ? source.words : `“${question.source}”`;
  return `${beam === "a parallel beam" ? beam : `a source at ${beam}`}, ${pixel?.ok ? pixel.words : `“${question.pixel}”`} pixels`;
}

function useText(question: PlanQuestion): string {
  const words = USE_WORDS[question.use];
  if (question.use !== "tomography" || question.projections.trim() === "") return words;
  const reading = liveReading(question, "projections");
  return `${words} with ${reading?.ok ? reading.words : question.projections} projections`;
}

const OBJECTIVE_SENTENCES = {
  dose: "best is the least dose",
  time: "best is the shortest time",
  fluence: "best is the fewest photons",
} as const;

function alsoText(question: PlanQuestion, read: (field: LiveField, empty: string) => string): string[] {
  const { threshold, counts, pass, objective, nearField, use } = question;
  const near = (use === "retrieval" || use === "tomography") && nearField.trim() !== "";
  return [
    ...(objective === "" ? [] : [OBJECTIVE_SENTENCES[objective]]),
    ...(threshold.trim() === "" ? [] : [`detected means ${read("threshold", "")} times the noise`]),
    ...(counts.trim() === "" ? [] : [`at least ${read("counts", "")} counts in a pixel`]),
    ...(pass.trim() === "" ? [] : [`${read("pass", "")} of the photons pass`]),
    ...(near ? [`near field up to ${read("nearField", "")}`] : []),
  ];
}
