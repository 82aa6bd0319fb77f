/** @type {import("next").NextConfig} */
export default {
  serverExternalPackages: [
    "@electric-sql/pglite",
    "pg",
    "pg-boss",
    "pglite-prisma-adapter",
    "@prisma/adapter-pg",
    "piscina",
    "esbuild",
  ],
  poweredByHeader: false,
};
