/**
 * Chemical formulas: text to atom counts, in one pass.
 *
 * IUPAC notation with () and [], counts whole or decimal, hydrates with · or *, subscript digits. Everything else is
 * refused with its position and, where one is likely, what was meant.
 */
import { elementByNumber, elementBySymbol } from "./elements.ts";
import { FormulaError } from "./errors.ts";
import { foreignLetter, mendCase, nearSymbols, unwantedNotation } from "./formula-hints.ts";

export const FORMULA_LIMITS = {
  characters: 256,
  bracketLevels: 8,
  /** Largest single count. */
  count: 1e6,
  smallestCount: 1e-6,
  /** Largest number of atoms in the whole formula, after brackets are multiplied out. */
  atoms: 1e9,
} as const;

export interface Formula {
  /** As written, with subscripts as digits, hydrate dots as · and no spaces. */
  readonly text: string;
  /** Atoms per formula unit by atomic number, in order of first appearance. */
  readonly atoms: ReadonlyMap<number, number>;
  readonly molarMassGPerMol: number;
}

const SUBSCRIPTS = "₀₁₂₃₄₅₆₇₈₉";
// Middle dot, bullet, dot operator, bullet operator, asterisk: the ways hydrates are typed.
const HYDRATE_DOTS = "·•⋅∙*";
const CLOSING: Readonly<Record<string, string>> = { "(": ")", "[": "]" };

interface Level {
  readonly opening: string;
  readonly openedAt: number;
  readonly atoms: Map<number, number>;
}

const isDigit = (character: string | undefined): boolean => character !== undefined && /^[0-9]$/.test(character);
const isUpper = (character: string | undefined): boolean => character !== undefined && /^[A-Z]$/.test(character);
const isLower = (character: string | undefined): boolean => character !== undefined && /^[a-z]$/.test(character);

function add(into: Map<number, number>, atomicNumber: number, count: number): void {
  into.set(atomicNumber, (into.get(atomicNumber) ?? 0) + count);
}

/**
 * Reads a formula: "Ca5(PO4)3OH", "CuSO4·5H2O", "Ni0.8Mn0.1Co0.1O2".
 *
 * Time grows linearly with length. At most 256 characters, 8 bracket levels, counts from 1e-6 to 1e6. A decimal point that
 * could also be a hydrate dot ("CuSO4.5H2O") is refused, naming both readings.
 * @throws FormulaError, and nothing else, for any other text.
 */
export function parseFormula(text: string): Formula {
  const characters = normalise(text);
  const parser = new Parser(characters);
  const atoms = parser.parse();
  return { text: characters.join(""), atoms, molarMassGPerMol: molarMassGPerMol(atoms) };
}

/** Molar mass Σ n_i M_i in g/mol, of standard atomic weights (elements.ts). */
export function molarMassGPerMol(atoms: ReadonlyMap<number, number>): number {
  let sum = 0;
  for (const [atomicNumber, count] of atoms) sum += count * elementByNumber(atomicNumber).standardAtomicWeight;
  return sum;
}

/** The atoms in Hill order (C, H, then by symbol), counts at full precision: parseFormula gives the same atoms back. */
export function hillFormula(atoms: ReadonlyMap<number, number>): string {
  const hasCarbon = atoms.has(6);
  const rank = (atomicNumber: number): string =>
    hasCarbon && atomicNumber === 6
      ? "0"
      : hasCarbon && atomicNumber === 1
        ? "1"
        : `2${elementByNumber(atomicNumber).symbol}`;
  return [...atoms]
    .sort(([a], [b]) => (rank(a) < rank(b) ? -1 : 1))
    .map(([atomicNumber, count]) => elementByNumber(atomicNumber).symbol + (count === 1 ? "" : plainNumber(count)))
    .join("");
}

// Number's own text uses exponents below 1e-6; counts never go there.
function plainNumber(value: number): string {
  const text = String(value);
  return text.includes("e") ? value.toFixed(12).replace(/0+$/, "") : text;
}

