/** Optical constants of a stated material at stated energies: the one use case behind GET, POST and batch. */
import { citation } from "#src/lib/lookup/citation.ts";
import { valueRows } from "#src/lib/lookup/values.ts";
import { valuesOf } from "#src/lib/lookup/view.ts";
import { ProblemError } from "#src/lib/http/problems.ts";
import { validate } from "#src/lib/http/validate.ts";
import { densityGCm3, type MaterialLookup, resolveMaterial, StatementError } from "#src/lib/materials/resolve.ts";
import {
  angstromFromM,
  AVOGADRO,
  cm2PerGFromM2PerAtom,
  DEFAULT_TABULATION,
  edgesOf,
  elementByNumber,
  elementBySymbol,
  electronDensityPerM3,
  evFromKev,
  kevFromEv,
  perCmFromPerM,
  type ScatteringTables,
  type TabulationKey,
  wavelengthM,
} from "#src/lib/physics/index.ts";
import {
  type ConstantsAnswer,
  type ConstantsRequest,
  CONSTANTS_LIMITS,
  constantsRequestSchema,
  type FactorsAnswer,
} from "#src/lib/schemas/constants.ts";

type Energies = ConstantsRequest["energiesKeV"];

/** The energies asked for, in keV, in the order given. A range has both its ends. */
export function energiesOf(energies: Energies): number[] {
  if (Array.isArray(energies)) return energies;
  const { from, to, count, spacing = "log" } = energies;
  if (count === 1) return [from];
  return Array.from({ length: count }, (_, index) => {
    if (index === 0) return from;
    if (index === count - 1) return to;
    const share = index / (count - 1);
    return spacing === "linear" ? from + share * (to - from) : from * (to / from) ** share;
  });
}

/**
 * At most 60 ms of one core for the largest request (every element, 2,000 energies).
 * @param materialPath where the material stands in what was asked, for faults
 * @throws ProblemError invalid for a material that cannot be or an energy outside the table, notFound for an unknown material
 */
export function computeConstants(
  request: ConstantsRequest,
  tables: ScatteringTables,
  lookup: MaterialLookup,
  materialPath = "/material",
): ConstantsAnswer {
  const tabulation = request.tabulation ?? DEFAULT_TABULATION;
  const energiesKeV = energiesOf(request.energiesKeV);
  refuseOutside(energiesKeV, tables, tabulation);
  const { material, label, formula } = attributed(materialPath, () => resolveMaterial(request.material, lookup));
  const energiesEv = energiesKeV.map(tidyEv);
  const rows = valueRows(material, energiesEv, tables, tabulation);
  const range: [number, number] = [
    energiesEv.reduce((a, b) => Math.min(a, b)),
    energiesEv.reduce((a, b) => Math.max(a, b)),
  ];
  return {
    table: { version: tables.version, tabulation },
    material: {
      label,
      formula,
      densityGCm3: densityGCm3(material),
      densityEstimated: material.densityEstimated,
      molarMassGPerMol: material.molarMassGPerMol,
      massFractions: Object.fromEntries(
        [...material.massFractions].map(([atomicNumber, share]) => [elementByNumber(atomicNumber).symbol, share]),
      ),
      electronDensityPerA3: electronDensityPerM3(material) * 1e-30,
    },
    edges: edgesOf(material, tables, range).map(({ element, shell, energyEv }) => ({
      element,
      shell,
      energyKeV: tidyKeV(energyEv),
    })),
    rows: rows.map((row, index) => rowAnswer(row, energiesKeV[index] as number)),
    citation: citation(tables.version, tabulation),
  };
}

/**
 * Many requests, each answered or refused by itself. Yields between items, so that a long batch does not hold others up.
 * @param items as they were sent: each is judged by itself, so that one fault does not spoil the others
 * @throws ProblemError invalid where all items together ask for too many rows
 */
export async function computeBatch<Refusal>(
  items: readonly unknown[],
  tables: ScatteringTables,
  lookup: MaterialLookup,
  refuse: (error: unknown, index: number) => Refusal,
): Promise<(ConstantsAnswer | Refusal)[]> {
  const read = items.map((item, index) => {
    try {
      return { request: validate(constantsRequestSchema, item, "The item is not valid.") };
    } catch (error) {
      return { refusal: refuse(error, index) };
    }
  });
  const rows = read.reduce((sum, { request }) => sum + (request ? countOf(request.energiesKeV) : 0), 0);
  if (rows > CONSTANTS_LIMITS.batchRows) {
    throw new ProblemError(
      "invalid",
      `The batch asks for ${rows} rows; at most ${CONSTANTS_LIMITS.batchRows} are answered at once. Send it in parts.`,
      {
        errors: [
          {
            path: "/items",
            code: "tooManyRows",
            message: `At most ${CONSTANTS_LIMITS.batchRows} energies in all items together.`,
          },
        ],
      },
    );
  }
  const results: (ConstantsAnswer | Refusal)[] = [];
  for (const [index, { request, refusal }] of read.entries()) {
    if (!request) {
      results.push(refusal as Refusal);
      continue;
    }
    try {
      results.push(computeConstants(request, tables, lookup));
    } catch (error) {
      results.push(refuse(error, index));
    }
    await new Promise((resolve) => setImmediate(resolve));
  }
  return results;
}

