/** Single fields of a plan's question, each to a number or a fault. Apart from read-question.ts so that editors carry no schema. */
import { kevFromEv } from "#src/lib/physics/index.ts";
import { parseEnergies, parseQuantity, QuantityError, splitRange } from "#src/lib/quantities/index.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import type { StatedSetup } from "#src/lib/schemas/plan.ts";
import type { PlanFault } from "./faults.ts";
import type { PlanField, PlanQuestion } from "./question.ts";
import { readDistances, type RangeChoice } from "./read-distances.ts";

const PLAN_ENERGIES = 64;
/** What a setup that was typed in offers where the question names no energies or distances: keV and m. */
export const OWN_RANGES: Pick<StatedSetup, "energiesKeV" | "distancesM"> = {
  energiesKeV: { from: 10, to: 60, count: PLAN_ENERGIES },
  distancesM: { from: 0.005, to: 3, count: 56 },
};

export class FieldError extends Error {
  readonly fault: PlanFault;
  constructor(field: PlanField, message: string, more: Partial<PlanFault> = {}) {
    super(message);
    this.fault = { field, message, position: null, suggestions: [], ...more };
  }
}

// 0.00002 m are 20 µm: the product's last bit is cut.
export const tidy = (value: number): number => Number(value.toPrecision(14));

/** Runs `read`; what cannot be read becomes a fault of the field. */
export function inPlanField<T>(field: PlanField, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (error instanceof QuantityError) throw new FieldError(field, error.message, { position: error.position });
    throw error;
  }
}

export function readLength(
  question: PlanQuestion,
  field: "size" | "length" | "width" | "thickness" | "source" | "sourceSize" | "blur" | "pixel",
  unit: string,
): number {
  return inPlanField(field, () => {
    const value = parseQuantity(question[field], "length", { defaultUnit: unit });
    const mayBeZero = field === "sourceSize" || field === "blur";
    if (!(value > 0) && !(mayBeZero && value === 0))
      throw new FieldError(
        field,
        `${question[field].slice(0, 20)} is not a size. Write one above 0, such as ${field === "thickness" ? "5 mm" : "20 um"}.`,
      );
    return value;
  });
}

export function layerWidth(question: PlanQuestion): number {
  if (question.width === "")
    throw new FieldError("width", "A layer needs its width across the beam. Write one such as 5 um.");
  return readLength(question, "width", "um");
}

export function readPlanDistances(text: string, closestM: number): StatedSetup["distancesM"] {
  const read: number[] | RangeChoice = readDistances(text, tidy(closestM));
  return read;
}

/** "8 to 40 keV" as a range, so that energies beside edges are added; a list as it is. */
export function readPlanEnergies(text: string): StatedSetup["energiesKeV"] {
  const { energiesEv, kind } = parseEnergies(text, { defaultUnit: "keV" });
  if (kind !== "range") {
    if (energiesEv.length > PLAN_LIMITS.energies) throw tooManyEnergies(energiesEv.length);
    return energiesEv.map((energyEv) => tidy(kevFromEv(energyEv)));
  }
  const written = splitRange(text);
  const stepped = written?.step != null;
  const count = stepped || written?.steps ? energiesEv.length : PLAN_ENERGIES;
  if (count > PLAN_LIMITS.energies) throw tooManyEnergies(count);
  const ends = [energiesEv[0]!, energiesEv.at(-1)!].sort((a, b) => a - b).map((energyEv) => tidy(kevFromEv(energyEv)));
  return { from: ends[0]!, to: ends[1]!, count, ...(stepped ? { spacing: "linear" as const } : {}) };
}

const tooManyEnergies = (count: number): QuantityError =>
  new QuantityError({
    code: "tooMany",
    position: 1,
    message: `${count} energies are written; at most ${PLAN_LIMITS.energies} are ranked. Write fewer, or a coarser range.`,
  });

export function readShare(
  question: PlanQuestion,
  field: "bandwidth" | "screen",
  low: number,
  high: number,
  text = question[field],
): number {
  return inPlanField(field, () => {
    const value = parseQuantity(text, "fraction", { defaultUnit: "%" });
    if (value < low || value > high)
      throw new FieldError(
        field,
        `${text.slice(0, 20)} is not accepted here. Write a share from ${low * 100} to ${high * 100} %.`,
      );
    return value;
  });
}

export function readFlux(question: PlanQuestion): StatedSetup["fluxPerSMm2"] | null {
  const lines = question.flux.split("\n").filter((line) => line.trim() !== "");
  if (lines.length === 0) return null;
  return inPlanField("flux", () => {
    if (lines.length === 1 && !/[;\t]/.test(lines[0]!)) return perMm2(lines[0]!);
    return lines.map((line, index): [number, number] => {
      const [energy = "", value = ""] = line.split(/[;\t]/);
      try {
        return [tidy(kevFromEv(parseQuantity(energy, "energy", { defaultUnit: "keV" }))), perMm2(value, true)];
      } catch (error) {
        if (!(error instanceof QuantityError)) throw error;
        throw new FieldError("flux", `Line ${index + 1}: ${error.message}`);
      }
    });
  });
}

function perMm2(text: string, mayBeZero = false): number {
  const value = parseQuantity(text, "flux", { defaultUnit: "/s/mm2" }) * 1e-6;
  if (value > 0 || (mayBeZero && value === 0)) return tidy(value);
  throw new QuantityError({
    code: "notPositive",
    position: 1,
    message: "A flux is above 0. Write one such as 1e9 /s/mm2.",
  });
}

/** Null where no limit is written. */
export function readPositive(question: PlanQuestion, field: "dose" | "time"): number | null {
  if (question[field] === "") return null;
  const value = inPlanField(field, () =>
    parseQuantity(question[field], field, { defaultUnit: field === "dose" ? "Gy" : "s" }),
  );
  if (!(value > 0))
    throw new FieldError(field, `A limit is above 0. Write one such as ${field === "dose" ? "10 Gy" : "60 s"}.`);
  return value;
}

/** "parallel" as a source distance. */
export const isParallel = (source: string): boolean => /^\s*(parallel|plane|∞|infinite)\s*$/i.test(source);

export function readPass(question: PlanQuestion): [number, number] {
  const range = splitRange(question.pass);
  if (!range) throw new FieldError("pass", "Write the transmission allowed as a range, such as 10 to 90 %.");
  return inPlanField("pass", () => {
    const percent = (text: string): number =>
      parseQuantity(/%/.test(text) ? text : `${text} %`, "fraction", { defaultUnit: "%" });
    const [low, high] = [percent(range.from.text), percent(range.to.text)];
    if (!(low >= 0 && high <= 1 && low < high))
      throw new FieldError(
        "pass",
        "A transmission range goes from 0 to 100 %, the smaller value first, such as 10 to 90 %.",
      );
    return [low, high];
  });
}

export function readNumber(
  question: PlanQuestion,
  field: "threshold" | "counts" | "nearField" | "projections",
  low: number,
  high: number,
): number | null {
  const text = question[field];
  if (text === "") return null;
  return inPlanField(field, () => {
    const plain = text.replace(/[\s\u202f]/g, "");
    const comma = /^\d+,\d+$/.exec(plain);
    if (comma) throw new FieldError(field, `Write ${plain.replace(",", ".")}, with a point.`);
    const value = /^\d*\.?\d+(?:[eE][+-]?\d{1,3})?$/.test(plain) ? Number(plain) : Number.NaN;
    if (!(value >= low && value <= high))
      throw new FieldError(field, `“${text.slice(0, 20)}” is not accepted. Write a number from ${low} to ${high}.`);
    return value;
  });
}
