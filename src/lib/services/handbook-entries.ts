/** The handbook's files, carried by the bundle. Each is one group; an entry's place in them means nothing. */
import type { HandbookEntry } from "#src/lib/schemas/handbook.ts";
import ceramics from "#data/seed/handbook/ceramics.json" with { type: "json" };
import detectors from "#data/seed/handbook/detectors.json" with { type: "json" };
import electrochemistry from "#data/seed/handbook/electrochemistry.json" with { type: "json" };
import gases from "#data/seed/handbook/gases.json" with { type: "json" };
import liquids from "#data/seed/handbook/liquids.json" with { type: "json" };
import metals from "#data/seed/handbook/metals.json" with { type: "json" };
import minerals from "#data/seed/handbook/minerals.json" with { type: "json" };
import polymers from "#data/seed/handbook/polymers.json" with { type: "json" };
import stains from "#data/seed/handbook/stains.json" with { type: "json" };
import tissues from "#data/seed/handbook/tissues.json" with { type: "json" };

export const HANDBOOK_GROUPS: Readonly<Record<string, readonly unknown[]>> = {
  polymers,
  tissues,
  minerals,
  metals,
  ceramics,
  electrochemistry,
  detectors,
  liquids,
  stains,
  gases,
};

/** All entries as written; tests judge them by the schema, so that a start need not. */
export const HANDBOOK_ENTRIES = Object.values(HANDBOOK_GROUPS).flat() as readonly HandbookEntry[];
