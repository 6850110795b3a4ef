/** What the tabulations are called on pages. */
import type { TabulationKey } from "#src/lib/physics/index.ts";

export const TABULATION_NAMES: Readonly<Record<TabulationKey, string>> = {
  epdl97: "EPDL97",
  henke93: "Henke 1993",
  chantler95: "Chantler 1995",
};
