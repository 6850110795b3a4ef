/** Every raw file has its page: what the build reads, what the manifest names and what data/sources says are one. */
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { originOf, RAW_FILES } from "#data/build/sources.ts";

const manifest = JSON.parse(readFileSync("data/tables/manifest.json", "utf8")) as { sources: unknown[] };
const pages = readdirSync("data/sources").map((folder) => readFileSync(`data/sources/${folder}/SOURCE.md`, "utf8"));

describe("sources", () => {
  it.each(RAW_FILES)("of %s: one page names its path, checksum, package and version", (file) => {
    const { package: name, packageVersion, path, sha256 } = originOf(file);
    const naming = pages.filter((page) => page.includes(`| \`${path}\` | \`${sha256}\` |`));
    expect(naming).toHaveLength(1);
    expect(naming[0]).toContain(`${name} ${packageVersion}`);
  });

  it("in the manifest are those that the tables were made from", () => {
    expect(manifest.sources).toEqual(RAW_FILES.filter((file) => file !== "totals").map(originOf));
  });

  it("and tables hold no path of a machine and no address", () => {
    for (const file of readdirSync("data/tables"))
      expect(readFileSync(`data/tables/${file}`, "utf8"), file).not.toMatch(/\/(?:home|root|tmp|work|Users)\/|:\/\//);
  });

  it("keep the credit lines that their licences ask for, and excerpts in the fixtures lead to them", () => {
    for (const key of ["epdl97", "eadl97"])
      expect(readFileSync(`data/sources/${key}/SOURCE.md`, "utf8"), key).toMatch(
        /redistribution of the[\s\S]*data is permitted provided the previous credits are maintained/,
      );
    const excerpts = readdirSync("tests/reference/fixtures/source-text");
    expect(excerpts.length).toBeGreaterThan(5);
    for (const excerpt of excerpts) {
      const [, page = ""] =
        /(data\/sources\/\S+)/.exec(readFileSync(`tests/reference/fixtures/source-text/${excerpt}`, "utf8")) ?? [];
      expect(existsSync(page), `${excerpt}: ${page}`).toBe(true);
    }
  });
});
