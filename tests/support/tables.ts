/** Small made-up tables in the form of data/tables: two elements, one edge, values that are only told apart. */
import { createHash } from "node:crypto";
import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";

const FACTORS = "atomicNumber\tenergyEv\tside\tf1\tf2";
const FILES: Readonly<Record<string, readonly string[]>> = {
  "epdl97.tsv": [
    `${FACTORS}\tcoherentBarn\tincoherentBarn\tenergyAbsorptionBarn`,
    "1\t100\t\t0.9\t0.1\t0.5\t0.01\t1.5",
    "1\t450000\t\t1\t1e-08\t2e-07\t0.4\t0.1",
    "2\t100\t\t1.8\t0.2\t2.5\t0.02\t3.5",
    "2\t500\tbelow\t1.5\t0.05\t2.1\t0.05\t2",
    "2\t500\tabove\t1.4\t0.4\t2.1\t0.05\t4",
    "2\t450000\t\t2\t2e-08\t8e-07\t0.8\t0.2",
  ],
  "henke93.tsv": [FACTORS, "1\t30\t\t\t0.3", "1\t30000\t\t1\t1e-06"],
  "chantler95.tsv": [FACTORS, "2\t10\t\t1.1\t0.6", "2\t433000\t\t2\t3e-08"],
  "shells.tsv": ["atomicNumber\tshell\tedgeEnergyEv\tfluorescenceYield", "2\tL1\t40\t", "2\tK\t500\t0.01"],
  "lines.tsv": ["atomicNumber\tshell\tline\tenergyEv\trate", "2\tK\tK-L2\t460\t0.25", "2\tK\tK-L3\t470\t0.75"],
};

/** Writes the tables with their manifest into `folder`. `changed` replaces files, by name, after the manifest is made. */
export function writeTables(
  folder: string,
  { version = "9.0.0", changed = {} as Record<string, string> } = {},
): string {
  mkdirSync(folder, { recursive: true });
  const files: Record<string, { sha256: string; rows: number }> = {};
  for (const [name, lines] of Object.entries(FILES)) {
    const text = `# made up\n${lines.join("\n")}\n`;
    files[name] = { sha256: createHash("sha256").update(text).digest("hex"), rows: lines.length - 1 };
    writeFileSync(join(folder, name), changed[name] ?? text);
  }
  const tabulation = (low: number, high: number) => ({ rangeEv: [low, high], elements: [1, 2], source: "made up" });
  const manifest = {
    version,
    files,
    tabulations: {
      epdl97: tabulation(100, 450000),
      henke93: tabulation(30, 30000),
      chantler95: tabulation(10, 433000),
    },
    sources: [],
  };
  writeFileSync(join(folder, "manifest.json"), changed["manifest.json"] ?? JSON.stringify(manifest));
  return folder;
}
