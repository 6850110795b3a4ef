/** `npm run data:build`: raw files to data/tables, the same bytes every time. Prints what it does and how long it took. */
import { mkdirSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { elementByNumber } from "#src/lib/physics/elements.ts";
import { buildElement, RANGE_EV } from "./epdl97.ts";
import { rawCrossSections, Relaxation } from "./relaxation.ts";
import { originOf, RAW_FILES, rawText, sha256, storedElements } from "./sources.ts";
import { readSpecFile } from "./spec-file.ts";
import { atomicNumberOf, factorsRows } from "./stored-factors.ts";

const OUT = fileURLToPath(new URL("../tables/", import.meta.url));
/** Raised whenever a number in the tables changes. */
const VERSION = "1.1.0";
const DIGITS = 6;
/** Energies stand as their sources have them, to 0.01 eV or better: an edge near 100 keV needs more than six digits. */
const ENERGY_DIGITS = 9;

const printed = (value: number | null, digits: number): string =>
  value === null ? "" : String(Number(value.toPrecision(digits)));

interface Written {
  sha256: string;
  rows: number;
}
const written: Record<string, Written> = {};

function write(name: string, head: readonly string[], rows: readonly (readonly (string | number | null)[])[]): void {
  const digits = head.map((column) => (column.endsWith("nergyEv") ? ENERGY_DIGITS : DIGITS));
  const lines = rows.map((row) =>
    row.map((value, index) => (typeof value === "string" ? value : printed(value, digits[index]!))).join("\t"),
  );
  const text = `${head.join("\t")}\n${lines.join("\n")}\n`;
  writeFileSync(OUT + name, text);
  written[name] = { sha256: sha256(text), rows: rows.length };
}

function timed<T>(words: string, work: () => T): T {
  const start = performance.now();
  const result = work();
  console.log(`${words}: ${((performance.now() - start) / 1000).toFixed(1)} s`);
  return result;
}

mkdirSync(OUT, { recursive: true });
const relaxation = new Relaxation({
  bindingEnergies: rawText("bindingEnergies"),
  kConstants: rawText("kConstants"),
  kRates: rawText("kRates"),
  lConstants: rawText("lConstants"),
  lRates: rawText("lRates"),
  mConstants: rawText("mConstants"),
});
const scans = timed("Reading the cross sections", () => readSpecFile(rawText("crossSections")));
const numbers = Array.from({ length: 98 }, (_, index) => index + 1);

timed("Building epdl97", () => {
  const rows = numbers.flatMap((atomicNumber) => {
    const measuredEv = Object.fromEntries(
      relaxation.shellNames().map((shell) => [shell, relaxation.bindingEv(atomicNumber, shell)]),
    );
    const raw = rawCrossSections(scans.find((scan) => scan.number === atomicNumber)!);
    const { rows: built } = buildElement({
      atomicNumber,
      raw,
      measuredEv,
      relaxation: relaxation.dataOf(atomicNumber),
    });
    return built.map((row) => [
      atomicNumber,
      row.energyEv,
      row.side,
      row.f1,
      row.f2,
      row.coherentBarn,
      row.incoherentBarn,
      row.energyAbsorptionBarn,
    ]);
  });
  write(
    "epdl97.tsv",
    ["atomicNumber", "energyEv", "side", "f1", "f2", "coherentBarn", "incoherentBarn", "energyAbsorptionBarn"],
    rows,
  );
});

const STORED = {
  // Read off the files: their smallest values, repeated wherever the published one is negative or absent.
  henke93: { file: "henke", rangeEv: [30, 30_000], clippedAt: { f1: 1e-4, f2: 1e-6 } },
  chantler95: { file: "chantler", rangeEv: [10, 433_000], clippedAt: { f1: 1e-6, f2: 1e-6 } },
} as const;
for (const [key, { file, rangeEv, clippedAt }] of Object.entries(STORED)) {
  timed(`Reading ${key}`, () => {
    const rows = Object.entries(storedElements(file))
      .map(([symbol, element]) => ({ atomicNumber: atomicNumberOf(symbol), element }))
      .filter(({ atomicNumber }) => atomicNumber <= 92)
      .sort((a, b) => a.atomicNumber - b.atomicNumber)
      .flatMap(({ atomicNumber, element }) =>
        factorsRows(element, rangeEv, clippedAt).map((row) => [atomicNumber, row.energyEv, row.side, row.f1, row.f2]),
      );
    write(`${key}.tsv`, ["atomicNumber", "energyEv", "side", "f1", "f2"], rows);
  });
}

timed("Writing shells and lines", () => {
  write(
    "shells.tsv",
    ["atomicNumber", "shell", "edgeEnergyEv", "fluorescenceYield"],
    numbers
      .flatMap((atomicNumber) => relaxation.shellsOf(atomicNumber))
      .map((row) => [row.atomicNumber, row.shell, row.edgeEnergyEv, row.fluorescenceYield]),
  );
  write(
    "lines.tsv",
    ["atomicNumber", "shell", "line", "energyEv", "rate"],
    numbers
      .flatMap((atomicNumber) => relaxation.linesOf(atomicNumber))
      .map((row) => [row.atomicNumber, row.shell, row.line, row.energyEv, row.rate]),
  );
});

const manifest = {
  version: VERSION,
  units:
    "energies in eV, f1 and f2 in electrons, cross sections in barn per atom, six significant digits, energies to 0.01 eV",
  files: written,
  tabulations: {
    epdl97: {
      rangeEv: RANGE_EV,
      elements: [1, 98],
      source: "Cullen, Hubbell, Kissel, EPDL97, UCRL-50400 Vol. 6 Rev. 5 (1997)",
    },
    henke93: {
      rangeEv: STORED.henke93.rangeEv,
      elements: [1, 92],
      source: "Henke, Gullikson, Davis, At. Data Nucl. Data Tables 54, 181 (1993)",
    },
    chantler95: {
      rangeEv: STORED.chantler95.rangeEv,
      elements: [1, 92],
      source: "Chantler, J. Phys. Chem. Ref. Data 24, 71 (1995)",
    },
  },
  // The totals serve the tests only.
  sources: RAW_FILES.filter((file) => file !== "totals").map(originOf),
};
writeFileSync(`${OUT}manifest.json`, `${JSON.stringify(manifest, null, 2)}\n`);
for (const [name, { rows }] of Object.entries(written)) console.log(`${name}: ${rows} rows`);
console.log(`${elementByNumber(98).name} is the last element. Tables ${VERSION} stand in data/tables.`);
