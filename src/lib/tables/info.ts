/** What a page hands its island about the tables, so that the browser asks only for what exists. */
import type { ScatteringTables, TabulationKey } from "#src/lib/physics/index.ts";

export interface TableInfo {
  readonly version: string;
  readonly rangeEv: Readonly<Record<TabulationKey, readonly [number, number]>>;
  /** Atomic numbers in each tabulation. */
  readonly elements: Readonly<Record<TabulationKey, readonly number[]>>;
}

export function tableInfo({ version, tabulations: { epdl97, henke93, chantler95 } }: ScatteringTables): TableInfo {
  return {
    version,
    rangeEv: { epdl97: epdl97.rangeEv, henke93: henke93.rangeEv, chantler95: chantler95.rangeEv },
    elements: {
      epdl97: [...epdl97.elements.keys()],
      henke93: [...henke93.elements.keys()],
      chantler95: [...chantler95.elements.keys()],
    },
  };
}
