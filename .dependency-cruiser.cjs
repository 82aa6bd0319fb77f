/**
 * The arrows of the house: they never turn round. See DEVELOPERS.md. @swc/core is installed so that TypeScript files are read
 * at all (TypeScript 7 has no interface for it): without it nothing is checked and nothing complains.
 */
module.exports = {
  forbidden: [
    { name: "no-cycles", severity: "error", from: { pathNot: "^lib/generated/" }, to: { circular: true } },
    {
      name: "quant-imports-nothing-above",
      severity: "error",
      from: { path: "^lib/quant" },
      to: { path: "^(app|lib/(?!quant/)|seed|tests)" },
    },
    {
      name: "quant-has-no-io",
      severity: "error",
      from: { path: "^lib/(quant|pricing)/", pathNot: "^lib/pricing/cli/" },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "pricing-is-the-only-door-to-quant",
      severity: "error",
      from: { path: "^(app|lib/(?!quant/|pricing/|compute/))" },
      to: { path: "^lib/quant/" },
    },
    {
      name: "pricing-imports-only-quant",
      severity: "error",
      from: { path: "^lib/pricing/", pathNot: "^lib/pricing/cli/" },
      to: { path: "^(app|lib/(?!quant/|pricing/))" },
    },
    {
      name: "compute-imports-only-pricing",
      severity: "error",
      from: { path: "^lib/compute/" },
      to: { path: "^(app|lib/(?!quant/|pricing/|compute/|platform/))" },
    },
    {
      name: "platform-knows-no-concept",
      severity: "error",
      from: { path: "^lib/platform/" },
      to: { path: "^(app|lib/(?!platform/|generated/|compute/|pricing/))" },
    },
    { name: "lib-knows-no-screen", severity: "error", from: { path: "^lib/" }, to: { path: "^app/" } },
    {
      name: "screens-reach-no-database",
      severity: "error",
      from: { path: "^app/" },
      to: { path: "^(lib/generated|lib/platform/db|node_modules/(@prisma|pg|@electric-sql))" },
    },
    {
      name: "nothing-imports-tests",
      severity: "error",
      from: { path: "^(app|lib|seed)/" },
      to: { path: "^tests/" },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "^(node_modules|\\.next|build|data)" },
    tsConfig: { fileName: "tsconfig.json" },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: { extensions: [".ts", ".tsx", ".mjs", ".js"] },
  },
};