const countOf = (energies: Energies): number => (Array.isArray(energies) ? energies.length : energies.count);

/** The tabulated factors of one element. @throws ProblemError notFound */
export function elementFactors(
  symbol: string,
  asked: TabulationKey | undefined,
  tables: ScatteringTables,
): FactorsAnswer {
  const tabulation = asked ?? DEFAULT_TABULATION;
  const element = elementBySymbol(symbol);
  const factors = element && tables.tabulations[tabulation].elements.get(element.atomicNumber);
  if (!element || !factors) {
    throw new ProblemError(
      "notFound",
      element
        ? `${element.name} is not in ${tabulation}.`
        : "No element has that symbol. Symbols run from H to Cf, spelt as in the periodic table.",
    );
  }
  const nullable = (values: Float64Array): (number | null)[] =>
    Array.from(values, (value) => (Number.isNaN(value) ? null : value));
  const perGram = (values: Float64Array | null): number[] | null =>
    values && Array.from(values, (value) => cm2PerGFromM2PerAtom(value, AVOGADRO.value, element.standardAtomicWeight));
  return {
    table: { version: tables.version, tabulation },
    symbol: element.symbol,
    atomicNumber: element.atomicNumber,
    energiesKeV: Array.from(factors.energiesEv, tidyKeV),
    f1: nullable(factors.f1),
    f2: nullable(factors.f2),
    coherentCm2PerG: perGram(factors.coherentM2),
    incoherentCm2PerG: perGram(factors.incoherentM2),
    energyAbsorptionCm2PerG: perGram(factors.energyAbsorptionM2),
    edges: (tables.shells.get(element.atomicNumber) ?? []).map(({ shell, edgeEnergyEv }) => ({
      shell,
      energyKeV: tidyKeV(edgeEnergyEv),
    })),
  };
}

// 33.1694 keV is 33169.4 eV: the product's last bit must not push a value over an edge.
const tidyEv = (energyKeV: number): number => Number(evFromKev(energyKeV).toPrecision(14));

// 108.368 eV is 0.108368 keV, not 0.10836799999999999.
const tidyKeV = (energyEv: number): number => Number(kevFromEv(energyEv).toPrecision(14));

function rowAnswer(row: ReturnType<typeof valueRows>[number], energyKeV: number): ConstantsAnswer["rows"][number] {
  const values = row.constants && valuesOf(row.constants);
  return {
    energyKeV,
    wavelengthAngstrom: angstromFromM(wavelengthM(row.energyEv)),
    delta: values?.delta ?? null,
    beta: values?.beta ?? null,
    betaEffective: values?.betaEffective ?? null,
    muPhotoPerCm: values?.muPhotoPerCm ?? null,
    muCoherentPerCm: values?.muCoherentPerCm ?? null,
    muIncoherentPerCm: values?.muIncoherentPerCm ?? null,
    muTotalPerCm: values?.muTotalPerCm ?? null,
    muEnergyAbsorptionPerCm: values?.muEnergyAbsorptionPerCm ?? null,
    attenuationLengthMm: values?.attenuationLengthMm ?? null,
    deltaOverBeta: values?.deltaOverBeta ?? null,
    phasePerMicrometreRad: values?.phasePerMicrometreRad ?? null,
    criticalAngleMrad: values?.criticalAngleMrad ?? null,
    spread: row.spread && {
      delta: [...row.spread.delta],
      beta: [...row.spread.beta],
      muTotalPerCm: [perCmFromPerM(row.spread.muTotalPerM[0]), perCmFromPerM(row.spread.muTotalPerM[1])],
    },
    notes: [...row.notes],
  };
}

function refuseOutside(energiesKeV: readonly number[], tables: ScatteringTables, tabulation: TabulationKey): void {
  const [low, high] = tables.tabulations[tabulation].rangeEv.map(kevFromEv) as [number, number];
  const errors = energiesKeV.flatMap((energyKeV, index) =>
    energyKeV < low || energyKeV > high
      ? [
          {
            path: `/energiesKeV/${index}`,
            code: "outsideTable",
            message: `${energyKeV} keV is outside ${tabulation}, which covers ${low} to ${high} keV.`,
          },
        ]
      : [],
  );
  if (errors.length > 0)
    throw new ProblemError("invalid", `${tabulation} covers ${low} to ${high} keV; nothing is extrapolated.`, {
      errors: errors.slice(0, 20),
    });
}

/** Faults of the material get their place in the request. */
function attributed<T>(materialPath: string, resolve: () => T): T {
  try {
    return resolve();
  } catch (error) {
    if (!(error instanceof StatementError)) throw error;
    const { path, code, message } = error;
    throw new ProblemError(code === "materialNotFound" ? "notFound" : "invalid", message, {
      errors: [{ path: materialPath + path, code, message }],
    });
  }
}
