/** The answer to a look-up: values, spread, notes, curves, thickness. Pure: server page, exports and island share it. */
import {
  compareTabulations,
  constantsAtRow,
  constantsOverEnergy,
  type ConstantsOverEnergy,
  DEFAULT_TABULATION,
  type Edge,
  edgesOf,
  electronDensityPerM3,
  energiesForTransmission,
  kevFromEv,
  missingElements,
  type OpticalConstants,
  pairContrast,
  type PairContrast,
  type ScatteringTables,
  type Spread,
  type TabulationKey,
  thicknessForTransmissionM,
  type TransmissionEnergy,
  transmission,
} from "#src/lib/physics/index.ts";
import { parseEnergies, parseQuantity } from "#src/lib/quantities/index.ts";
import type { MaterialFinder } from "./finder.ts";
import type { Question } from "./question.ts";
import { type ValueRow, valueRows } from "./values.ts";
import {
  type FieldFault,
  inField,
  materialOfLine,
  QuestionError,
  statedMaterial,
  type StatedMaterial,
} from "./state-material.ts";

/** Materials shown together at most, the main one included. */
export const MAX_MATERIALS = 8;
export const MAX_LIST_ENERGIES = 2000;
const CURVE_POINTS = 240;

export interface MaterialCurve {
  readonly columns: ConstantsOverEnergy;
  readonly rows: readonly (OpticalConstants | null)[];
}

export interface MaterialAnswer {
  readonly stated: StatedMaterial;
  readonly electronDensityPerM3: number;
  /** At the question's energy; null while that is not known. */
  readonly value: ValueRow | null;
  readonly curve: MaterialCurve;
  /** By atomic number: elements that the chosen table does not hold. */
  readonly missing: readonly number[];
}

export interface PairCurve {
  readonly energiesEv: readonly number[];
  readonly contrasts: readonly (PairContrast | null)[];
}

export interface ThicknessAnswer {
  readonly thicknessM: number | null;
  readonly wantedTransmission: number | null;
  /** Of `thicknessM` at the question's energy. */
  readonly transmission: number | null;
  readonly thicknessForTransmissionM: number | null;
  /** Energies at which `thicknessM` transmits what is wanted, within the curve's range. */
  readonly energies: readonly TransmissionEnergy[] | null;
}

export interface Answer {
  readonly faults: readonly FieldFault[];
  readonly tableVersion: string;
  readonly tabulation: TabulationKey;
  readonly energyEv: number | null;
  readonly curveRangeEv: readonly [number, number];
  readonly main: MaterialAnswer | null;
  readonly others: readonly MaterialAnswer[];
  readonly edges: readonly Edge[];
  readonly list: readonly ValueRow[];
  /** For the curve's spread strip, one a curve point. */
  readonly curveSpread: readonly (Spread | null)[];
  /** Main material minus the first of the others, at the energy and over the curve. */
  readonly pair: PairContrast | null;
  readonly pairCurve: PairCurve | null;
  readonly thickness: ThicknessAnswer | null;
}

