import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { runCommand, timed } from "./process";
import type { StageResult } from "./summary";

interface VitestReport {
  readonly numPassedTests: number;
  readonly numFailedTests: number;
  readonly numPendingTests: number;
  readonly numFailedTestSuites: number;
}

/** Runs vitest with the given arguments and counts its tests; a file that fails to load counts as a failure. */
export async function vitestStage(
  name: string,
  args: readonly string[],
  environment: Record<string, string> = {},
): Promise<StageResult> {
  const folder = mkdtempSync(join(tmpdir(), "loadline-vitest-"));
  const outputFile = join(folder, "report.json");
  const { result: code, seconds } = await timed(() =>
    runCommand(
      "npx",
      ["vitest", "run", "--reporter=default", "--reporter=json", `--outputFile.json=${outputFile}`, ...args],
      environment,
    ),
  );
  if (!existsSync(outputFile))
    return { name, passed: 0, failed: 1, skipped: 0, seconds, remark: "did not run" };
  const report = JSON.parse(readFileSync(outputFile, "utf8")) as VitestReport;
  rmSync(folder, { recursive: true, force: true });
  const failed = report.numFailedTests > 0 ? report.numFailedTests : code === 0 ? 0 : 1;
  return { name, passed: report.numPassedTests, failed, skipped: report.numPendingTests, seconds };
}
