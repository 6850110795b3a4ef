/** Distances as people write them: one, a list with units, or a range such as "3 mm to 3 m" or "up to 3 m". */
import { parseQuantity, QuantityError, splitRange, unitNames } from "#src/lib/quantities/index.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";

export interface RangeChoice {
  readonly from: number;
  readonly to: number;
  readonly count: number;
  readonly spacing: "log" | "linear";
}

const DEFAULT_COUNT = 64;

const tooMany = (): QuantityError =>
  new QuantityError({
    code: "tooMany",
    position: 1,
    message: `At most ${PLAN_LIMITS.distances} distances are ranked. Write fewer, or a coarser range.`,
  });

/** In metres. `closestM` stands in for the beginning of "up to 3 m". @throws QuantityError */
export function readDistances(text: string, closestM: number): number[] | RangeChoice {
  const upTo = /^\s*(?:up\s+to|to)\s+(.+)$/i.exec(text);
  if (upTo) {
    const to = metres(upTo[1] as string, "m");
    return ordered(Math.min(closestM, to), to, DEFAULT_COUNT, "log");
  }
  const range = splitRange(text);
  if (!range) return list(text);
  const unit = unitOf(range.to.text) || "m";
  const from = metres(range.from.text, unitOf(range.from.text) || unit);
  const to = metres(range.to.text, unit);
  if (range.step) {
    const step = metres(range.step.text, unitOf(range.step.text) || unit);
    if (!(step > 0))
      throw new QuantityError({ code: "stepNotPositive", position: 1, message: "A step must be above 0." });
    const count = Math.floor((to - from) / step + 1e-9) + 1;
    return ordered(from, from + (count - 1) * step, count, "linear");
  }
  return ordered(from, to, range.steps ? range.steps.count + 1 : DEFAULT_COUNT, from > 0 ? "log" : "linear");
}

function ordered(from: number, to: number, count: number, spacing: "log" | "linear"): RangeChoice {
  if (from > to)
    throw new QuantityError({
      code: "rangeReversed",
      position: 1,
      message: "The range runs downwards. Write the smaller distance first.",
    });
  if (count < 1)
    throw new QuantityError({ code: "stepNotPositive", position: 1, message: "A range needs at least one step." });
  if (count > PLAN_LIMITS.distances) throw tooMany();
  return {
    from,
    to: Number(to.toPrecision(12)),
    count: from === to ? 1 : count,
    spacing: from > 0 ? spacing : "linear",
  };
}

function list(text: string): number[] {
  const entries = text.split(/[,;\n\t]+/).filter((entry) => entry.trim() !== "");
  if (entries.length > PLAN_LIMITS.distances) throw tooMany();
  if (entries.length === 0)
    throw new QuantityError({
      code: "empty",
      position: 1,
      message: "No distance is written. Write one such as 0.3 m.",
    });
  // "0,3 m" is a decimal comma, not two distances.
  if (/^\s*\d+,\d+\s*[a-zA-Zµμ]*\s*$/.test(text)) metres(text, "m");
  // A unit holds for the entries before it that have none.
  let unit = "m";
  const values: number[] = [];
  for (const entry of entries.toReversed()) {
    unit = unitOf(entry) || unit;
    values.push(metres(entry, unit));
  }
  return values.reverse();
}

const unitOf = (text: string): string => /[a-zA-ZµμÅ]+\s*$/.exec(text.trim())?.[0].trim() ?? "";

function metres(text: string, unit: string): number {
  const value = parseQuantity(text, "length", { defaultUnit: unit });
  if (value < 0 || value > 10_000) {
    throw new QuantityError({
      code: "outOfRange",
      position: 1,
      message: `${text.trim().slice(0, 20)} is not a distance of a plan. From 0 to 10 000 m is accepted, in ${unitNames("length").join(", ")}.`,
    });
  }
  return value;
}
