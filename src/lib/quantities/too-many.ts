import { QuantityError } from "./errors.ts";

/** Most energies of one list. */
export const MAX_ENERGIES = 2000;

/** `count` is null where it is not known, only that it is above the limit. */
export function tooMany(count: number | null, position: number): QuantityError {
  const given =
    count === null
      ? `More than ${MAX_ENERGIES} energies are written.`
      : `That would be ${count > 1e7 ? "far too many" : count} energies.`;
  return new QuantityError({
    code: "tooMany",
    position,
    message: `${given} At most ${MAX_ENERGIES} are taken: write fewer, or a coarser range.`,
  });
}
