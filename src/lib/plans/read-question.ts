/** From the words of a plan's question to a request, with faults tied to the field at fault. Pure: the worker and the server share it. */
import { kevFromEv } from "#src/lib/physics/index.ts";
import type { MaterialFinder } from "#src/lib/lookup/finder.ts";
import { DEFAULT_QUESTION } from "#src/lib/lookup/question.ts";
import { QuestionError, statedMaterial, type StatedMaterial } from "#src/lib/lookup/state-material.ts";
import { parseEnergies, parseQuantity, QuantityError, splitRange } from "#src/lib/quantities/index.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import { type RankRequest, rankRequestSchema, type StatedSetup } from "#src/lib/schemas/plan.ts";
import type { MaterialStatement } from "#src/lib/schemas/material.ts";
import { exampleSetup } from "./examples.ts";
import type { PlanFault } from "./faults.ts";
import { OWN_SETUP, type PlanField, type PlanQuestion, readLayerLines } from "./question.ts";
import { readDistances, type RangeChoice } from "./read-distances.ts";

export interface ReadPlan {
  /** Null where a field cannot be read. */
  readonly request: RankRequest | null;
  readonly faults: readonly PlanFault[];
  /** True where the question left the objective to the page. */
  readonly objectiveProposed: boolean;
}

const PLAN_ENERGIES = 64;

class FieldError extends Error {
  readonly fault: PlanFault;
  constructor(field: PlanField, message: string, more: Partial<PlanFault> = {}) {
    super(message);
    this.fault = { field, message, position: null, suggestions: [], ...more };
  }
}

/** Reads every field that can be read; each that cannot leaves a fault. */
export function readPlan(question: PlanQuestion, finder: MaterialFinder): ReadPlan {
  const faults: PlanFault[] = [];
  const attempt = <T>(read: () => T): T | null => {
    try {
      return read();
    } catch (error) {
      if (!(error instanceof FieldError)) throw error;
      faults.push(error.fault);
      return null;
    }
  };
  const size = attempt(() => length(question, "size", "um"));
  const extent = attempt(() => extents(question));
  const feature = attempt(() => material(question, "feature", finder));
  const host = attempt(() => material(question, "host", finder));
  const thickness = attempt(() => length(question, "thickness", "mm"));
  const layers = attempt(() => readLayers(question, finder));
  const setup = attempt(() => readSetup(question, finder, (thickness ?? 0) / 2));
  const limits = attempt(() => readLimits(question));
  const threshold = attempt(() => number(question, "threshold", 0.1, 1000));
  const counts = attempt(() => number(question, "counts", 0, 1e9));
  const nearField = attempt(() => number(question, "nearField", 0.01, PLAN_LIMITS.nearField));
  const projections = attempt(() => number(question, "projections", 1, 1_000_000));
  if (
    faults.length > 0 ||
    size === null ||
    !extent ||
    !feature ||
    !host ||
    thickness === null ||
    !layers ||
    !setup ||
    !limits
  )
    return { request: null, faults, objectiveProposed: question.objective === "" };
  const objective = question.objective === "" ? proposedObjective(host, setup) : question.objective;
  const draft = {
    feature: { material: feature.statement, shape: question.shape, sizeUm: tidy(size * 1e6), ...extent },
    host: { material: host.statement, thicknessMm: tidy(thickness * 1e3) },
    ...(layers.length > 0 ? { layers } : {}),
    setup,
    use: question.use,
    ...(threshold === null ? {} : { threshold }),
    ...(counts === null ? {} : { minimumCounts: counts }),
    ...(nearField === null ? {} : { nearFieldLimit: nearField }),
    ...(projections === null ? {} : { projections: Math.round(projections) }),
    objective,
    ...(Object.keys(limits).length > 0 ? { limits } : {}),
    tabulation: question.table,
  };
  const judged = rankRequestSchema.safeParse(draft);
  if (judged.success) return { request: judged.data, faults, objectiveProposed: question.objective === "" };
  return {
    request: null,
    faults: judged.error.issues.slice(0, 5).map((issue) => ({
      field: fieldOfPath(`/${issue.path.map(String).join("/")}`),
      message: plainMessage(issue),
      position: null,
      suggestions: [],
    })),
    objectiveProposed: question.objective === "",
  };
}

// 0.00002 m are 20 µm: the product's last bit is cut.
const tidy = (value: number): number => Number(value.toPrecision(14));

