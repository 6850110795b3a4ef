/** What a writer of a faulty formula may have meant: near symbols, letter case, look-alike letters. */
import { elementBySymbol, ELEMENTS } from "./elements.ts";

// Elements that imaging samples are mostly made of; they are offered first. A judgement, not physics.
const COMMON = new Set(
  "H He B C N O F Na Mg Al Si P S Cl Ar K Ca Ti Cr Mn Fe Ni Cu Zn Br Zr Ag Sn I Xe Ba W Pt Au Hg Pb U".split(" "),
);

/** At most two symbols near `written`: same first letter, common ones first. "Hx" gives He and Hg. */
export function nearSymbols(written: string): string[] {
  const folded = written.charAt(0).toUpperCase() + written.slice(1).toLowerCase();
  if (folded !== written && elementBySymbol(folded)) return [folded];
  const first = folded.charAt(0);
  const second = folded.charAt(1);
  const scored = ELEMENTS.filter((element) => element.symbol.startsWith(first) && element.symbol.length === 2)
    .map((element) => ({
      symbol: element.symbol,
      cost: (COMMON.has(element.symbol) ? 0 : 2) + (element.symbol.charAt(1) === second ? 0 : 1),
    }))
    .sort((a, b) => a.cost - b.cost);
  const found = scored.slice(0, 2).map((entry) => entry.symbol);
  if (found.length === 0 && elementBySymbol(first)) found.push(first);
  return found;
}

/**
 * The formula with letter case mended, or null: "h2o" gives H2O, "caco3" gives CaCO3. Every run of letters is split into
 * symbols so that the rarest element in it is as common as can be. Runs over 12 letters are left alone.
 */
export function mendCase(formula: string): string | null {
  let mended = "";
  for (const piece of formula.match(/[A-Za-z]+|[^A-Za-z]+/g) ?? []) {
    if (!/^[A-Za-z]/.test(piece)) {
      mended += piece;
      continue;
    }
    const split = piece.length <= 12 ? splitIntoSymbols(piece) : null;
    if (split === null) return null;
    mended += split;
  }
  return mended === formula ? null : mended;
}

function splitIntoSymbols(letters: string): string | null {
  // best[i]: cheapest split of the first i letters.
  const best: ({ cost: number; text: string } | null)[] = [{ cost: 0, text: "" }];
  for (let end = 1; end <= letters.length; end++) {
    let winner: { cost: number; text: string } | null = null;
    for (const length of [2, 1]) {
      const before = end - length >= 0 ? best[end - length] : null;
      if (!before) continue;
      const raw = letters.slice(end - length, end);
      const symbol = raw.charAt(0).toUpperCase() + raw.slice(1).toLowerCase();
      if (!elementBySymbol(symbol)) continue;
      const cost = before.cost + (COMMON.has(symbol) ? 1 : 5);
      if (!winner || cost < winner.cost) winner = { cost, text: before.text + symbol };
    }
    best[end] = winner;
  }
  return best[letters.length]?.text ?? null;
}

export interface Notation {
  readonly what: string;
  /** The formula with it left out. */
  readonly without: string;
}

/**
 * What belongs to the writing of chemistry but not to a formula here: the n of a polymer's unit, a state such as (s) or (aq),
 * an oxidation number such as (III). `index` is where a small letter was met, or where a bracket opens.
 */
export function unwantedNotation(formula: string, index: number): Notation | null {
  const rest = formula.slice(index);
  if (rest === "n" && index > 0) return { what: "n, for any number of units,", without: formula.slice(0, index) };
  const state = /^(?:s|l|g|aq)\)/.exec(rest)?.[0];
  if (state !== undefined && index > 1 && formula[index - 1] === "(")
    return {
      what: `the state (${state}`,
      without: formula.slice(0, index - 1) + formula.slice(index + state.length),
    };
  const oxidation = /^\([IV]{1,4}\)/.exec(rest)?.[0];
  if (oxidation !== undefined && index > 0)
    return {
      what: `the oxidation number ${oxidation}`,
      without: formula.slice(0, index) + formula.slice(index + oxidation.length),
    };
  return null;
}

const LOOK_ALIKES: Readonly<Record<string, string>> = {
  // Cyrillic
  А: "A", В: "B", С: "C", Е: "E", Н: "H", І: "I", К: "K", М: "M", О: "O", Р: "P", Ѕ: "S", Т: "T", Х: "X", У: "Y",
  а: "a", с: "c", е: "e", і: "i", о: "o", р: "p", ѕ: "s", х: "x", у: "y",
  // Greek
  Α: "A", Β: "B", Ε: "E", Ζ: "Z", Η: "H", Ι: "I", Κ: "K", Μ: "M", Ν: "N", Ο: "O", Ρ: "P", Τ: "T", Υ: "Y", Χ: "X", ο: "o",
}; // prettier-ignore

/** For a letter of another alphabet: the alphabet's name and the Latin letter it looks like, if any. */
export function foreignLetter(character: string): { alphabet: string; looksLike: string | null } | null {
  const code = character.codePointAt(0) ?? 0;
  const alphabet =
    code >= 0x0400 && code <= 0x052f
      ? "Cyrillic"
      : code >= 0x0370 && code <= 0x03ff
        ? "Greek"
        : code >= 0xff01 && code <= 0xff5e
          ? "full-width"
          : /\p{L}/u.test(character)
            ? "foreign"
            : null;
  if (alphabet === null) return null;
  const latin = alphabet === "full-width" ? String.fromCodePoint(code - 0xfee0) : (LOOK_ALIKES[character] ?? null);
  return { alphabet, looksLike: latin };
}
