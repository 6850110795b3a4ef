/** data/tables/manifest.json: which tables this release ships, their checksums, what they cover and where they come from. */
import { z } from "zod";

const range = z.tuple([z.number(), z.number()]);

const tabulation = z.looseObject({
  /** Energies covered as a whole, eV. */
  rangeEv: range,
  /** Lowest and highest atomic number. */
  elements: range,
  /** Citation line. */
  source: z.string(),
});

export const tableManifestSchema = z.looseObject({
  version: z.string().regex(/^\d+\.\d+\.\d+$/),
  files: z.record(z.string(), z.looseObject({ sha256: z.string().regex(/^[0-9a-f]{64}$/), rows: z.number().int() })),
  tabulations: z.object({ epdl97: tabulation, henke93: tabulation, chantler95: tabulation }),
  sources: z.array(z.unknown()),
});

export type TableManifest = z.infer<typeof tableManifestSchema>;
