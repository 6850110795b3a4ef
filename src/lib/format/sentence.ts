/** Words as they stand inside a sentence. */

/**
 * A name with a small first letter, unless it is an acronym or a formula: "water", "PMMA", "NaCl". What a handbook puts behind
 * comes first: "dry air" for "Air, dry".
 */
export function inSentence(name: string): string {
  const small = /^[A-Z][a-zà-ÿ]+(?![A-Z0-9])/.test(name) ? name.slice(0, 1).toLowerCase() + name.slice(1) : name;
  return small.replace(/^([^,]+), ([a-z-]+(?: density| molecular weight)?)$/, "$2 $1");
}

/** With a capital first letter. */
export const capital = (words: string): string => words.slice(0, 1).toUpperCase() + words.slice(1);
