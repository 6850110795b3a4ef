/** Errors of the core. Codes never change; messages say what happened, what was given, what is accepted, what to do. */

export type FormulaErrorCode =
  | "empty"
  | "tooLong"
  | "tooDeep"
  | "unknownElement"
  | "letterCase"
  | "foreignLetter"
  | "invisibleCharacter"
  | "unexpectedCharacter"
  | "unclosedBracket"
  | "unopenedBracket"
  | "mismatchedBracket"
  | "emptyGroup"
  | "countZero"
  | "countTooLarge"
  | "countTooSmall"
  | "countMalformed"
  | "ambiguousHydrate";

/** A formula that cannot be read. `position` counts characters from 1. */
export class FormulaError extends Error {
  override readonly name = "FormulaError";
  readonly code: FormulaErrorCode;
  readonly position: number;
  /** Whole formulas or symbols that the writer may have meant, best first. */
  readonly suggestions: readonly string[];

  constructor(fault: { code: FormulaErrorCode; message: string; position: number; suggestions?: readonly string[] }) {
    super(fault.message);
    this.code = fault.code;
    this.position = fault.position;
    this.suggestions = fault.suggestions ?? [];
  }
}

export type MaterialErrorCode =
  | "noComponents"
  | "fractionNegative"
  | "fractionsAllZero"
  | "fractionsDoNotSum"
  | "densityMissing"
  | "densityOutOfRange"
  | "molarMassMissing"
  | "concentrationTooHigh"
  | "solidFractionOutOfRange"
  | "vacuumInMixture";

/** A composition or density that cannot be. `component` is the index of the part at fault, or null for the whole. */
export class MaterialError extends Error {
  override readonly name = "MaterialError";
  readonly code: MaterialErrorCode;
  readonly component: number | null;

  constructor(fault: { code: MaterialErrorCode; message: string; component?: number }) {
    super(fault.message);
    this.code = fault.code;
    this.component = fault.component ?? null;
  }
}
