/**
 * Remakes the raw fixtures of the reference tests from the source files: `npx tsx data/build/build-fixtures.ts`. The tests
 * themselves read the fixtures only, so that they need neither the packages nor a network.
 */
import { mkdirSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { rawCrossSections, Relaxation } from "./relaxation.ts";
import { rawText, storedElements } from "./sources.ts";
import { column, readSpecFile } from "./spec-file.ts";

const OUT = fileURLToPath(new URL("../../tests/reference/fixtures/", import.meta.url));
/** A light element; a K edge that moves; L edges that move; another weight in the source, and M edges besides. */
const REBUILT = { oxygen: 8, aluminium: 13, iron: 26, ruthenium: 44 };
/** L edges whose f1 the sources clip; a K edge; a K edge that stands twice; values that end below the range. */
const STORED = ["h", "si", "fe", "mo"];
const EXCERPT_ROWS = { element: 13, fromKeV: 1.5, toKeV: 1.6 };

const inLines = (record: object): string =>
  `{\n${Object.entries(record)
    .map(([key, value]) => `  ${JSON.stringify(key)}: ${JSON.stringify(value)}`)
    .join(",\n")}\n}\n`;

function writeElements(): void {
  const relaxation = new Relaxation({
    bindingEnergies: rawText("bindingEnergies"),
    kConstants: rawText("kConstants"),
    kRates: rawText("kRates"),
    lConstants: rawText("lConstants"),
    lRates: rawText("lRates"),
    mConstants: rawText("mConstants"),
  });
  const scans = readSpecFile(rawText("crossSections"));
  mkdirSync(`${OUT}raw`, { recursive: true });
  for (const [name, atomicNumber] of Object.entries(REBUILT)) {
    const measuredEv = Object.fromEntries(
      relaxation
        .shellNames()
        .map((shell) => [shell, relaxation.bindingEv(atomicNumber, shell)] as const)
        .filter(([, energyEv]) => energyEv > 0),
    );
    const { subshells, ...raw } = rawCrossSections(scans.find((scan) => scan.number === atomicNumber)!);
    const text = inLines({
      source:
        "Raw rows of EPDL97 (Cullen, Hubbell, Kissel, UCRL-50400 Vol. 6 Rev. 5, 1997), binding energies of Larkins (1977), yields and rates of EADL97; credit lines in data/sources",
      units: "energies in eV, cross sections in cm2/g",
      atomicNumber,
      measuredEv,
      relaxation: relaxation.dataOf(atomicNumber),
      raw: { ...raw, subshells },
    });
    writeFileSync(`${OUT}raw/${name}.json`, text.replaceAll("],", "],\n    "));
  }
}

/** Verbatim rows, a few of them where there are many, which the readers of the files are tested on; heads stand in data/sources. */
function writeExcerpts(): void {
  const excerpt = (source: string, text: string, keep: (row: readonly string[], scan: number) => boolean): string => {
    let scan = 0;
    const lines = text.split("\n").filter((line) => {
      if (line.startsWith("#S ")) scan = Number(line.split(" ")[1]);
      return scan > 0 && (line === "" || keep(line.trim().split(/\s+/), scan));
    });
    return `#U00 Excerpt. Head and credit lines: data/sources/${source}/SOURCE.md\n\n${lines
      .join("\n")
      .replaceAll(/\n{3,}/g, "\n\n")
      .trimEnd()}\n`;
  };
  const { element, fromKeV, toKeV } = EXCERPT_ROWS;
  mkdirSync(`${OUT}source-text`, { recursive: true });
  const write = (name: string, text: string): void => writeFileSync(`${OUT}source-text/${name}.txt`, text);
  write(
    "crossSections",
    excerpt("epdl97", rawText("crossSections"), ([first = ""], scan) => {
      if (scan !== element) return false;
      return first.startsWith("#") || (Number(first) >= fromKeV && Number(first) <= toKeV);
    }),
  );
  for (const file of ["bindingEnergies", "kConstants", "kRates", "lConstants", "lRates", "mConstants"] as const)
    write(
      file,
      excerpt(
        file === "bindingEnergies" ? "larkins77" : "eadl97",
        rawText(file),
        ([first = ""]) => first.startsWith("#") || first === "13" || first === "79",
      ),
    );
}

function writeStored(): void {
  const of = (file: "henke" | "chantler"): object => {
    const elements = storedElements(file);
    return Object.fromEntries(STORED.map((symbol) => [symbol, elements[symbol]]));
  };
  const text = inLines({
    source:
      "Henke, Gullikson, Davis, At. Data Nucl. Data Tables 54, 181 (1993); Chantler, J. Phys. Chem. Ref. Data 24, 71 (1995); as stored in the Debian package libxray-absorption-perl, see data/sources",
    units: "energies in eV, natural logarithms of f1 and f2 in electrons",
    henke93: of("henke"),
    chantler95: of("chantler"),
  });
  writeFileSync(`${OUT}stored-factors.json`, text.replaceAll("],", "],\n    "));
}

function writeTotals(): void {
  const energiesKeV = [5, 6, 8, 10, 15, 20, 30, 40, 50, 60, 80, 100, 150];
  const totals = readSpecFile(rawText("totals")).flatMap((scan) => {
    if (scan.number > 92) return [];
    const energies = column(scan, "PhotonEnergy");
    const values = column(scan, "TotalCrossSection");
    // An energy that stands twice is an edge, which the test leaves out: its lower value.
    return [
      `  "${scan.number}": [${energiesKeV.map((energy) => Number(values[energies.indexOf(energy)]!.toPrecision(6))).join(", ")}]`,
    ];
  });
  writeFileSync(
    `${OUT}berger-hubbell.json`,
    `{
 "source": "M. J. Berger, J. H. Hubbell, Photon cross sections on a personal computer, NBSIR 87-3597 (1987): total attenuation with coherent scattering",
 "file": "see data/sources/berger-hubbell87, column of totals",
 "date": "2026-12-01",
 "units": "cm2/g",
 "energiesKeV": [${energiesKeV.join(", ")}],
 "totals": {
${totals.join(",\n")}
 }
}
`,
  );
}

writeElements();
writeExcerpts();
writeStored();
writeTotals();
console.log("The fixtures stand in tests/reference/fixtures.");
