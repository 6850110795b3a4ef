/** An answer in the units of the edges and as plain data, so that a page can hand it to an island. Nothing is rounded here but curves. */
import {
  angstromFromM,
  type ConstantsNote,
  elementByNumber,
  kevFromEv,
  type OpticalConstants,
  type PairContrast,
  perCmFromPerM,
  type TabulationKey,
} from "#src/lib/physics/index.ts";
import type { Answer, MaterialAnswer, ThicknessAnswer } from "./answer.ts";
import type { FieldFault } from "./state-material.ts";
import type { ValueRow } from "./values.ts";

export interface ConstantsValues {
  readonly wavelengthAngstrom: number;
  readonly delta: number;
  readonly beta: number;
  readonly betaEffective: number;
  readonly muPhotoPerCm: number;
  readonly muCoherentPerCm: number;
  readonly muIncoherentPerCm: number;
  readonly muTotalPerCm: number;
  readonly muEnergyAbsorptionPerCm: number;
  readonly attenuationLengthMm: number | null;
  readonly halfValueMm: number | null;
  readonly deltaOverBeta: number | null;
  readonly deltaOverBetaEffective: number | null;
  readonly phasePerMicrometreRad: number;
  readonly twoPiMicrometre: number | null;
  readonly criticalAngleMrad: number | null;
}

export interface RowView {
  readonly energyKeV: number;
  readonly values: ConstantsValues | null;
  /** δ, β and μ of each tabulation; null where it does not cover the energy. */
  readonly tabulations: Readonly<Record<TabulationKey, { delta: number; beta: number; muTotalPerCm: number } | null>>;
  readonly spread: { readonly delta: Span; readonly beta: Span; readonly muTotalPerCm: Span } | null;
  readonly notes: readonly ConstantsNote[];
  readonly edgeNear: EdgeView | null;
}
export type Span = readonly [number, number];

export interface EdgeView {
  readonly element: string;
  readonly shell: string;
  readonly energyKeV: number;
}

export interface CurveView {
  readonly energiesKeV: readonly number[];
  readonly delta: readonly (number | null)[];
  readonly beta: readonly (number | null)[];
  readonly muPhotoPerCm: readonly (number | null)[];
  readonly muTotalPerCm: readonly (number | null)[];
  readonly deltaOverBeta: readonly (number | null)[];
}

export interface MaterialView {
  readonly label: string;
  readonly formula: string | null;
  readonly keptId: string | null;
  readonly densityGCm3: number;
  readonly densityEstimated: boolean;
  readonly densityUncertaintyPercent: number;
  readonly scaledFromPercent: number | null;
  readonly molarMassGPerMol: number | null;
  readonly electronDensityPerA3: number;
  /** By symbol, largest first. */
  readonly massFractions: readonly (readonly [string, number])[];
  readonly missing: readonly string[];
  readonly row: RowView | null;
  readonly curve: CurveView;
}

export interface PairView {
  readonly deltaDelta: number;
  readonly deltaMuPerCm: number;
  readonly gamma: number | null;
}

export interface PairCurveView {
  readonly energiesKeV: readonly number[];
  readonly deltaDelta: readonly (number | null)[];
  readonly deltaMuPerCm: readonly (number | null)[];
  readonly gamma: readonly (number | null)[];
}

export interface ThicknessView {
  readonly thicknessMm: number | null;
  readonly wantedTransmission: number | null;
  readonly transmission: number | null;
  readonly thicknessForTransmissionMm: number | null;
  readonly energies: readonly { readonly energyKeV: number; readonly atEdge: boolean }[] | null;
}

export interface View {
  readonly faults: readonly FieldFault[];
  readonly tableVersion: string;
  readonly tabulation: TabulationKey;
  readonly energyKeV: number | null;
  readonly rangeKeV: Span;
  readonly main: MaterialView | null;
  readonly others: readonly MaterialView[];
  readonly edges: readonly EdgeView[];
  readonly list: readonly RowView[];
  /** Largest difference between tables over the value of the chosen one, at each point of the main curve. */
  readonly curveSpread: { readonly delta: readonly (number | null)[]; readonly beta: readonly (number | null)[] };
  readonly pair: PairView | null;
  readonly pairCurve: PairCurveView | null;
  readonly thickness: ThicknessView | null;
}

export function viewOf(answer: Answer): View {
  return {
    faults: answer.faults,
    tableVersion: answer.tableVersion,
    tabulation: answer.tabulation,
    energyKeV: answer.energyEv === null ? null : kev(answer.energyEv),
    rangeKeV: [kev(answer.curveRangeEv[0]), kev(answer.curveRangeEv[1])],
    main: answer.main && materialView(answer.main),
    others: answer.others.map(materialView),
    edges: answer.edges.map(edgeView),
    list: answer.list.map(rowView),
    curveSpread: curveSpread(answer),
    pair: answer.pair && pairView(answer.pair),
    pairCurve: pairCurveView(answer.pairCurve),
    thickness: answer.thickness && thicknessView(answer.thickness),
  };
}

// 8048 eV is 8.048 keV: the division's last bit must not show.
const kev = (energyEv: number): number => Number(kevFromEv(energyEv).toPrecision(12));
/** Curves are drawn, not read: five digits keep the page small. */
const drawn = (value: number | null | undefined): number | null =>
  value === null || value === undefined || !Number.isFinite(value) ? null : Number(value.toPrecision(5));
const drawnEnergy = (energyEv: number): number => Number(kevFromEv(energyEv).toPrecision(10));

