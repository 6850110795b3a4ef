/**
 * What a linter of single files cannot see: cycles, and packages where they do not belong.
 * Imports inside .astro files are not followed here; eslint.config.mjs and tests/architecture hold those.
 * @type {import('dependency-cruiser').IConfiguration}
 */
module.exports = {
  forbidden: [
    {
      name: "no-circular",
      comment: "Parts that need each other are one part.",
      severity: "error",
      from: {},
      to: { circular: true },
    },
    {
      name: "pure-core",
      comment: "The physics core has no dependency at all, not even on Node.",
      severity: "error",
      from: { path: "^src/lib/physics/" },
      to: { pathNot: "^src/lib/physics/" },
    },
    {
      name: "served-code-needs-no-dev-package",
      comment: "What the program needs to run stands under dependencies.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/server/prepare\\.mjs$" },
      to: { dependencyTypes: ["npm-dev"], dependencyTypesNot: ["type-only"] },
    },
    {
      name: "no-unlisted-package",
      comment: "A package that package.json does not name may vanish with an update of another.",
      severity: "error",
      from: { path: "^(src|data)/" },
      to: { dependencyTypes: ["npm-no-pkg", "npm-unknown"] },
    },
    {
      name: "mathjs-only-for-quantities",
      comment: "mathjs is large, and its evaluator must not come near user text.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/lib/quantities/" },
      to: { path: "node_modules/mathjs" },
    },
    {
      name: "not-resolvable",
      comment: "An import that leads nowhere.",
      severity: "error",
      from: {},
      // Types of Astro and of Vite, and what Astro makes at build time.
      to: { couldNotResolve: true, pathNot: "^(astro:|virtual:)" },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "\\.(css|woff2|svg|astro)(\\?|$)" },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    enhancedResolveOptions: { exportsFields: ["exports"], conditionNames: ["import", "node", "default", "types"] },
  },
};