/** Subscripts to digits, hydrate dots to ·, spaces beside a dot or at the ends dropped; limits of length and depth. */
function normalise(text: string): string[] {
  // The limit is judged on a bounded prefix, so that a very long text costs no more than a short one.
  const all = [...text.slice(0, 4 * FORMULA_LIMITS.characters)];
  refuseDeepBrackets(all.slice(0, FORMULA_LIMITS.characters));
  if (all.length > FORMULA_LIMITS.characters) {
    throw new FormulaError({
      code: "tooLong",
      position: FORMULA_LIMITS.characters + 1,
      message: `The formula is longer than ${FORMULA_LIMITS.characters} characters. Write long mixtures as components with fractions.`,
    });
  }
  const mapped = all.map((character) => {
    const subscript = SUBSCRIPTS.indexOf(character);
    if (subscript >= 0) return String(subscript);
    return HYDRATE_DOTS.includes(character) ? "·" : character;
  });
  const trimmed = mapped
    .join("")
    .trim()
    .replace(/ *· *([0-9.]*) */g, "·$1");
  if (trimmed === "") {
    throw new FormulaError({
      code: "empty",
      position: 1,
      message: "The formula is empty. Write one such as H2O or SiO2.",
    });
  }
  return [...trimmed];
}

function refuseDeepBrackets(characters: readonly string[]): void {
  let depth = 0;
  for (const [index, character] of characters.entries()) {
    if (character === "(" || character === "[") depth++;
    else if (character === ")" || character === "]") depth--;
    if (depth > FORMULA_LIMITS.bracketLevels) {
      throw new FormulaError({
        code: "tooDeep",
        position: index + 1,
        message: `Brackets are nested more than ${FORMULA_LIMITS.bracketLevels} deep at ${index + 1}. Multiply some of them out.`,
      });
    }
  }
}

class Parser {
  private index = 0;
  private readonly characters: readonly string[];
  private readonly total = new Map<number, number>();

  constructor(characters: readonly string[]) {
    this.characters = characters;
  }

  /** part ("·" part)*, part = [count] unit+ */
  parse(): Map<number, number> {
    for (;;) {
      const partStart = this.index;
      const multiplier = this.count() ?? 1;
      const atoms = this.units();
      if (atoms.size === 0) throw this.missingPart(partStart);
      for (const [atomicNumber, count] of atoms) add(this.total, atomicNumber, count * multiplier);
      if (this.peek() === undefined) break;
      this.index++; // the hydrate dot
    }
    let sum = 0;
    for (const count of this.total.values()) sum += count;
    if (!(sum <= FORMULA_LIMITS.atoms)) {
      throw this.fault(
        "countTooLarge",
        0,
        `The formula has more than ${FORMULA_LIMITS.atoms} atoms. Divide all counts by a common number.`,
      );
    }
    return this.total;
  }

  private peek(ahead = 0): string | undefined {
    return this.characters[this.index + ahead];
  }

  private fault(
    code: FormulaError["code"],
    index: number,
    message: string,
    suggestions: readonly string[] = [],
  ): FormulaError {
    return new FormulaError({ code, message, position: index + 1, suggestions });
  }

  private missingPart(start: number): FormulaError {
    const character = this.characters[start];
    if (character === "·" || character === undefined) {
      return this.fault(
        "emptyGroup",
        start,
        `Nothing stands beside the dot at ${Math.max(start, 1)}. Write for example CuSO4·5H2O.`,
      );
    }
    return this.fault("emptyGroup", start, `A number stands alone at ${start + 1}. Write the element it counts.`);
  }

