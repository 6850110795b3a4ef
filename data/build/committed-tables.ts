/** The committed tables read straight from their files: the core is tested without a database. */
import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import {
  type ElementFactors,
  M2_PER_BARN,
  type ScatteringTables,
  type Shell,
  type Tabulation,
  type TabulationKey,
} from "#src/lib/physics/index.ts";

const FOLDER = fileURLToPath(new URL("../tables/", import.meta.url));

/** Rows of one table file, empty fields as NaN. */
export function tableRows(name: string): { head: string[]; rows: string[][] } {
  const lines = readFileSync(FOLDER + name, "utf8")
    .split("\n")
    .filter((line) => line !== "" && !line.startsWith("#"));
  const [head = "", ...rows] = lines;
  return { head: head.split("\t"), rows: rows.map((row) => row.split("\t")) };
}

function tabulation(key: TabulationKey, rangeEv: readonly [number, number]): Tabulation {
  const { head, rows } = tableRows(`${key}.tsv`);
  const byElement = new Map<number, string[][]>();
  for (const row of rows) {
    const atomicNumber = Number(row[0]);
    const list = byElement.get(atomicNumber);
    if (list) list.push(row);
    else byElement.set(atomicNumber, [row]);
  }
  const column = (list: readonly string[][], name: string, scale = 1): Float64Array | null => {
    const at = head.indexOf(name);
    if (at < 0) return null;
    return Float64Array.from(list, (row) =>
      row[at] === undefined || row[at] === "" ? Number.NaN : Number(row[at]) * scale,
    );
  };
  const elements = new Map<number, ElementFactors>();
  for (const [atomicNumber, list] of byElement) {
    elements.set(atomicNumber, {
      atomicNumber,
      energiesEv: column(list, "energyEv") as Float64Array,
      f1: column(list, "f1") as Float64Array,
      f2: column(list, "f2") as Float64Array,
      coherentM2: column(list, "coherentBarn", M2_PER_BARN),
      incoherentM2: column(list, "incoherentBarn", M2_PER_BARN),
      energyAbsorptionM2: column(list, "energyAbsorptionBarn", M2_PER_BARN),
    });
  }
  return { key, elements, rangeEv };
}

let tables: ScatteringTables | null = null;

export function committedTables(): ScatteringTables {
  if (tables) return tables;
  const manifest = JSON.parse(readFileSync(`${FOLDER}manifest.json`, "utf8")) as {
    version: string;
    tabulations: Record<TabulationKey, { rangeEv: [number, number] }>;
  };
  const shells = new Map<number, Shell[]>();
  const lines = tableRows("lines.tsv").rows;
  for (const [atomicNumber = "", shell = "", edge, fluorescence] of tableRows("shells.tsv").rows) {
    const list = shells.get(Number(atomicNumber)) ?? [];
    list.push({
      shell,
      edgeEnergyEv: Number(edge),
      fluorescenceYield: fluorescence === undefined || fluorescence === "" ? null : Number(fluorescence),
      lines: lines
        .filter((row) => row[0] === atomicNumber && row[1] === shell)
        .map(([, , line = "", energy, rate]) => ({ line, energyEv: Number(energy), rate: Number(rate) })),
    });
    shells.set(Number(atomicNumber), list);
  }
  const each = (key: TabulationKey) => tabulation(key, manifest.tabulations[key].rangeEv);
  tables = {
    version: manifest.version,
    tabulations: { epdl97: each("epdl97"), henke93: each("henke93"), chantler95: each("chantler95") },
    shells,
  };
  return tables;
}