/** Where a person mends what a request's path names. */
export function fieldOfPath(path: string): PlanField {
  const known: readonly (readonly [string, PlanField])[] = [
    ["/feature/material/densityGCm3", "featureDensity"],
    ["/feature/material", "feature"],
    ["/feature/sizeUm", "size"],
    ["/feature/widthUm", "width"],
    ["/feature/lengthUm", "length"],
    ["/host/material/densityGCm3", "hostDensity"],
    ["/host/material", "host"],
    ["/host/thicknessMm", "thickness"],
    ["/layers", "layers"],
    ["/setup/energiesKeV", "energies"],
    ["/setup/distancesM", "distances"],
    ["/setup/sourceDistanceM", "source"],
    ["/setup/sourceFwhmUm", "sourceSize"],
    ["/setup/detectorFwhmUm", "blur"],
    ["/setup/pixelUm", "pixel"],
    ["/setup/efficiency", "screen"],
    ["/setup/bandwidth", "bandwidth"],
    ["/setup/fluxPerSMm2", "flux"],
    ["/setup", "setup"],
    ["/limits/doseGy", "dose"],
    ["/limits/timeS", "time"],
    ["/limits/transmission", "pass"],
    ["/threshold", "threshold"],
    ["/minimumCounts", "counts"],
    ["/nearFieldLimit", "nearField"],
    ["/projections", "projections"],
    ["/objective", "objective"],
    ["/use", "use"],
  ];
  return known.find(([prefix]) => path.startsWith(prefix))?.[1] ?? "feature";
}

function plainMessage(issue: { code?: string; message: string; minimum?: unknown; maximum?: unknown }): string {
  if (issue.code === "too_small") return `That is too small: at least ${String(issue.minimum)} is accepted.`;
  if (issue.code === "too_big") return `That is too large: at most ${String(issue.maximum)} is accepted.`;
  return issue.message;
}

/** Dose where the host holds hydrogen (water, tissue, polymers are harmed by it); otherwise time where the flux is known, else fluence. */
function proposedObjective(host: StatedMaterial, setup: RankRequest["setup"]): "dose" | "time" | "fluence" {
  if (host.material.massFractions.has(1)) return "dose";
  const figures = "setupId" in setup ? exampleSetup(setup.setupId)?.setup : setup;
  return figures?.fluxPerSMm2 ? "time" : "fluence";
}

/** Runs `read`; what cannot be read becomes a fault of the field. */
function inPlanField<T>(field: PlanField, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (error instanceof QuantityError) throw new FieldError(field, error.message, { position: error.position });
    throw error;
  }
}

