import { execFile } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { promisify } from "node:util";
import { Worker } from "node:worker_threads";
import { chromium } from "@playwright/test";
import { build } from "esbuild";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { base, flat, mixedPool, structure } from "../bench/priceCases";
import { ensureChromium } from "../runner/chromium";

const cases = join(process.cwd(), "tests", "reference", "data", "cases");
const references = readdirSync(cases).sort();
const yearly = { kind: "even", years: 2, perYear: 1 } as const;
/** Beside the reference requests: mixed amounts on a shared grid, and a pool large enough to be taken by its cumulants. */
const more = [
  { ...structure(mixedPool(40), base), schedule: yearly },
  { ...structure(mixedPool(800), flat), schedule: yearly },
];
const files = [...references, "40 mixed names", "800 mixed names"];
const requests: unknown[] = [
  ...references.map((file) => JSON.parse(readFileSync(join(cases, file), "utf8")).request),
  ...more,
];
/** What stands in `requests` for each place to price, as the text of a function of the bundle. */
const ENTRY = `
  import { price } from ${JSON.stringify(join(process.cwd(), "lib", "pricing", "price.ts"))};
  globalThis.priceAll = (requests) => requests.map((request) => {
    const outcome = price(request);
    return outcome.ok ? JSON.stringify(outcome.report) : "refused " + JSON.stringify(outcome.problems);
  });
`;

let folder = "";
let bundle = "";
let here: string[] = [];

/** Texts by case, so that a difference names its case. */
function byCase(texts: readonly string[]): Record<string, string | undefined> {
  return Object.fromEntries(files.map((file, i) => [file, texts[i]]));
}

async function inThread(before: string): Promise<string[]> {
  const script = `${before}
    require(${JSON.stringify(bundle)});
    const { parentPort, workerData } = require("node:worker_threads");
    parentPort.postMessage(globalThis.priceAll(workerData));`;
  const worker = new Worker(script, { eval: true, workerData: requests });
  return new Promise((resolve, reject) => worker.once("message", resolve).once("error", reject));
}

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "loadline-bits-"));
  bundle = join(folder, "price.cjs");
  await build({
    stdin: { contents: ENTRY, resolveDir: process.cwd(), loader: "ts" },
    outfile: bundle,
    bundle: true,
    format: "iife",
    target: "es2022",
    minify: true,
    logLevel: "error",
  });
  here = requests.map((request) => {
    const outcome = price(request);
    return outcome.ok ? JSON.stringify(outcome.report) : `refused ${JSON.stringify(outcome.problems)}`;
  });
}, 300_000);

afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("CANONICAL: one request has one report, byte for byte, wherever it is priced (all reference requests and large pools)", () => {
  it("in a worker thread, bundled and minified", { timeout: 300_000 }, async () => {
    expect(byCase(await inThread(""))).toEqual(byCase(here));
  });

  it("on a machine without WebAssembly, by the kernel's twin", { timeout: 300_000 }, async () => {
    expect(byCase(await inThread("delete globalThis.WebAssembly;"))).toEqual(byCase(here));
  });

  it("on the command line", { timeout: 300_000 }, async () => {
    const file = join(folder, "requests.jsonl");
    writeFileSync(file, requests.map((request) => JSON.stringify(request)).join("\n"));
    const command = ["--import", "tsx", join("lib", "pricing", "cli", "main.ts"), file];
    const run = promisify(execFile)(process.execPath, command, { maxBuffer: 2 ** 28 });
    const { stdout } = await run.catch((error: { code: number; stdout: string }) => {
      if (error.code !== 2) throw error;
      return error;
    });
    const lines = stdout.trimEnd().split("\n");
    const isRefused = here.map((text) => text.startsWith("refused"));
    expect(byCase(lines.map((line, i) => (isRefused[i] ? "refused" : line)))).toEqual(
      byCase(here.map((text, i) => (isRefused[i] ? "refused" : text))),
    );
    expect(lines.map((line) => line.startsWith('{"errors"'))).toEqual(isRefused);
  });

  it("in the browser", { timeout: 300_000 }, async () => {
    const executablePath = await ensureChromium();
    const browser = await chromium.launch({
      ...(executablePath ? { executablePath } : {}),
      args: ["--no-sandbox", "--disable-gpu", "--disable-background-networking"],
    });
    try {
      const page = await browser.newPage();
      await page.addScriptTag({ path: bundle });
      const texts = await page.evaluate(
        (given) =>
          (globalThis as unknown as { priceAll(requests: unknown[]): string[] }).priceAll(given as unknown[]),
        requests,
      );
      expect(byCase(texts)).toEqual(byCase(here));
    } finally {
      await browser.close();
    }
  });
});
