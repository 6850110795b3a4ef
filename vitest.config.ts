import { defineConfig } from "vitest/config";

// unit and reference run without Astro at all: that they pass proves the core is pure.
// api and e2e talk to the built server, started once per run on a fresh database.
export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: "unit",
          include: ["tests/unit/**/*.test.ts", "tests/reference/**/*.test.ts", "tests/architecture/**/*.test.ts"],
          setupFiles: ["tests/support/matchers.ts"],
          testTimeout: 60_000,
        },
      },
      {
        test: {
          name: "api",
          include: ["tests/services/**/*.test.ts", "tests/api/**/*.test.ts"],
          setupFiles: ["tests/support/matchers.ts"],
          globalSetup: ["tests/support/server.global.ts"],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: "e2e",
          include: ["tests/e2e/**/*.test.ts"],
          globalSetup: ["tests/support/server.global.ts"],
          testTimeout: 120_000,
          hookTimeout: 120_000,
          // A page on a busy machine takes its time; what never comes still fails.
          expect: { poll: { timeout: 15_000 } },
          fileParallelism: false,
        },
      },
    ],
  },
});