/** Answers every part that can be answered; each part that cannot leaves a fault naming its field. */
export function answerQuestion(question: Question, tables: ScatteringTables, finder: MaterialFinder): Answer {
  const faults: FieldFault[] = [];
  const attempt = <T>(read: () => T): T | null => {
    try {
      return read();
    } catch (error) {
      if (!(error instanceof QuestionError)) throw error;
      faults.push(error.fault);
      return null;
    }
  };
  const { table: tabulation } = question;
  const energyEv = attempt(() => oneEnergy(question.energy, "energy", tables, tabulation));
  const range = attempt(() => curveRange(question, tables)) ?? defaultRange(tables, tabulation);
  const stated = attempt(() => statedMaterial(question, finder));
  const others = question.with
    .split("\n")
    .filter((line) => line.trim() !== "")
    .flatMap((line, index) => {
      if (index >= MAX_MATERIALS - 1) {
        if (index === MAX_MATERIALS - 1)
          faults.push({
            field: "with",
            message: `At most ${MAX_MATERIALS} materials are shown together. Take some out.`,
            position: null,
            suggestions: [],
          });
        return [];
      }
      const other = attempt(() => materialOfLine(line.trim(), finder));
      return other ? [other] : [];
    });
  const listed = attempt(() => listEnergies(question, tables)) ?? [];
  const edges = stated ? edgesOf(stated.material, tables, range) : [];
  const grid = curveGrid(
    range,
    edges.map((edge) => edge.energyEv),
  );
  const main = stated ? materialAnswer(stated, energyEv, grid, tables, tabulation) : null;
  const otherAnswers = others.map((other) => {
    const otherEdges = edgesOf(other.material, tables, range).map((edge) => edge.energyEv);
    return materialAnswer(other, energyEv, curveGrid(range, otherEdges), tables, tabulation);
  });
  return {
    faults,
    tableVersion: tables.version,
    tabulation,
    energyEv,
    curveRangeEv: range,
    main,
    others: otherAnswers,
    edges,
    list: stated ? valueRows(stated.material, listed, tables, tabulation) : [],
    curveSpread: stated ? spreadOver(stated, grid, tables) : [],
    pair: pairContrast(main?.value?.constants ?? null, otherAnswers[0]?.value?.constants ?? null),
    pairCurve: stated && others[0] ? pairCurve(stated, others[0], range, tables, tabulation) : null,
    thickness: main ? thicknessAnswer(question, main, range, tables, attempt) : null,
  };
}

function pairCurve(
  first: StatedMaterial,
  second: StatedMaterial,
  rangeEv: readonly [number, number],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): PairCurve {
  const edges = [...edgesOf(first.material, tables, rangeEv), ...edgesOf(second.material, tables, rangeEv)].map(
    (edge) => edge.energyEv,
  );
  const energiesEv = curveGrid(rangeEv, edges);
  const a = constantsOverEnergy(first.material, energiesEv, tables, tabulation);
  const b = constantsOverEnergy(second.material, energiesEv, tables, tabulation);
  return {
    energiesEv,
    contrasts: energiesEv.map((_, index) => pairContrast(constantsAtRow(a, index), constantsAtRow(b, index))),
  };
}

function materialAnswer(
  stated: StatedMaterial,
  energyEv: number | null,
  grid: readonly number[],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): MaterialAnswer {
  const columns = constantsOverEnergy(stated.material, grid, tables, tabulation);
  return {
    stated,
    electronDensityPerM3: electronDensityPerM3(stated.material),
    value: energyEv === null ? null : (valueRows(stated.material, [energyEv], tables, tabulation)[0] ?? null),
    curve: { columns, rows: grid.map((_, index) => constantsAtRow(columns, index)) },
    missing: missingElements(stated.material, tables, tabulation),
  };
}

function spreadOver(stated: StatedMaterial, grid: readonly number[], tables: ScatteringTables): (Spread | null)[] {
  return compareTabulations(stated.material, grid, tables, DEFAULT_TABULATION).map(({ spread }) => spread);
}

// Both sides of an edge are sampled, so that no line is drawn across it: the smallest step below that a double can hold well.
const BELOW_EDGE = 1 - 1e-9;

/** Energies in eV, evenly spaced in log E, with both sides of every edge. */
export function curveGrid(rangeEv: readonly [number, number], edgesEv: readonly number[]): number[] {
  const [from, to] = rangeEv;
  const grid = Array.from({ length: CURVE_POINTS }, (_, index) => from * (to / from) ** (index / (CURVE_POINTS - 1)));
  grid[CURVE_POINTS - 1] = to;
  for (const edge of edgesEv) grid.push(edge * BELOW_EDGE, edge);
  return [...new Set(grid)].filter((energy) => energy >= from && energy <= to).sort((a, b) => a - b);
}

function rangeText(tables: ScatteringTables, tabulation: TabulationKey): string {
  const [from, to] = tables.tabulations[tabulation].rangeEv;
  return `${kevFromEv(from)} to ${kevFromEv(to)} keV`;
}