export function valuesOf(constants: OpticalConstants): ConstantsValues {
  const { attenuationLengthM, criticalAngleRad, delta, betaEffective, wavelengthM } = constants;
  return {
    wavelengthAngstrom: angstromFromM(wavelengthM),
    delta,
    beta: constants.beta,
    betaEffective,
    muPhotoPerCm: perCmFromPerM(constants.muPhotoPerM),
    muCoherentPerCm: perCmFromPerM(constants.muCoherentPerM),
    muIncoherentPerCm: perCmFromPerM(constants.muIncoherentPerM),
    muTotalPerCm: perCmFromPerM(constants.muTotalPerM),
    muEnergyAbsorptionPerCm: perCmFromPerM(constants.muEnergyAbsorptionPerM),
    attenuationLengthMm: attenuationLengthM === null ? null : attenuationLengthM * 1e3,
    halfValueMm: attenuationLengthM === null ? null : attenuationLengthM * 1e3 * Math.LN2,
    deltaOverBeta: constants.deltaOverBeta,
    deltaOverBetaEffective: betaEffective > 0 ? delta / betaEffective : null,
    phasePerMicrometreRad: constants.phasePerM * 1e-6,
    twoPiMicrometre: delta > 0 ? (wavelengthM / delta) * 1e6 : null,
    criticalAngleMrad: criticalAngleRad === null ? null : criticalAngleRad * 1e3,
  };
}

const edgeView = (edge: { element: string; shell: string; energyEv: number }): EdgeView => ({
  element: edge.element,
  shell: edge.shell,
  energyKeV: kev(edge.energyEv),
});

function rowView(row: ValueRow): RowView {
  const short = (key: TabulationKey): RowView["tabulations"][TabulationKey] => {
    const constants = row.byTabulation.get(key);
    return constants
      ? { delta: constants.delta, beta: constants.beta, muTotalPerCm: perCmFromPerM(constants.muTotalPerM) }
      : null;
  };
  const perCm = ([low, high]: Span): Span => [perCmFromPerM(low), perCmFromPerM(high)];
  return {
    energyKeV: kev(row.energyEv),
    values: row.constants && valuesOf(row.constants),
    tabulations: { epdl97: short("epdl97"), henke93: short("henke93"), chantler95: short("chantler95") },
    spread: row.spread && {
      delta: row.spread.delta,
      beta: row.spread.beta,
      muTotalPerCm: perCm(row.spread.muTotalPerM),
    },
    notes: row.notes,
    edgeNear: row.edgeNear && edgeView(row.edgeNear),
  };
}

function materialView(answer: MaterialAnswer): MaterialView {
  const { stated } = answer;
  const { rows, columns } = answer.curve;
  return {
    label: stated.label,
    formula: stated.formula,
    keptId: stated.kept?.id ?? null,
    densityGCm3: stated.densityGCm3,
    densityEstimated: stated.material.densityEstimated,
    densityUncertaintyPercent: stated.densityUncertaintyPercent,
    scaledFromPercent: stated.scaledFromPercent,
    molarMassGPerMol: stated.material.molarMassGPerMol,
    electronDensityPerA3: answer.electronDensityPerM3 * 1e-30,
    massFractions: [...stated.material.massFractions]
      .sort(([, a], [, b]) => b - a)
      .map(([atomicNumber, fraction]) => [elementByNumber(atomicNumber).symbol, fraction] as const),
    missing: answer.missing.map((atomicNumber) => elementByNumber(atomicNumber).symbol),
    row: answer.value && rowView(answer.value),
    curve: {
      energiesKeV: Array.from(columns.energiesEv, drawnEnergy),
      delta: rows.map((row) => drawn(row?.delta)),
      beta: rows.map((row) => drawn(row?.beta)),
      muPhotoPerCm: rows.map((row) => drawn(row && perCmFromPerM(row.muPhotoPerM))),
      muTotalPerCm: rows.map((row) => drawn(row && perCmFromPerM(row.muTotalPerM))),
      deltaOverBeta: rows.map((row) => drawn(row?.deltaOverBeta)),
    },
  };
}

const pairView = (pair: PairContrast): PairView => ({
  deltaDelta: pair.deltaDelta,
  deltaMuPerCm: perCmFromPerM(pair.deltaMuPerM),
  gamma: pair.gamma,
});

function pairCurveView(pairs: Answer["pairCurve"]): PairCurveView | null {
  if (!pairs) return null;
  return {
    energiesKeV: pairs.energiesEv.map(drawnEnergy),
    deltaDelta: pairs.contrasts.map((pair) => drawn(pair?.deltaDelta)),
    deltaMuPerCm: pairs.contrasts.map((pair) => drawn(pair && perCmFromPerM(pair.deltaMuPerM))),
    gamma: pairs.contrasts.map((pair) => drawn(pair?.gamma)),
  };
}

function curveSpread(answer: Answer): View["curveSpread"] {
  const width = (index: number, quantity: "delta" | "beta"): number | null => {
    const spread = answer.curveSpread[index];
    const value = answer.main?.curve.rows[index]?.[quantity];
    if (!spread || !value) return null;
    return drawn((spread[quantity][1] - spread[quantity][0]) / Math.abs(value));
  };
  const indices = answer.curveSpread.map((_, index) => index);
  return { delta: indices.map((index) => width(index, "delta")), beta: indices.map((index) => width(index, "beta")) };
}

function thicknessView(thickness: ThicknessAnswer): ThicknessView {
  const mm = (lengthM: number | null): number | null => (lengthM === null ? null : lengthM * 1e3);
  return {
    thicknessMm: mm(thickness.thicknessM),
    wantedTransmission: thickness.wantedTransmission,
    transmission: thickness.transmission,
    thicknessForTransmissionMm: mm(thickness.thicknessForTransmissionM),
    energies:
      thickness.energies &&
      thickness.energies.map(({ energyEv, atEdge }) => ({ energyKeV: kevFromEv(energyEv), atEdge })),
  };
}
