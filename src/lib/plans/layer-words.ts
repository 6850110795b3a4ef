/** Layers around the host in a few words. */
import { lengthText } from "#src/lib/format/plan-quantities.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import type { LayerLine } from "./question.ts";

const COUNTS = ["no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten"];
/** Most layers that are named one by one. */
const NAMED = 3;

/** "between" two equal walls; "behind" what the beam meets first; "in front of" what it meets last. */
export function layersText(
  layers: readonly LayerLine[],
  name: (words: string) => string,
): { lead: string; text: string } {
  return { lead: leadOf(layers), text: textOf(layers, name) };
}

function leadOf(layers: readonly LayerLine[]): string {
  const before = layers.filter(({ position }) => position === "before").length;
  if (before === layers.length && before > 0) return "behind";
  return before === 0 && layers.length > 0 ? "in front of" : "between";
}

function textOf(layers: readonly LayerLine[], name: (words: string) => string): string {
  const [first] = layers;
  if (!first) return "no walls";
  const words = layers.map((layer) => `${thicknessText(layer.thickness)} ${name(layer.material) || "unnamed"}`.trim());
  const count = COUNTS[layers.length] ?? String(layers.length);
  if (new Set(words).size === 1)
    return layers.length === 1
      ? `${withArticle(first, words[0] as string)} wall`
      : `${count} ${words[0] as string} walls`;
  if (layers.length > NAMED) return `${count} layers`;
  return `${words.slice(0, -1).join(", ")} and ${words.at(-1) as string}`;
}

/** "an 8 mm …", "a 1 mm …"; a text without a thickness goes without. */
function withArticle(layer: LayerLine, words: string): string {
  if (layer.thickness === "") return words;
  return `${/^(8|11|18)/.test(words) ? "an" : "a"} ${words}`;
}

function thicknessText(text: string): string {
  if (text === "") return "";
  try {
    return lengthText(parseQuantity(text, "length", { defaultUnit: "mm" }));
  } catch (error) {
    if (error instanceof QuantityError) return text;
    throw error;
  }
}