function refuseOutside(
  energyEv: number,
  field: "energy" | "list" | "from" | "to",
  tables: ScatteringTables,
  tabulation: TabulationKey,
): void {
  const [from, to] = tables.tabulations[tabulation].rangeEv;
  if (energyEv >= from && energyEv <= to) return;
  const nearest = kevFromEv(energyEv < from ? from : to);
  throw new QuestionError(
    field,
    `${Number(kevFromEv(energyEv).toPrecision(6))} keV is outside the table, which covers ${rangeText(tables, tabulation)}.`,
    {
      suggestions: [{ text: `${nearest} keV`, words: `${nearest} keV, the nearest covered` }],
    },
  );
}

function oneEnergy(
  text: string,
  field: "energy" | "from" | "to",
  tables: ScatteringTables,
  tabulation: TabulationKey,
): number {
  return inField(field, () => {
    const { energiesEv } = parseEnergies(text, { defaultUnit: "keV" });
    const energyEv = energiesEv[0];
    if (energyEv === undefined || energiesEv.length !== 1)
      throw new QuestionError(field, "Write one energy here, such as 20 keV. Several go into the list of energies.");
    refuseOutside(energyEv, field, tables, tabulation);
    return energyEv;
  });
}

function listEnergies(question: Question, tables: ScatteringTables): number[] {
  if (question.list === "") return [];
  return inField("list", () => {
    const { energiesEv } = parseEnergies(question.list, { defaultUnit: "keV" });
    for (const energyEv of energiesEv) refuseOutside(energyEv, "list", tables, question.table);
    return [...energiesEv];
  });
}

function defaultRange(tables: ScatteringTables, tabulation: TabulationKey): readonly [number, number] {
  const [from, to] = tables.tabulations[tabulation].rangeEv;
  return [Math.max(from, 5000), Math.min(to, 100_000)];
}

function curveRange(question: Question, tables: ScatteringTables): readonly [number, number] {
  const [lowest, highest] = tables.tabulations[DEFAULT_TABULATION].rangeEv;
  const from = inField("from", () => oneEnergy(question.from, "from", tables, DEFAULT_TABULATION));
  const to = inField("to", () => oneEnergy(question.to, "to", tables, DEFAULT_TABULATION));
  if (!(from < to))
    throw new QuestionError(
      "to",
      `The curve would end at ${kevFromEv(to)} keV, below its start at ${kevFromEv(from)} keV. Swap them.`,
    );
  return [Math.max(from, lowest), Math.min(to, highest)];
}

function thicknessAnswer(
  question: Question,
  main: MaterialAnswer,
  rangeEv: readonly [number, number],
  tables: ScatteringTables,
  attempt: <T>(read: () => T) => T | null,
): ThicknessAnswer {
  const thicknessM = attempt(() =>
    inField("thickness", () => {
      const value = parseQuantity(question.thickness, "length", { defaultUnit: "mm" });
      if (!(value > 0))
        throw new QuestionError(
          "thickness",
          `A thickness of ${question.thickness.slice(0, 20)} is not accepted. Write one above 0.`,
        );
      return value;
    }),
  );
  const wanted = attempt(() =>
    inField("pass", () => {
      const value = parseQuantity(question.pass, "fraction", { defaultUnit: "%" });
      if (!(value > 0) || !(value < 1))
        throw new QuestionError(
          "pass",
          `A transmission of ${question.pass.slice(0, 20)} is not accepted. Write one between 0 and 100 %.`,
        );
      return value;
    }),
  );
  const constants = main.value?.constants ?? null;
  const complete = main.missing.length === 0 && main.stated.material.densityKgPerM3 > 0;
  return {
    thicknessM,
    wantedTransmission: wanted,
    transmission: constants && thicknessM !== null ? transmission(constants.muTotalPerM, thicknessM) : null,
    thicknessForTransmissionM:
      constants && wanted !== null ? thicknessForTransmissionM(constants.muTotalPerM, wanted) : null,
    energies:
      thicknessM !== null && wanted !== null && complete
        ? energiesForTransmission(
            main.stated.material,
            thicknessM,
            wanted,
            tables,
            question.table,
            clampRange(rangeEv, tables, question.table),
          )
        : null,
  };
}

function clampRange(
  rangeEv: readonly [number, number],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): readonly [number, number] {
  const [from, to] = tables.tabulations[tabulation].rangeEv;
  return [Math.max(rangeEv[0], from), Math.min(rangeEv[1], to)];
}