  /** Elements and bracketed groups up to a hydrate dot or the end. */
  private units(): Map<number, number> {
    const stack: Level[] = [{ opening: "", openedAt: -1, atoms: new Map() }];
    for (;;) {
      const level = stack[stack.length - 1] as Level;
      const character = this.peek();
      if (character === undefined || (character === "·" && stack.length === 1)) {
        if (stack.length === 1) return level.atoms;
        throw this.fault(
          "unclosedBracket",
          level.openedAt,
          `The bracket opened at ${level.openedAt + 1} is not closed. Add ${CLOSING[level.opening]}.`,
        );
      }
      if (isUpper(character)) {
        const atomicNumber = this.symbol();
        add(level.atoms, atomicNumber, this.count() ?? 1);
      } else if (character === "(" || character === "[") {
        this.refuseNotation(this.index);
        stack.push({ opening: character, openedAt: this.index, atoms: new Map() });
        this.index++;
      } else if (character === ")" || character === "]") {
        this.close(stack, character);
      } else {
        throw this.unexpected(character);
      }
    }
  }

  private close(stack: Level[], character: string): void {
    const level = stack[stack.length - 1] as Level;
    if (stack.length === 1) {
      throw this.fault(
        "unopenedBracket",
        this.index,
        `The bracket ${character} at ${this.index + 1} was never opened. Remove it.`,
      );
    }
    if (CLOSING[level.opening] !== character) {
      throw this.fault(
        "mismatchedBracket",
        this.index,
        `${character} at ${this.index + 1} closes ${level.opening} of ${level.openedAt + 1}. Use ${CLOSING[level.opening]}.`,
      );
    }
    if (level.atoms.size === 0) {
      throw this.fault(
        "emptyGroup",
        level.openedAt,
        `The brackets at ${level.openedAt + 1} hold nothing. Remove them.`,
      );
    }
    this.index++;
    stack.pop();
    const multiplier = this.count() ?? 1;
    const outer = stack[stack.length - 1] as Level;
    for (const [atomicNumber, count] of level.atoms) add(outer.atoms, atomicNumber, count * multiplier);
  }

  private symbol(): number {
    const start = this.index;
    const first = this.characters[start] as string;
    const second = this.characters[start + 1];
    if (isLower(second)) {
      const long = elementBySymbol(first + second);
      if (long) {
        this.index += 2;
        return long.atomicNumber;
      }
      throw this.unknown(first + second, start);
    }
    const short = elementBySymbol(first);
    if (!short) throw this.unknown(first, start);
    this.index++;
    return short.atomicNumber;
  }

  private unknown(written: string, start: number): FormulaError {
    const position = start + 1;
    if (written === "D" || written === "T") {
      return this.fault(
        "unknownElement",
        start,
        `${written} at ${position} is an isotope of hydrogen. X-rays do not tell them apart: write H and give the real density.`,
        ["H"],
      );
    }
    const near = nearSymbols(written);
    const hint = near.length > 0 ? `; did you mean ${near.join(" or ")}?` : ". Element symbols run from H to Cf.";
    return this.fault("unknownElement", start, `Unknown element '${written}' at ${position}${hint}`, near);
  }

  /** An unsigned number, or null where none stands. Consumes digits and one decimal point between digits. */
  private count(): number | null {
    const start = this.index;
    if (this.peek() === "." && isDigit(this.peek(1))) {
      throw this.fault(
        "countMalformed",
        start,
        `The number at ${start + 1} begins with a point. Write 0. before it, or · where water of crystallisation follows.`,
      );
    }
    if (!isDigit(this.peek())) return null;
    while (isDigit(this.peek())) this.index++;
    if (this.peek() === "." && isDigit(this.peek(1))) {
      this.index++;
      while (isDigit(this.peek())) this.index++;
      this.refuseHydrateDecimal(start);
    }
    if (this.peek() === ".") {
      throw this.fault(
        "countMalformed",
        this.index,
        `The point at ${this.index + 1} does not belong to a number. Write · for water of crystallisation.`,
      );
    }
    const text = this.characters.slice(start, this.index).join("");
    const value = Number(text);
    if (!(value > 0))
      throw this.fault(
        "countZero",
        start,
        `The count at ${start + 1} is zero. Counts are above 0; leave the element out instead.`,
      );
    if (value > FORMULA_LIMITS.count) {
      throw this.fault(
        "countTooLarge",
        start,
        `The count at ${start + 1} is above ${FORMULA_LIMITS.count}. Divide all counts by a common number.`,
      );
    }
    if (value < FORMULA_LIMITS.smallestCount) {
      throw this.fault(
        "countTooSmall",
        start,
        `The count at ${start + 1} is below ${FORMULA_LIMITS.smallestCount}. Multiply all counts by a common number.`,
      );
    }
    return value;
  }

