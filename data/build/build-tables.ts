/** `npm run data:build`: raw files to data/tables, the same bytes every time. Prints what it does and how long it took. */
import { mkdirSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { elementByNumber } from "#src/lib/physics/elements.ts";
import { buildElement, RANGE_EV } from "./epdl97.ts";
import { rawCrossSections, Relaxation } from "./relaxation.ts";
import { RAW_FILES, type RawFile, rawSha256, rawText, sha256, storedElements } from "./sources.ts";
import { readSpecFile } from "./spec-file.ts";
import { atomicNumberOf, factorsRows } from "./stored-factors.ts";

const OUT = fileURLToPath(new URL("../tables/", import.meta.url));
/** Raised whenever a number in the tables changes. */
const VERSION = "1.0.0";
const DIGITS = 6;

const printed = (value: number | null): string => (value === null ? "" : String(Number(value.toPrecision(DIGITS))));

interface Written {
  sha256: string;
  rows: number;
}
const written: Record<string, Written> = {};

function write(name: string, head: readonly string[], rows: readonly (readonly (string | number | null)[])[]): void {
  const lines = rows.map((row) => row.map((value) => (typeof value === "string" ? value : printed(value))).join("\t"));
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
  henke93: { file: "henke", rangeEv: [30, 30_000] },
  chantler95: { file: "chantler", rangeEv: [10, 433_000] },
} as const;
for (const [key, { file, rangeEv }] of Object.entries(STORED)) {
  timed(`Reading ${key}`, () => {
    const rows = Object.entries(storedElements(file))
      .map(([symbol, element]) => ({ atomicNumber: atomicNumberOf(symbol), element }))
      .filter(({ atomicNumber }) => atomicNumber <= 92)
      .sort((a, b) => a.atomicNumber - b.atomicNumber)
      .flatMap(({ atomicNumber, element }) =>
        factorsRows(element, rangeEv).map((row) => [atomicNumber, row.energyEv, row.side, row.f1, row.f2]),
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
  units: "energies in eV, f1 and f2 in electrons, cross sections in barn per atom, six significant digits",
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
  sources: (Object.keys(RAW_FILES) as RawFile[])
    .filter((file) => file !== "totals")
    .map((file) => ({ ...RAW_FILES[file], sha256: rawSha256(file) })),
};
writeFileSync(`${OUT}manifest.json`, `${JSON.stringify(manifest, null, 2)}\n`);
for (const [name, { rows }] of Object.entries(written)) console.log(`${name}: ${rows} rows`);
console.log(`${elementByNumber(98).name} is the last element. Tables ${VERSION} stand in data/tables.`);
