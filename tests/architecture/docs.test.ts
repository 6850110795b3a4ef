/** What the guides claim: links lead somewhere, files and scripts they name exist, no machine's paths stand anywhere. */
import { execFileSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { describe, expect, it } from "vitest";

const tracked = execFileSync("git", ["ls-files", "--cached", "--others", "--exclude-standard"], { encoding: "utf8" })
  .split("\n")
  .filter((file) => file !== "" && existsSync(file));
const guides = tracked.filter((file) => file.endsWith(".md"));
const { scripts } = JSON.parse(readFileSync("package.json", "utf8")) as { scripts: Record<string, string> };

describe("guides", () => {
  it("are there: README, contributor's guide, licences, a source page for each table", () => {
    for (const file of ["README.md", "DEVELOPERS.md", "LICENSE", "data/LICENSES.md"])
      expect(existsSync(file), file).toBe(true);
    for (const key of ["epdl97", "eadl97", "larkins77", "henke93", "chantler95"])
      expect(readFileSync(`data/sources/${key}/SOURCE.md`, "utf8")).toMatch(
        /Citation:[\s\S]*Licence:[\s\S]*[0-9a-f]{64}/,
      );
  });

  it("link only to files that exist", () => {
    for (const guide of guides) {
      for (const [, target] of readFileSync(guide, "utf8").matchAll(/\]\((?!https?:|#)([^)#]+)[^)]*\)/g)) {
        expect(existsSync(join(dirname(guide), target!)), `${guide} links to ${target}`).toBe(true);
      }
    }
  });

  it("name only scripts of package.json and folders that exist", () => {
    const developers = readFileSync("DEVELOPERS.md", "utf8");
    for (const [, script] of developers.matchAll(/`npm run ([\w:]+)/g))
      expect(scripts, script).toHaveProperty([script!]);
    for (const [, path] of developers.matchAll(/`((?:src|data|tests)\/[\w./-]+)`/g))
      expect(existsSync(path!), path).toBe(true);
  });

  it("show exactly two commands in the README", () => {
    expect([...readFileSync("README.md", "utf8").matchAll(/^ {4}(.+)$/gm)].map(([, command]) => command)).toEqual([
      "npm start",
      "npm test",
    ]);
  });
});

describe("the project", () => {
  it("has only the files at its top that belong there", () => {
    const top = new Set(tracked.map((file) => file.split("/")[0]!));
    const allowed = [
      "astro.config.mjs",
      "package.json",
      "package-lock.json",
      "tsconfig.json",
      "drizzle.config.ts",
      "src",
      "data",
      "public",
      "tests",
      "README.md",
      "DEVELOPERS.md",
      "LICENSE",
      ".npmrc",
      ".gitignore",
      ".ci",
      ".env.example",
      "eslint.config.mjs",
      "prettier.config.mjs",
      ".prettierignore",
      "vitest.config.ts",
      ".dependency-cruiser.cjs",
    ];
    expect([...top].filter((file) => !allowed.includes(file))).toEqual([]);
  });

  it("pins every package exactly, and its lock names no host", () => {
    const { dependencies, devDependencies } = JSON.parse(readFileSync("package.json", "utf8")) as Record<
      string,
      Record<string, string>
    >;
    for (const [name, version] of Object.entries({ ...dependencies, ...devDependencies }))
      expect(version, name).toMatch(/^\d+\.\d+\.\d+(-[\w.]+)?$/);
    expect(readFileSync("package-lock.json", "utf8")).not.toMatch(/"resolved"|https?:\/\/[^"]*\.tgz/);
  });
});
