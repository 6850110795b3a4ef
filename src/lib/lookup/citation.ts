/** The line that goes with every copy and export. */
import type { TabulationKey } from "#src/lib/physics/index.ts";

const SOURCES: Readonly<Record<TabulationKey, string>> = {
  epdl97: "EPDL97 (Cullen, Hubbell, Kissel, UCRL-50400 Vol. 6 Rev. 5, 1997)",
  henke93: "Henke, Gullikson, Davis, At. Data Nucl. Data Tables 54, 181 (1993)",
  chantler95: "Chantler, J. Phys. Chem. Ref. Data 24, 71 (1995)",
};

/** Table version, source of the values, date (UTC). */
export function citation(tableVersion: string, tabulation: TabulationKey, date: Date = new Date()): string {
  return `Rimelight tables ${tableVersion}; values from ${SOURCES[tabulation]}; ${date.toISOString().slice(0, 10)}`;
}
