/** Where a displayed quantity is explained. The method page carries every one of these ids; a test holds it to that. */
import { QUANTITIES, type QuantityKey } from "./quantities.ts";

export const METHOD_PATH = "/method";

/** Paragraphs that pages link to without a quantity of their own. */
export const METHOD_TOPICS = [
  "tables",
  "interpolation",
  "mixtures",
  "density",
  "limits",
  "safety",
  "keyboard",
  "errors",
  "constants",
  "geometry",
  "contrast-of-a-feature",
  "bandwidth",
  "detectability",
  "efficiency",
  "dose-of-a-plan",
  "uses",
  "retrieval",
  "tomography-plan",
  "ranking",
  "plan-warnings",
] as const;
export type MethodTopic = (typeof METHOD_TOPICS)[number];

/** Address of the paragraph that says how the quantity is computed. */
export function methodHref(key: QuantityKey): string {
  return `${METHOD_PATH}#${QUANTITIES[key].anchor}`;
}

/** Address of a paragraph of the method page by its topic. */
export function methodTopicHref(topic: MethodTopic): string {
  return `${METHOD_PATH}#${topic}`;
}

/** What each note code of a result means, in one sentence, and the paragraph behind it. */
export const NOTE_EXPLANATIONS = {
  nearEdge: {
    text: "Close to an absorption edge: free-atom tables do not hold here, and bonding can change the values.",
    anchor: "edges",
  },
  belowOneKeV: {
    text: "Below 1 keV: bonding and structure change what free-atom tables say.",
    anchor: "limits",
  },
  notInTable: {
    text: "An element of the material has no value in this table at this energy.",
    anchor: "missing-values",
  },
  densityEstimated: { text: "The density is an estimate from additive volumes.", anchor: "density" },
} as const;
export type NoteCode = keyof typeof NOTE_EXPLANATIONS;
