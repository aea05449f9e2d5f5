export default {
  forbidden: [
    {
      name: "core-never-imports-figures",
      severity: "error",
      from: { path: "^packages/core/" },
      to: { path: "^packages/figures/" },
    },
    {
      name: "core-is-browser-safe",
      severity: "error",
      from: { path: "^packages/core/src/" },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "ml-regression-only-in-fit",
      severity: "error",
      from: { pathNot: "^packages/core/src/fit/" },
      to: { path: "node_modules/ml-" },
    },
    { name: "no-circular", severity: "error", from: {}, to: { circular: true } },
    { name: "no-unresolvable", severity: "error", from: {}, to: { couldNotResolve: true } },
    {
      name: "no-undeclared",
      severity: "error",
      from: { path: "^packages/[^/]+/src" },
      to: { dependencyTypes: ["npm-no-pkg", "npm-unknown", "npm-dev"] },
    },
  ],
  options: {
    doNotFollow: { path: "(node_modules|/dist/)" },
    exclude: { path: "^packages/[^/]+/test" },
    tsPreCompilationDeps: true,
    combinedDependencies: false,
    enhancedResolveOptions: {
      exportsFields: ["exports"],
      conditionNames: ["import", "types", "node", "default"],
      extensions: [".ts", ".js", ".mjs", ".d.ts"],
    },
  },
};
