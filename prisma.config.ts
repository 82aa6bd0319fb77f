import { defineConfig } from "prisma/config";

// `generate` never runs the native schema engine, yet the command line wants to fetch one from the network.
if (process.argv.includes("generate")) process.env.PRISMA_SCHEMA_ENGINE_BINARY ??= process.execPath;

export default defineConfig({ schema: "prisma/schema.prisma" });