  // "CuSO4.5H2O" can be four and a half oxygens or five waters: never guess between them. After a dot or at the very start
  // ("·0.5H2O") a number can only be a count.
  private refuseHydrateDecimal(start: number): void {
    const before = this.characters[start - 1];
    if (before === undefined || before === "·" || Number(this.characters[start]) < 1) return;
    const rest = this.characters.slice(this.index, this.index + 4);
    if (rest[0] !== "H" || rest[1] !== "2" || rest[2] !== "O" || isLower(rest[3])) return;
    const whole = this.characters.slice(start, this.index).join("");
    const [integer, decimals] = whole.split(".");
    const head = this.characters.slice(0, start).join("");
    const tail = this.characters.slice(this.index).join("");
    const hydrate = `${head}${integer}·${decimals}${tail}`;
    const decimal = `${head}${whole}(${tail.slice(0, 3)})${tail.slice(3)}`;
    throw this.fault(
      "ambiguousHydrate",
      start,
      `The point at ${start + 1 + (integer ?? "").length} can be read two ways. Write ${hydrate} for ${decimals} H2O of crystallisation, or ${decimal} for a count of ${whole}.`,
      [hydrate, decimal],
    );
  }

  // Fe(III)2O3 would otherwise be read as an iodide, and the n of a polymer be offered as nitrogen.
  private refuseNotation(index: number): void {
    const found = unwantedNotation(this.characters.join(""), index);
    if (!found) return;
    throw this.fault(
      "unexpectedCharacter",
      index,
      `Leave ${found.what} at ${index + 1} out: only elements and their counts are read.`,
      [found.without],
    );
  }

  private unexpected(character: string): FormulaError {
    const position = this.index + 1;
    if (character === "e" && isDigit(this.peek(-1))) {
      return this.fault(
        "countMalformed",
        this.index,
        `The count before ${position} has an exponent. Write it in full, at most ${FORMULA_LIMITS.count}.`,
      );
    }
    if (isLower(character)) {
      this.refuseNotation(this.index);
      const mended = mendCase(this.characters.join(""));
      const hint = mended ? ` Did you mean ${mended}?` : " Write for example Co for cobalt, CO for carbon monoxide.";
      return this.fault(
        "letterCase",
        this.index,
        `'${character}' at ${position} is a small letter where a symbol begins. Symbols begin with a capital.${hint}`,
        mended ? [mended] : [],
      );
    }
    if (/^[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]$/u.test(character)) {
      const code = (character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0");
      return this.fault(
        "invisibleCharacter",
        this.index,
        `An invisible character (U+${code}) stands at ${position}. Delete it, or type the formula again.`,
      );
    }
    const foreign = foreignLetter(character);
    if (foreign) {
      const like = foreign.looksLike
        ? ` that looks like ${foreign.looksLike}. Type the Latin ${foreign.looksLike}.`
        : ". Type Latin letters.";
      return this.fault(
        "foreignLetter",
        this.index,
        `'${character}' at ${position} is a ${foreign.alphabet} letter${like}`,
        foreign.looksLike ? [foreign.looksLike] : [],
      );
    }
    if (/\s/.test(character)) {
      return this.fault(
        "unexpectedCharacter",
        this.index,
        `A space stands at ${position}. Write the formula without spaces.`,
        [this.characters.join("").replace(/\s+/g, "")],
      );
    }
    if (character === "+" || character === "-" || character === "−") {
      return this.fault(
        "unexpectedCharacter",
        this.index,
        `'${character}' at ${position} is not part of a formula. Leave charges and signs out.`,
      );
    }
    return this.fault(
      "unexpectedCharacter",
      this.index,
      `'${character}' at ${position} is not part of a formula. Accepted are element symbols, counts, ( ), [ ] and · before water.`,
    );
  }
}
