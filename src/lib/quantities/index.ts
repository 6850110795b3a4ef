/** Text and unit to number, and nothing else: the only place that reads quantities written by people. */
export { type Energies, parseEnergies } from "./energies.ts";
export { QuantityError, type QuantityErrorCode } from "./errors.ts";
export { parseQuantity, QUANTITY_CHARACTERS } from "./parse.ts";
export { MAX_ENERGIES } from "./too-many.ts";
export { type Dimension, UNITS, unitNames } from "./units.ts";
export { splitRange, type WrittenRange } from "./range.ts";
