/** The raw files: two Debian packages, read as data only, and what is taken from each. Nothing of them is installed. */
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const FOLDER = fileURLToPath(new URL("../../var/sources/", import.meta.url));

/** The packages and the versions that the committed tables were made from; a later one serves where its files are the same. */
const PACKAGES = { "python-fisx-common": "1.2.0-2", "libxray-absorption-perl": "3.0.1-4" } as const;
const FISX = { package: "python-fisx-common", folder: "usr/share/fisx" } as const;
const XRAY = { package: "libxray-absorption-perl", folder: "usr/share/perl5/Xray/Absorption" } as const;

/** Every file that is read, with the checksum it must have: other bytes would make other tables under the same name. */
const FILES = {
  crossSections: {
    ...FISX,
    file: "EPDL97_CrossSections.dat",
    sha256: "d25acaf1589fc894bb0e23f7222ad52a912569d9d17e04c9145544d26d063dc8",
  },
  bindingEnergies: {
    ...FISX,
    file: "BindingEnergies.dat",
    sha256: "0fe06ab29fa590d8b7bbfdcd5e632bb1c4ca17fdedf160b54da3f80e3ed83a36",
  },
  totals: {
    ...FISX,
    file: "XCOM_CrossSections.dat",
    sha256: "94575afa71b06db386407f21f60a6d6141b6b107e837335a124a8400127fc411",
  },
  kConstants: {
    ...FISX,
    file: "EADL97_KShellConstants.dat",
    sha256: "338944dea58c7b596d5571b89437645d22af5a726de18823073e6b8535eb2456",
  },
  kRates: {
    ...FISX,
    file: "EADL97_KShellRadiativeRates.dat",
    sha256: "01a4754190c667cc9048271fb9b2dd3f65cfb4f2c6a04f7b8e11cae007db7c80",
  },
  lConstants: {
    ...FISX,
    file: "EADL97_LShellConstants.dat",
    sha256: "245d7adb2978cc5e94783f55f48286cdb52de669906ecbb6e20d6ec7e1aef883",
  },
  lRates: {
    ...FISX,
    file: "EADL97_LShellRadiativeRates.dat",
    sha256: "d7880f332d05286778b09e8271aad5e6e5fe4b6ec3cdfefb264d463c12e58735",
  },
  mConstants: {
    ...FISX,
    file: "EADL97_MShellConstants.dat",
    sha256: "bf91f038d84f1c8c62ad9127462977b526ca0f1cb02e47545a94f306a7b8dd12",
  },
  henke: { ...XRAY, file: "henke.db", sha256: "f9093637c8720208fb4243a57ddca7b1e3f345ae92b9d15786324d76dc5f813a" },
  chantler: {
    ...XRAY,
    file: "chantler.db",
    sha256: "cb3d1a8a5f4f5b0608e44971a899d45aebffca33dc68e9e19d1e9262f13f86ac",
  },
} as const;
export type RawFile = keyof typeof FILES;
export const RAW_FILES = Object.keys(FILES) as readonly RawFile[];

/** What the manifest and the provenance pages say of a file. */
export function originOf(file: RawFile) {
  const { package: name, folder, file: base, sha256: digest } = FILES[file];
  return { package: name, packageVersion: PACKAGES[name], path: `${folder}/${base}`, sha256: digest };
}

/** Downloads and unpacks a package below var/sources unless it is there. Needs a Debian system with its package lists. */
function unpacked(name: keyof typeof PACKAGES): string {
  const folder = join(FOLDER, name);
  if (existsSync(join(folder, "usr"))) return folder;
  mkdirSync(folder, { recursive: true });
  try {
    execFileSync("apt-get", ["download", name], { cwd: folder, stdio: ["ignore", "ignore", "inherit"] });
  } catch (cause) {
    throw new Error(`The package ${name} could not be downloaded. Run apt-get update, then try again.`, { cause });
  }
  const archive = readdirSync(folder).find((file) => file.endsWith(".deb"));
  if (!archive) throw new Error(`The package ${name} did not arrive in ${folder}.`);
  execFileSync("dpkg", ["-x", archive, "."], { cwd: folder });
  return folder;
}

/** Path of a raw file whose bytes are the expected ones. @throws Error where they are not */
function verifiedPath(file: RawFile): string {
  const { package: name, path, sha256: expected } = originOf(file);
  const full = join(unpacked(name), path);
  const found = sha256(readFileSync(full));
  if (found !== expected)
    throw new Error(
      `${path} of ${name} has the checksum ${found}, not ${expected}: the package has changed, or the copy below ` +
        "var/sources is damaged. Remove that copy and try again; a changed source needs a new table version.",
    );
  return full;
}

export const rawText = (file: RawFile): string => readFileSync(verifiedPath(file), "utf8");

export const sha256 = (content: string | Buffer): string => createHash("sha256").update(content).digest("hex");

/** One element of a stored hash: logarithms of f1 and f2 over energy in eV. */
export interface StoredElement {
  readonly energy: readonly number[];
  readonly f1: readonly number[];
  readonly f2: readonly number[];
}

/** A Perl Storable file as plain data, by lower-case symbol. */
export function storedElements(file: "henke" | "chantler"): Readonly<Record<string, StoredElement>> {
  const script = "binmode STDOUT; print JSON::PP->new->canonical->encode(Storable::retrieve($ARGV[0]))";
  const json = execFileSync("perl", ["-MStorable", "-MJSON::PP", "-e", script, verifiedPath(file)], {
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
