/** Which part of the house may import which; broken on purpose in tests/lint/rules-bite.test.ts. */
const engineNeighbours = "^(client/engine/|node_modules/(mathjs|zod|lib0|odex)/)";

module.exports = {
  forbidden: [
    {
      name: "engine-stays-pure",
      severity: "error",
      comment: "The engine imports nothing but itself and a short named list of packages.",
      from: { path: "^client/engine/" },
      to: { pathNot: engineNeighbours },
    },
    {
      name: "engine-only-parses-with-mathjs",
      severity: "error",
      from: { path: "^client/engine/" },
      to: {
        path: "^node_modules/mathjs/",
        pathNot: "^node_modules/mathjs/lib/esm/number\\.js$",
      },
    },
    {
      name: "mathjs-has-one-door",
      severity: "error",
      comment: "What reaches mathjs is checked in one place.",
      from: { path: "^client/engine/", pathNot: "^client/engine/notation/mathjs-parser\\.ts$" },
      to: { path: "^node_modules/mathjs/" },
    },
    {
      name: "odex-has-one-door",
      severity: "error",
      comment: "Differential equations are integrated in one place, where poles are looked for.",
      from: { pathNot: "^client/engine/running/integrate\\.ts$" },
      to: { path: "^node_modules/odex/" },
    },
    {
      name: "mathjs-stays-in-the-engine",
      severity: "error",
      from: { pathNot: "^client/engine/|^tests/" },
      to: { path: "^node_modules/mathjs/" },
    },
    {
      name: "server-takes-only-shared-code",
      severity: "error",
      from: { path: "^server/" },
      to: { path: "^client/", pathNot: "^client/(engine|contract|schema)/" },
    },
    {
      name: "client-never-imports-server",
      severity: "error",
      from: { path: "^client/" },
      to: { path: "^(server|fakes|migrations)/" },
    },
    {
      name: "shared-code-stays-shared",
      severity: "error",
      comment: "What the server imports must not reach into the page.",
      from: { path: "^client/(contract|schema)/" },
      to: { path: "^client/", pathNot: "^client/(engine|contract|schema)/" },
    },
    {
      name: "fakes-are-for-tests-and-start",
      severity: "error",
      from: { pathNot: "^(fakes|tests|e2e|server/start)/" },
      to: { path: "^fakes/" },
    },
    {
      name: "pages-do-not-import-each-other",
      severity: "error",
      from: { path: "^client/pages/([^/]+)/" },
      to: { path: "^client/pages/([^/]+)/", pathNot: "^client/pages/$1/" },
    },
    {
      name: "no-circles",
      severity: "error",
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ["type-only"] } },
    },
  ],
  options: {
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    doNotFollow: { path: "node_modules" },
    exclude: { path: "\\.css$" },
    enhancedResolveOptions: { exportsFields: ["exports"], conditionNames: ["import", "default"] },
  },
};
