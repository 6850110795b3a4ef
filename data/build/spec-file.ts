/** Reader of the source files' plain-text tables: `#S number title`, `#L labels`, then rows of numbers. */

export interface SpecScan {
  readonly number: number;
  readonly title: string;
  readonly labels: readonly string[];
  readonly rows: readonly (readonly number[])[];
}

/** All scans of a file, in its order. Labels are separated by two spaces. @throws Error where a row is not numeric */
export function readSpecFile(text: string): SpecScan[] {
  const scans: { number: number; title: string; labels: string[]; rows: number[][] }[] = [];
  for (const line of text.split("\n")) {
    const scan = scans.at(-1);
    if (line.startsWith("#S ")) {
      const [, number = "0", title = ""] = /^#S (\d+) (.*)$/.exec(line) ?? [];
      scans.push({ number: Number(number), title: title.trim(), labels: [], rows: [] });
    } else if (line.startsWith("#L ") && scan) {
      scan.labels = line.slice(3).trim().split(/ {2,}/);
    } else if (line.trim() !== "" && !line.startsWith("#") && scan) {
      const row = line.trim().split(/\s+/).map(Number);
      if (row.some((value) => Number.isNaN(value)))
        throw new Error(`A row of scan ${scan.number} is not numeric: ${line.slice(0, 60)}`);
      scan.rows.push(row);
    }
  }
  return scans;
}

/** Column by label. @throws Error where it is missing */
export function column(scan: SpecScan, label: string): number[] {
  const at = scan.labels.findIndex(
    (candidate) => candidate === label || candidate.startsWith(`${label}(`) || candidate.startsWith(`${label}[`),
  );
  if (at < 0) throw new Error(`Scan ${scan.number} (${scan.title}) has no column ${label}.`);
  return scan.rows.map((row) => row[at] ?? Number.NaN);
}
