import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";

const STAMP = join(process.cwd(), ".next", "sources");
const SOURCES = [
  "app",
  "lib",
  "instrumentation.ts",
  "package-lock.json",
  "next.config.mjs",
  "postcss.config.mjs",
  "prisma/schema.prisma",
];

/** Builds the screens when any source differs from what the last build was made of. @throws Error when it fails. */
export function buildWhenStale(): void {
  const wanted = sourcesHash();
  if (
    existsSync(join(process.cwd(), ".next", "BUILD_ID")) &&
    existsSync(STAMP) &&
    readFileSync(STAMP, "utf8") === wanted
  )
    return;
  console.warn("Building the screens (about a minute, only when sources changed) …");
  const result = spawnSync(process.execPath, [join("node_modules", "next", "dist", "bin", "next"), "build"], {
    env: { ...process.env, NEXT_TELEMETRY_DISABLED: "1", NODE_ENV: "production" },
    encoding: "utf8",
  });
  if (result.status !== 0) throw new Error(`The build failed:\n${result.stdout}\n${result.stderr}`);
  writeFileSync(STAMP, wanted);
}

function sourcesHash(): string {
  const hash = createHash("sha256");
  for (const source of SOURCES) addTo(hash, join(process.cwd(), source));
  return hash.digest("hex");
}

function addTo(hash: ReturnType<typeof createHash>, path: string): void {
  if (!existsSync(path)) return;
  const entries = (() => {
    try {
      return readdirSync(path, { withFileTypes: true }).sort((one, other) =>
        one.name < other.name ? -1 : 1,
      );
    } catch {
      return null;
    }
  })();
  if (entries === null) {
    hash.update(path.slice(process.cwd().length)).update(readFileSync(path));
    return;
  }
  for (const entry of entries) if (entry.name !== "generated") addTo(hash, join(path, entry.name));
}
