/** From the words of a plan's question to a request, with faults tied to the field at fault. Pure: the worker and the server share it. */
import type { MaterialFinder } from "#src/lib/lookup/finder.ts";
import { DEFAULT_QUESTION } from "#src/lib/lookup/question.ts";
import { QuestionError, statedMaterial, type StatedMaterial } from "#src/lib/lookup/state-material.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import { type RankRequest, rankRequestSchema, type StatedSetup } from "#src/lib/schemas/plan.ts";
import type { MaterialStatement } from "#src/lib/schemas/material.ts";
import { exampleSetup } from "./examples.ts";
import type { PlanFault } from "./faults.ts";
import { OWN_SETUP, type PlanField, type PlanQuestion, readLayerLines } from "./question.ts";
import {
  FieldError,
  inPlanField,
  isParallel,
  layerWidth,
  OWN_RANGES,
  readFlux,
  readLength,
  readNumber,
  readPass,
  readPlanDistances,
  readPlanEnergies,
  readPositive,
  readShare,
  tidy,
} from "./read-fields.ts";

export interface ReadPlan {
  /** Null where a field cannot be read. */
  readonly request: RankRequest | null;
  readonly faults: readonly PlanFault[];
  /** True where the question left the objective to the page. */
  readonly objectiveProposed: boolean;
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
  const size = attempt(() => readLength(question, "size", "um"));
  const extent = attempt(() => extents(question));
  const feature = attempt(() => material(question, "feature", finder));
  const host = attempt(() => material(question, "host", finder));
  const thickness = attempt(() => readLength(question, "thickness", "mm"));
  const layers = attempt(() => readLayers(question, finder));
  const setup = attempt(() => readSetup(question, finder, (thickness ?? 0) / 2));
  const limits = attempt(() => readLimits(question));
  const threshold = attempt(() => readNumber(question, "threshold", 0.1, 1000));
  const counts = attempt(() => readNumber(question, "counts", 0, 1e9));
  const nearField = attempt(() => readNumber(question, "nearField", 0.01, PLAN_LIMITS.nearField));
  const projections = attempt(() => readNumber(question, "projections", 1, 1_000_000));
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

function extents(question: PlanQuestion): { lengthUm?: number; widthUm?: number } {
  if (question.shape === "sphere") return {};
  return {
    ...(question.length === "" ? {} : { lengthUm: tidy(readLength(question, "length", "um") * 1e6) }),
    ...(question.shape === "layer" ? { widthUm: tidy(layerWidth(question) * 1e6) } : {}),
  };
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
      question.energies === ""
        ? figures.energiesKeV
        : inPlanField("energies", () => readPlanEnergies(question.energies)),
    distancesM:
      question.distances === ""
        ? figures.distancesM
        : inPlanField("distances", () => readPlanDistances(question.distances, Math.max(halfHostM, 0.001))),
  };
}

function ownSetup(question: PlanQuestion, finder: MaterialFinder): StatedSetup {
  const flux = readFlux(question);
  const screen = readScreen(question, finder);
  return {
    sourceDistanceM: isParallel(question.source) ? null : readLength(question, "source", "m"),
    sourceFwhmUm: tidy(readLength(question, "sourceSize", "um") * 1e6),
    detectorFwhmUm: tidy(readLength(question, "blur", "um") * 1e6),
    pixelUm: tidy(readLength(question, "pixel", "um") * 1e6),
    ...(screen === null ? {} : { efficiency: screen }),
    ...(question.bandwidth === "" ? {} : { bandwidth: readShare(question, "bandwidth", 0, 0.6) }),
    ...(flux === null ? {} : { fluxPerSMm2: flux }),
    ...OWN_RANGES,
  };
}

function readScreen(question: PlanQuestion, finder: MaterialFinder): StatedSetup["efficiency"] | null {
  if (question.screen === "") return null;
  const [first = "", thickness = "", density = ""] = question.screen.split(";").map((part) => part.trim());
  if (thickness === "" && /^[\d.]+\s*%?$/.test(first)) {
    const value = readShare(question, "screen", 0, 1, first);
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

function readLimits(question: PlanQuestion): NonNullable<RankRequest["limits"]> {
  const doseGy = readPositive(question, "dose");
  const timeS = readPositive(question, "time");
  const transmission = question.pass === "" ? null : readPass(question);
  return {
    ...(doseGy === null ? {} : { doseGy }),
    ...(timeS === null ? {} : { timeS }),
    ...(transmission === null ? {} : { transmission }),
  };
}