function length(
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

function extents(question: PlanQuestion): { lengthUm?: number; widthUm?: number } {
  if (question.shape === "sphere") return {};
  return {
    ...(question.length === "" ? {} : { lengthUm: tidy(length(question, "length", "um") * 1e6) }),
    ...(question.shape === "layer" ? { widthUm: tidy(layerWidth(question) * 1e6) } : {}),
  };
}

function layerWidth(question: PlanQuestion): number {
  if (question.width === "")
    throw new FieldError("width", "A layer needs its width across the beam. Write one such as 5 um.");
  return length(question, "width", "um");
}

/** Feature or host, by the fields that the look-up has. */
function material(question: PlanQuestion, which: "feature" | "host", finder: MaterialFinder): StatedMaterial {
  return stated(
    {
      material: question[which],
      density: question[`${which}Density`],
      parts: question[`${which}Parts`],
      by: question[`${which}By`],
    },
    { material: which, density: `${which}Density`, parts: `${which}Parts` },
    finder,
  );
}

function stated(
  words: { material: string; density: string; parts?: string; by?: PlanQuestion["hostBy"] },
  fields: { material: PlanField; density: PlanField; parts: PlanField },
  finder: MaterialFinder,
): StatedMaterial {
  try {
    return statedMaterial({ ...DEFAULT_QUESTION, parts: "", by: "mass", ...words }, finder);
  } catch (error) {
    if (!(error instanceof QuestionError)) throw error;
    const { field, message, position, suggestions } = error.fault;
    const place = field === "density" ? fields.density : field === "parts" ? fields.parts : fields.material;
    throw new FieldError(place, message, { position, suggestions });
  }
}

function readLayers(question: PlanQuestion, finder: MaterialFinder): NonNullable<RankRequest["layers"]> {
  const lines = readLayerLines(question.layers);
  if (lines.length > PLAN_LIMITS.layers)
    throw new FieldError(
      "layers",
      `${lines.length} layers are written; at most ${PLAN_LIMITS.layers} are taken. Join some.`,
    );
  return lines.map((line, index) => {
    try {
      const thicknessM = parseQuantity(line.thickness, "length", { defaultUnit: "mm" });
      if (!(thicknessM > 0)) throw new FieldError("layers", "Its thickness must be above 0, such as 1 mm.");
      const { statement } = stated(line, { material: "layers", density: "layers", parts: "layers" }, finder);
      return { material: statement, thicknessMm: tidy(thicknessM * 1e3), position: line.position };
    } catch (error) {
      if (!(error instanceof FieldError) && !(error instanceof QuantityError)) throw error;
      throw new FieldError("layers", `Layer ${index + 1}: ${error.message}`);
    }
  });
}

function readSetup(question: PlanQuestion, finder: MaterialFinder, halfHostM: number): RankRequest["setup"] {
  const example = exampleSetup(question.setup);
  if (!example && question.setup !== OWN_SETUP)
    throw new FieldError(
      "setup",
      `There is no setup called “${question.setup.slice(0, 40)}”. Take one of the examples, or type one in.`,
    );
  if (example && question.energies === "" && question.distances === "") return { setupId: example.id };
  const figures = example ? example.setup : ownSetup(question, finder);
  return {
    ...figures,
    energiesKeV:
      question.energies === "" ? figures.energiesKeV : inPlanField("energies", () => energies(question.energies)),
    distancesM:
      question.distances === ""
        ? figures.distancesM
        : inPlanField("distances", () => distances(question.distances, Math.max(halfHostM, 0.001))),
  };
}

function distances(text: string, closestM: number): StatedSetup["distancesM"] {
  const read: number[] | RangeChoice = readDistances(text, tidy(closestM));
  return read;
}

/** "8 to 40 keV" as a range, so that energies beside edges are added; a list as it is. */
function energies(text: string): StatedSetup["energiesKeV"] {
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

function ownSetup(question: PlanQuestion, finder: MaterialFinder): StatedSetup {
  const parallel = /^\s*(parallel|plane|∞|infinite)\s*$/i.test(question.source);
  const flux = readFlux(question);
  const screen = readScreen(question, finder);
  return {
    sourceDistanceM: parallel ? null : length(question, "source", "m"),
    sourceFwhmUm: tidy(length(question, "sourceSize", "um") * 1e6),
    detectorFwhmUm: tidy(length(question, "blur", "um") * 1e6),
    pixelUm: tidy(length(question, "pixel", "um") * 1e6),
    ...(screen === null ? {} : { efficiency: screen }),
    ...(question.bandwidth === "" ? {} : { bandwidth: share(question, "bandwidth", 0, 0.6) }),
    ...(flux === null ? {} : { fluxPerSMm2: flux }),
    energiesKeV: { from: 10, to: 60, count: PLAN_ENERGIES },
    distancesM: { from: 0.005, to: 3, count: 56 },
  };
}

function share(
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

function readScreen(question: PlanQuestion, finder: MaterialFinder): StatedSetup["efficiency"] | null {
  if (question.screen === "") return null;
  const [first = "", thickness = "", density = ""] = question.screen.split(";").map((part) => part.trim());
  if (thickness === "" && /^[\d.]+\s*%?$/.test(first)) {
    const value = share(question, "screen", 0, 1, first);
    if (value === 0)
      throw new FieldError("screen", "A detector that counts nothing shows nothing. Write a share above 0 %.");
    return value;
  }
  if (thickness === "")
    throw new FieldError(
      "screen",
      "Write a share such as 40 %, or a screen as material; thickness; density, such as Gd2O2S; 20 um; 7.3 g/cm3.",
    );
  const { statement } = stated(
    { material: first, density },
    { material: "screen", density: "screen", parts: "screen" },
    finder,
  );
  const thicknessM = inPlanField("screen", () => parseQuantity(thickness, "length", { defaultUnit: "um" }));
  return { scintillator: statement satisfies MaterialStatement, thicknessUm: tidy(thicknessM * 1e6) };
}

function readFlux(question: PlanQuestion): StatedSetup["fluxPerSMm2"] | null {
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

function readLimits(question: PlanQuestion): NonNullable<RankRequest["limits"]> {
  const positive = (field: "dose" | "time", unit: string): number | null => {
    if (question[field] === "") return null;
    const value = inPlanField(field, () => parseQuantity(question[field], field, { defaultUnit: unit }));
    if (!(value > 0))
      throw new FieldError(field, `A limit is above 0. Write one such as ${field === "dose" ? "10 Gy" : "60 s"}.`);
    return value;
  };
  const doseGy = positive("dose", "Gy");
  const timeS = positive("time", "s");
  const transmission = question.pass === "" ? null : readPass(question);
  return {
    ...(doseGy === null ? {} : { doseGy }),
    ...(timeS === null ? {} : { timeS }),
    ...(transmission === null ? {} : { transmission }),
  };
}

function readPass(question: PlanQuestion): [number, number] {
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

function number(
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
