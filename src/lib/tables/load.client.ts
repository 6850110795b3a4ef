/**
 * Tables in the browser: the factors of the elements that a question needs, fetched once from the API and kept by version.
 * The numbers are the server's own, so that values computed here and there agree to the last digits.
 */
import {
  AVOGADRO,
  elementByNumber,
  type ElementFactors,
  evFromKev,
  type ScatteringTables,
  type Shell,
  TABULATION_KEYS,
  type Tabulation,
  type TabulationKey,
} from "#src/lib/physics/index.ts";
import type { TableInfo } from "./info.ts";

/** The part of `GET /elements/{symbol}/factors` that is used here. */
interface FactorsAnswer {
  readonly energiesKeV: readonly number[];
  readonly f1: readonly (number | null)[];
  readonly f2: readonly (number | null)[];
  readonly coherentCm2PerG: readonly (number | null)[] | null;
  readonly incoherentCm2PerG: readonly (number | null)[] | null;
  readonly energyAbsorptionCm2PerG: readonly (number | null)[] | null;
  readonly edges: readonly { readonly shell: string; readonly energyKeV: number }[];
}

export interface LoadedElement {
  readonly atomicNumber: number;
  readonly factors: ReadonlyMap<TabulationKey, ElementFactors>;
  readonly shells: readonly Shell[];
}

/** Fetches one element in every tabulation that holds it. Rejects where the site does not answer. */
export async function loadElement(atomicNumber: number, info: TableInfo, signal?: AbortSignal): Promise<LoadedElement> {
  const keys = TABULATION_KEYS.filter((key) => info.elements[key].includes(atomicNumber));
  const answers = await Promise.all(keys.map((key) => fetchFactors(atomicNumber, key, info.version, signal)));
  return {
    atomicNumber,
    factors: new Map(keys.map((key, index) => [key, factorsOf(atomicNumber, answers[index] as FactorsAnswer)])),
    shells: (answers[0]?.edges ?? []).map((edge) => ({
      shell: edge.shell,
      edgeEnergyEv: tidyEv(edge.energyKeV),
      fluorescenceYield: null,
      lines: [],
    })),
  };
}

async function fetchFactors(
  atomicNumber: number,
  key: TabulationKey,
  version: string,
  signal?: AbortSignal,
): Promise<FactorsAnswer> {
  const query = new URLSearchParams({ tabulation: key, version });
  const response = await fetch(
    `/api/v1/elements/${elementByNumber(atomicNumber).symbol}/factors?${query}`,
    signal ? { signal } : {},
  );
  if (!response.ok)
    throw new Error(`The table of ${elementByNumber(atomicNumber).name} did not arrive (${response.status}).`);
  return (await response.json()) as FactorsAnswer;
}

// Six digits are kept in the tables: 8.048 keV is 8048 eV again, without the multiplication's last bit.
const tidyEv = (energyKeV: number): number => Number(evFromKev(energyKeV).toPrecision(12));

function factorsOf(atomicNumber: number, answer: FactorsAnswer): ElementFactors {
  const plain = (values: readonly (number | null)[]): Float64Array =>
    Float64Array.from(values, (value) => value ?? Number.NaN);
  const m2PerCm2PerG = (elementByNumber(atomicNumber).standardAtomicWeight / AVOGADRO.value) * 1e-4;
  const perAtom = (values: readonly (number | null)[] | null): Float64Array | null =>
    values && plain(values).map((value) => value * m2PerCm2PerG);
  return {
    atomicNumber,
    energiesEv: Float64Array.from(answer.energiesKeV, tidyEv),
    f1: plain(answer.f1),
    f2: plain(answer.f2),
    coherentM2: perAtom(answer.coherentCm2PerG),
    incoherentM2: perAtom(answer.incoherentCm2PerG),
    energyAbsorptionM2: perAtom(answer.energyAbsorptionCm2PerG),
  };
}

/** The loaded elements as the tables that the physics core takes. */
export function tablesOf(elements: readonly LoadedElement[], info: TableInfo): ScatteringTables {
  const tabulation = (key: TabulationKey): Tabulation => ({
    key,
    rangeEv: info.rangeEv[key],
    elements: new Map(
      elements.flatMap(({ atomicNumber, factors }) =>
        factors.has(key) ? [[atomicNumber, factors.get(key) as ElementFactors]] : [],
      ),
    ),
  });
  return {
    version: info.version,
    tabulations: { epdl97: tabulation("epdl97"), henke93: tabulation("henke93"), chantler95: tabulation("chantler95") },
    shells: new Map(elements.map(({ atomicNumber, shells }) => [atomicNumber, shells])),
  };
}
