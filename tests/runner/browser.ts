import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { ensureChromium } from "./chromium";
import { runCommand, timed } from "./process";
import type { StageResult } from "./summary";

interface PlaywrightReport {
  readonly stats: {
    readonly expected: number;
    readonly unexpected: number;
    readonly flaky: number;
    readonly skipped: number;
  };
}

/** The browser tests on the built app; says what to do where no Chromium can be found or installed. */
export async function browserStage(): Promise<StageResult> {
  const name = "browser";
  const chromium = await ensureChromium();
  if (!chromium) {
    const remark = "no Chromium found: install the package chromium, or set CHROMIUM_PATH";
    return { name, passed: 0, failed: 1, skipped: 0, seconds: 0, remark };
  }
  const folder = mkdtempSync(join(tmpdir(), "loadline-playwright-"));
  const outputFile = join(folder, "report.json");
  const { result: code, seconds } = await timed(() =>
    runCommand("npx", ["playwright", "test", "--reporter=list,json"], {
      CHROMIUM_PATH: chromium,
      PLAYWRIGHT_JSON_OUTPUT_NAME: outputFile,
    }),
  );
  if (!existsSync(outputFile))
    return { name, passed: 0, failed: 1, skipped: 0, seconds, remark: "did not run" };
  const { stats } = JSON.parse(readFileSync(outputFile, "utf8")) as PlaywrightReport;
  rmSync(folder, { recursive: true, force: true });
  const failed = stats.unexpected > 0 ? stats.unexpected : code === 0 ? 0 : 1;
  const remark = stats.flaky > 0 ? `${stats.flaky} passed only on a second try` : undefined;
  return {
    name,
    passed: stats.expected + stats.flaky,
    failed,
    skipped: stats.skipped,
    seconds,
    ...(remark ? { remark } : {}),
  };
}
