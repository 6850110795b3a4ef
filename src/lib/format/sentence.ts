/** Words as they stand inside a sentence. */

/** A name with a small first letter, unless it is an acronym or a formula: "water", "PMMA", "NaCl". */
export const inSentence = (name: string): string =>
  /^[A-Z][a-zà-ÿ]+(?![A-Z0-9])/.test(name) ? name.slice(0, 1).toLowerCase() + name.slice(1) : name;
