/** @type {import("next").NextConfig} */
export default {
  serverExternalPackages: [
    "@electric-sql/pglite",
    "pg",
    "pglite-prisma-adapter",
    "@prisma/adapter-pg",
    "piscina",
    "esbuild",
  ],
  poweredByHeader: false,
};
