/** Turns the rows of one table version into the typed arrays that the physics core reads. */
import {
  type ElementFactors,
  type EmissionLine,
  M2_PER_BARN,
  type ScatteringTables,
  type Shell,
  TABULATION_KEYS,
  type Tabulation,
  type TabulationKey,
} from "#src/lib/physics/index.ts";

/** Columns are JSON arrays in order of energy, below an edge before above it; null where the source has no value. */
interface FactorColumns {
  readonly tabulation: string;
  readonly atomicNumber: number;
  readonly energiesEv: string;
  readonly f1: string;
  readonly f2: string;
  readonly coherentBarn: string;
  readonly incoherentBarn: string;
  readonly energyAbsorptionBarn: string;
}

export interface TableSource {
  readonly version: string;
  readonly rangeEv: Readonly<Record<TabulationKey, readonly [number, number]>>;
  readonly factors: readonly FactorColumns[];
  readonly shells: readonly {
    atomicNumber: number;
    shell: string;
    edgeEnergyEv: number;
    fluorescenceYield: number | null;
  }[];
  readonly lines: readonly { atomicNumber: number; shell: string; line: string; energyEv: number; rate: number }[];
}

/** Only this tabulation carries cross sections. */
const WITH_CROSS_SECTIONS: TabulationKey = "epdl97";

/** Energies stay in eV, cross sections become m² per atom; a missing value becomes NaN, a missing element has no entry. */
export function tablesFromRows(source: TableSource): ScatteringTables {
  const tabulation = (key: TabulationKey): Tabulation => ({
    key,
    rangeEv: source.rangeEv[key],
    elements: new Map(
      source.factors
        .filter((columns) => columns.tabulation === key)
        .map((columns) => [columns.atomicNumber, elementFactors(columns, key === WITH_CROSS_SECTIONS)]),
    ),
  });
  return {
    version: source.version,
    tabulations: Object.fromEntries(TABULATION_KEYS.map((key) => [key, tabulation(key)])) as Record<
      TabulationKey,
      Tabulation
    >,
    shells: shellsByElement(source),
  };
}

function elementFactors(columns: FactorColumns, withCrossSections: boolean): ElementFactors {
  const crossSection = (json: string): Float64Array | null => (withCrossSections ? numbers(json, M2_PER_BARN) : null);
  return {
    atomicNumber: columns.atomicNumber,
    energiesEv: numbers(columns.energiesEv),
    f1: numbers(columns.f1),
    f2: numbers(columns.f2),
    coherentM2: crossSection(columns.coherentBarn),
    incoherentM2: crossSection(columns.incoherentBarn),
    energyAbsorptionM2: crossSection(columns.energyAbsorptionBarn),
  };
}

function numbers(json: string, factor = 1): Float64Array {
  return Float64Array.from(JSON.parse(json) as (number | null)[], (value) =>
    value === null ? Number.NaN : value * factor,
  );
}

function shellsByElement(source: TableSource): ReadonlyMap<number, readonly Shell[]> {
  const lines = new Map<string, EmissionLine[]>();
  for (const { atomicNumber, shell, line, energyEv, rate } of source.lines) {
    append(lines, `${atomicNumber} ${shell}`, { line, energyEv, rate });
  }
  const shells = new Map<number, Shell[]>();
  for (const { atomicNumber, shell, edgeEnergyEv, fluorescenceYield } of source.shells) {
    const emitted = lines.get(`${atomicNumber} ${shell}`) ?? [];
    append(shells, atomicNumber, { shell, edgeEnergyEv, fluorescenceYield, lines: emitted });
  }
  return shells;
}

function append<K, V>(map: Map<K, V[]>, key: K, value: V): void {
  const list = map.get(key);
  if (list === undefined) map.set(key, [value]);
  else list.push(value);
}
