import { existsSync, readdirSync, renameSync, statSync } from "node:fs";
import { join } from "node:path";

const FOLDER = join(process.cwd(), "build");

/** Bundles the worker's source when it is newer than the bundle, and says where the bundle is. */
export async function workerFile(): Promise<string> {
  const file = join(FOLDER, "pricingWorker.mjs");
  if (existsSync(file) && statSync(file).mtimeMs >= newestSource()) return file;
  const { build } = await import("esbuild");
  // Several processes may bundle at once: each writes a file of its own and puts it in place whole.
  const own = join(FOLDER, `pricingWorker.${process.pid}.mjs`);
  await build({
    entryPoints: [join(process.cwd(), "lib", "compute", "serverWorker.ts")],
    outfile: own,
    bundle: true,
    platform: "node",
    format: "esm",
    target: "node20",
    logLevel: "error",
  });
  renameSync(own, file);
  return file;
}

function newestSource(): number {
  return Math.max(
    ...["quant", "pricing", "compute"].map((room) => newestIn(join(process.cwd(), "lib", room))),
  );
}

function newestIn(folder: string): number {
  const entries = readdirSync(folder, { withFileTypes: true, recursive: true });
  return Math.max(
    0,
    ...entries
      .filter((entry) => entry.isFile())
      .map((entry) => statSync(join(entry.parentPath, entry.name)).mtimeMs),
  );
}
