import { defineConfig } from "eslint/config";
import astro from "eslint-plugin-astro";
import { importX } from "eslint-plugin-import-x";
import { createTypeScriptImportResolver } from "eslint-import-resolver-typescript";
import tseslint from "typescript-eslint";

/** What may be sent to a browser. */
const ISLANDS = [
  "components",
  "lib/physics",
  "lib/schemas",
  "lib/format",
  "lib/lookup",
  "lib/plans",
  "lib/quantities",
  "lib/materials",
  "lib/tables/load.client.ts",
  "lib/tables/info.ts",
  "lib/workers",
  "lib/http/problems.ts",
  "styles",
  "assets",
];

/**
 * Who may import whom inside src. What is not listed is refused; a part may always import itself. Files are listed where
 * only they, not their folder, may be read. DEVELOPERS.md says why.
 */
const MAY_IMPORT = {
  "lib/physics": [],
  "lib/settings.ts": [],
  "lib/http": ["lib/schemas"],
  "lib/tables": ["lib/physics"],
  "lib/schemas": ["lib/physics"],
  "lib/quantities": ["lib/physics"],
  "lib/materials": ["lib/physics", "lib/schemas"],
  "lib/format": ["lib/physics", "lib/schemas"],
  "lib/lookup": [
    "lib/physics",
    "lib/schemas",
    "lib/format",
    "lib/quantities",
    "lib/materials",
    "lib/tables/load.client.ts",
    "lib/tables/info.ts",
  ],
  "lib/plans": ["lib/physics", "lib/schemas", "lib/format", "lib/quantities", "lib/materials", "lib/lookup"],
  "lib/workers": [
    "lib/physics",
    "lib/schemas",
    "lib/materials",
    "lib/plans",
    "lib/lookup",
    "lib/tables/load.client.ts",
    "lib/tables/info.ts",
  ],
  // elements.ts is data that is seeded; physics functions stay out of the database layer.
  db: ["lib/schemas", "lib/physics/elements.ts"],
  "lib/services": [
    "db",
    "lib/physics",
    "lib/tables/load.server.ts",
    "lib/tables/info.ts",
    "lib/schemas",
    "lib/materials",
    "lib/quantities",
    "lib/format",
    "lib/lookup",
    "lib/plans",
    "lib/workers",
    "lib/http",
    "lib/settings.ts",
  ],
  server: ["db", "lib/http", "lib/settings.ts"],
  "pages/api": ["lib/services", "lib/schemas", "lib/http", "lib/plans/examples.ts"],
  "components/ui": ISLANDS,
  "components/features": ISLANDS,
  // Parts of pages that are rendered on the server only.
  "components/site": [...ISLANDS, "lib/services"],
};

const zones = Object.entries(MAY_IMPORT).map(([part, allowed]) => ({
  target: `./src/${part}`,
  from: "./src",
  except: [part, ...allowed].map((path) => `./${path}`),
  message: `src/${part} may import only ${allowed.length === 0 ? "itself" : allowed.join(", ")} (eslint.config.mjs).`,
}));

export default defineConfig(
  { ignores: ["dist", "var", ".astro", "node_modules", "src/db/migrations"] },
  ...tseslint.configs.strict,
  ...astro.configs.recommended,
  {
    plugins: { "import-x": importX },
    settings: {
      "import-x/resolver-next": [createTypeScriptImportResolver({ project: "tsconfig.json" })],
      "import-x/parsers": { "@typescript-eslint/parser": [".ts", ".tsx", ".astro"] },
    },
    rules: {
      eqeqeq: ["error", "always", { null: "ignore" }],
      "@typescript-eslint/consistent-type-imports": ["error", { fixStyle: "inline-type-imports" }],
      "@typescript-eslint/no-unused-vars": [
        "error",
        { argsIgnorePattern: "^_", varsIgnorePattern: "^_", caughtErrors: "none" },
      ],
      // Indices of typed arrays and of matches that a pattern assures; the compiler cannot know.
      "@typescript-eslint/no-non-null-assertion": "off",
      // User text in a pattern can run for ever; write a scanner, or a pattern that stands in the code.
      "no-restricted-syntax": [
        "error",
        { selector: "NewExpression[callee.name='RegExp']", message: "Write the pattern as a literal." },
      ],
      "no-eval": "error",
      "no-implied-eval": "error",
    },
  },
  {
    files: ["src/**"],
    rules: {
      "import-x/no-restricted-paths": [
        "error",
        {
          zones: [
            ...zones,
            { target: "./src/layouts", from: ["./src/db", "./src/server"], message: "Pages read through services." },
            { target: "./src/pages", from: ["./src/db", "./src/server"], message: "Pages read through services." },
            {
              target: "./src",
              from: ["./tests", "./data/build"],
              message: "Nothing in src needs tests or the table build.",
            },
          ],
        },
      ],
    },
  },
  {
    files: ["src/pages/api/**"],
    rules: {
      "no-restricted-imports": [
        "error",
        { patterns: [{ group: ["drizzle-orm*"], message: "Services ask the database." }] },
      ],
    },
  },
  {
    files: ["src/lib/physics/**"],
    rules: {
      // The core is pure: same arguments, same result, on any machine and in any browser.
      "no-restricted-globals": [
        "error",
        "process",
        "window",
        "document",
        "fetch",
        "performance",
        "setTimeout",
        "Buffer",
      ],
      "no-restricted-properties": [
        "error",
        { object: "Date", property: "now" },
        { object: "Math", property: "random" },
      ],
    },
  },
);
