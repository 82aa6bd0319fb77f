import { existsSync } from "node:fs";
import { delimiter, join } from "node:path";
import { runCommand } from "./process";

const names = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable"];

/** The path of a Chromium on this machine, or undefined. CHROMIUM_PATH wins. */
export function findChromium(): string | undefined {
  const given = process.env.CHROMIUM_PATH;
  if (given && existsSync(given)) return given;
  const folders = (process.env.PATH ?? "").split(delimiter);
  return folders
    .flatMap((folder) => names.map((name) => join(folder, name)))
    .find((path) => existsSync(path));
}

/** Finds a Chromium, or installs the system's package where we may (root with apt-get). */
export async function ensureChromium(): Promise<string | undefined> {
  const found = findChromium();
  if (found || process.getuid?.() !== 0 || !existsSync("/usr/bin/apt-get")) return found;
  const quiet = { DEBIAN_FRONTEND: "noninteractive" };
  await runCommand("apt-get", ["update", "-qq"], quiet);
  await runCommand("apt-get", ["install", "-y", "-qq", "chromium"], quiet);
  return findChromium();
}
