/** The direction of imports: app, then components, then lib; app, then lib/data, then db. Nothing looks up. */
const PURE = "^lib/(music|schedule)/";
const PURE_PACKAGES = "^node_modules/(date-fns|@date-fns/tz|tonal|@tonaljs/[^/]+)/";
const typeOnly = { dependencyTypesNot: ["type-only"] };

module.exports = {
  forbidden: [
    {
      name: "no-circular",
      comment: "Tables refer to each other in both directions; nothing else may.",
      severity: "error",
      from: { pathNot: "^db/schema/" },
      to: { circular: true },
    },
    {
      name: "not-resolvable",
      comment: "An import leads nowhere.",
      severity: "error",
      from: {},
      to: { couldNotResolve: true },
    },
    {
      name: "music-and-schedule-are-pure",
      comment: "A stranger could lift either folder into another program.",
      severity: "error",
      from: { path: PURE },
      to: { pathNot: [PURE, PURE_PACKAGES] },
    },
    {
      name: "schemas-see-the-pure-folders-and-zod",
      severity: "error",
      from: { path: "^lib/schemas/" },
      to: {
        path: "^(app|components|db|lib/(data|auth|services|client|formats))/|^lib/env[.]ts$|^node_modules/(?!zod/)",
      },
    },
    {
      name: "only-data-and-auth-touch-db",
      severity: "error",
      from: { pathNot: "^(db|lib/(data|auth)|tests|scripts)/|^drizzle[.]config[.]ts$" },
      to: { path: "^db/" },
    },
    {
      name: "db-is-at-the-bottom",
      severity: "error",
      from: { path: "^db/(?!seed/)" },
      to: {
        path: "^(app|components)/|^lib/(?!(music|schedule|permissions)/|env[.]ts$)|^node_modules/(next|react|react-dom)/",
      },
    },
    {
      name: "seed-is-below-the-ui",
      comment: "The demo season may use the data layer and the readers of files.",
      severity: "error",
      from: { path: "^db/seed/" },
      to: { path: "^(app|components)/|^node_modules/(next|react|react-dom)/" },
    },
    {
      name: "components-take-props",
      severity: "error",
      from: { path: "^components/" },
      to: { path: "^(app|db|lib/(data|auth))/", ...typeOnly },
    },
    {
      name: "lib-is-below-the-ui",
      severity: "error",
      from: { path: "^lib/" },
      to: { path: "^(app|components)/" },
    },
    {
      name: "the-ui-primitives-know-no-trade",
      severity: "error",
      from: { path: "^components/ui/" },
      to: { path: "^components/(?!ui/)|^lib/(music|schedule|schemas|permissions|call-sheets)/" },
    },
    {
      name: "no-tests-or-scripts-in-the-product",
      severity: "error",
      from: { path: "^(app|components|db|lib)/" },
      to: { path: "^(tests|scripts)/" },
    },
    {
      name: "no-development-packages-in-the-product",
      severity: "error",
      from: { path: "^(app|components|db|lib)/" },
      to: { dependencyTypes: ["npm-dev", "npm-no-pkg", "npm-unknown"], ...typeOnly },
    },
    {
      name: "arithmetic-is-tested",
      comment: "Every file of lib/music and lib/schedule is reached from a unit test.",
      severity: "error",
      from: { path: "^tests/unit/" },
      to: { path: PURE, reachable: false },
    },
    {
      name: "actions-are-tested",
      comment: "Every file of actions is imported by a test that calls them.",
      severity: "error",
      from: { path: "^tests/(actions|routes)/" },
      to: { path: "^app/.*/actions[.]ts$", reachable: false },
    },
  ],
  required: [
    {
      name: "the-data-layer-is-server-only",
      severity: "error",
      module: { path: "^lib/data/", pathNot: "types[.]ts$" },
      to: { path: "server-only" },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "^([.]next|[.]run|public|db/migrations|tests/fixtures)/" },
    tsConfig: { fileName: "tsconfig.json" },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ["exports"],
      conditionNames: ["import", "require", "node", "default", "types"],
    },
  },
};
