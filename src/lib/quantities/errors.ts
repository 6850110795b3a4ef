export type QuantityErrorCode =
  | "empty"
  | "tooLong"
  | "decimalComma"
  | "notANumber"
  | "foreignDigits"
  | "invisibleCharacter"
  | "notFinite"
  | "underflow"
  | "unknownUnit"
  | "wrongDimension"
  | "notPositive"
  | "outOfRange"
  | "rangeReversed"
  | "stepNotPositive"
  | "tooMany";

/** A quantity that cannot be read. `position` counts characters from 1, in the text that was given. */
export class QuantityError extends Error {
  override readonly name = "QuantityError";
  readonly code: QuantityErrorCode;
  readonly position: number;

  constructor(fault: { code: QuantityErrorCode; message: string; position: number }) {
    super(fault.message);
    this.code = fault.code;
    this.position = fault.position;
  }
}
