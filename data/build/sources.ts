/** The raw files: two Debian packages, read as data only, and what is taken from each. Nothing of them is installed. */
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const FOLDER = fileURLToPath(new URL("../../var/sources/", import.meta.url));

/** Checksums of the files the committed tables were made from. */
export const RAW_FILES = {
  crossSections: { package: "python-fisx-common", path: "usr/share/fisx/EPDL97_CrossSections.dat" },
  bindingEnergies: { package: "python-fisx-common", path: "usr/share/fisx/BindingEnergies.dat" },
  totals: { package: "python-fisx-common", path: "usr/share/fisx/XCOM_CrossSections.dat" },
  kConstants: { package: "python-fisx-common", path: "usr/share/fisx/EADL97_KShellConstants.dat" },
  kRates: { package: "python-fisx-common", path: "usr/share/fisx/EADL97_KShellRadiativeRates.dat" },
  lConstants: { package: "python-fisx-common", path: "usr/share/fisx/EADL97_LShellConstants.dat" },
  lRates: { package: "python-fisx-common", path: "usr/share/fisx/EADL97_LShellRadiativeRates.dat" },
  henke: { package: "libxray-absorption-perl", path: "usr/share/perl5/Xray/Absorption/henke.db" },
  chantler: { package: "libxray-absorption-perl", path: "usr/share/perl5/Xray/Absorption/chantler.db" },
} as const;
export type RawFile = keyof typeof RAW_FILES;

/** Downloads and unpacks a package below var/sources unless it is there. Needs a Debian system with its package lists. */
function unpacked(name: string): string {
  const folder = join(FOLDER, name);
  if (existsSync(join(folder, "usr"))) return folder;
  mkdirSync(folder, { recursive: true });
  execFileSync("apt-get", ["download", name], { cwd: folder, stdio: ["ignore", "ignore", "inherit"] });
  const archive = readdirSync(folder).find((file) => file.endsWith(".deb"));
  if (!archive) throw new Error(`The package ${name} did not arrive. Run apt-get update, then try again.`);
  execFileSync("dpkg", ["-x", archive, "."], { cwd: folder });
  return folder;
}

export function rawPath(file: RawFile): string {
  const { package: name, path } = RAW_FILES[file];
  return join(unpacked(name), path);
}

export const rawText = (file: RawFile): string => readFileSync(rawPath(file), "utf8");

export const sha256 = (content: string | Buffer): string => createHash("sha256").update(content).digest("hex");

export const rawSha256 = (file: RawFile): string => sha256(readFileSync(rawPath(file)));

/** One element of a stored hash: logarithms of f1 and f2 over energy in eV. */
export interface StoredElement {
  readonly energy: readonly number[];
  readonly f1: readonly number[];
  readonly f2: readonly number[];
}

/** A Perl Storable file as plain data, by lower-case symbol. */
export function storedElements(file: "henke" | "chantler"): Readonly<Record<string, StoredElement>> {
  const script = "binmode STDOUT; print JSON::PP->new->canonical->encode(Storable::retrieve($ARGV[0]))";
  const json = execFileSync("perl", ["-MStorable", "-MJSON::PP", "-e", script, rawPath(file)], {
    maxBuffer: 1 << 28,
    encoding: "utf8",
  });
  // Perl keeps some numbers as text.
  const numbers = (list: unknown): number[] => (list as (string | number)[]).map(Number);
  const all = JSON.parse(json) as Record<string, unknown>;
  return Object.fromEntries(
    Object.entries(all).flatMap(([symbol, entry]) => {
      if (typeof entry !== "object" || entry === null || !("f1" in entry) || !("f2" in entry) || !("energy" in entry))
        return [];
      return [[symbol, { energy: numbers(entry.energy), f1: numbers(entry.f1), f2: numbers(entry.f2) }]];
    }),
  );
}
