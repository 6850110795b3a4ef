import { readdirSync, readFileSync } from "node:fs";
import { posix } from "node:path";
import { ESLint } from "eslint";
import { describe, expect, it } from "vitest";

const filesUnder = (folder: string, ending: RegExp): string[] =>
  readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && ending.test(entry.name))
    .map((entry) => posix.join(entry.parentPath, entry.name));

/** Every module a file names: static, dynamic, re-exported, in scripts of .astro files too. */
const importsOf = (file: string): string[] =>
  [...readFileSync(file, "utf8").matchAll(/(?:\bfrom\s*|\bimport\s*\(?\s*)["']([^"']+)["']/g)].map(
    (match) => match[1]!,
  );

describe("import directions", () => {
  it("the physics core imports nothing but itself", () => {
    const files = filesUnder("src/lib/physics", /\.ts$/);
    expect(files.length).toBeGreaterThan(5);
    for (const file of files) {
      const outside = importsOf(file).filter(
        (name) => !name.startsWith(".") || !posix.join(posix.dirname(file), name).startsWith("src/lib/physics/"),
      );
      expect(outside, file).toEqual([]);
    }
  });

  it("no .astro file reaches past the services to the database, the front server or the tables", () => {
    const files = filesUnder("src", /\.astro$/);
    expect(files.length).toBeGreaterThan(3);
    for (const file of files) {
      const wrong = importsOf(file).filter((name) =>
        /^(#src\/(db|server)\/|#src\/lib\/(tables\/load\.server|settings)|#tests\/|#data\/build\/|drizzle-orm|@libsql)/.test(
          name,
        ),
      );
      expect(wrong, file).toEqual([]);
    }
  });

  it("files of our own are named with their ending", () => {
    for (const file of filesUnder("src", /\.(ts|tsx|astro)$/)) {
      const bare = importsOf(file).filter((name) => /^(\.|#)/.test(name) && !/\.\w+(\?\w+)?$/.test(name));
      expect(bare, file).toEqual([]);
    }
  });

  it.each([
    ["src/lib/physics/planted.ts", "#src/db/client.ts"],
    ["src/lib/services/planted.ts", "#src/server/paths.ts"],
    ["src/lib/tables/planted.ts", "#src/lib/services/tables.ts"],
    ["src/pages/api/v1/planted.ts", "#src/db/database.ts"],
    ["src/components/ui/planted.tsx", "#src/lib/services/tables.ts"],
    ["src/server/planted.ts", "#src/lib/services/tables.ts"],
    ["src/db/planted.ts", "#src/lib/physics/index.ts"],
  ])("the linter refuses an import planted in %s of %s", async (filePath, name) => {
    const [result] = await new ESLint().lintText(`import * as planted from "${name}";\nexport default planted;\n`, {
      filePath,
    });
    expect(result!.messages.map((message) => message.ruleId)).toContain("import-x/no-restricted-paths");
  });
});
