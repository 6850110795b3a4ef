/** The manifest of the shipped tables, for pages that name versions, checksums and ranges. Read once. */
import { readFileSync } from "node:fs";
import { resolve } from "node:path";

export interface TableManifest {
  version: string;
  files: Record<string, { sha256: string; rows: number }>;
  tabulations: Record<string, { rangeEv: [number, number]; elements: [number, number]; source: string }>;
}

let manifest: TableManifest | null = null;

/** Null where the tables have not been built. */
export function tableManifest(): TableManifest | null {
  if (manifest !== null) return manifest;
  try {
    manifest = JSON.parse(readFileSync(resolve("data/tables/manifest.json"), "utf8")) as TableManifest;
  } catch {
    return null;
  }
  return manifest;
}
