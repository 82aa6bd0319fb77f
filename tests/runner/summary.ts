/** What one stage of the suite came to; a stage that could not run at all counts as one failure. */
export interface StageResult {
  readonly name: string;
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
  readonly seconds: number;
  readonly remark?: string;
}

/** Prints a line a stage and, last, the plain closing line; true when nothing failed and something passed. */
export function printSummary(results: readonly StageResult[]): boolean {
  const total = (pick: (result: StageResult) => number) =>
    results.reduce((sum, result) => sum + pick(result), 0);
  const write = (line: string) => process.stdout.write(`${line}\n`);
  write("");
  for (const { name, passed, failed, skipped, seconds, remark } of results) {
    const counts = `${passed} ok, ${failed} not ok${skipped > 0 ? `, ${skipped} left out` : ""}`;
    write(
      `${name.padEnd(28)} ${counts.padEnd(36)} ${seconds.toFixed(0).padStart(4)} s  ${remark ?? ""}`.trimEnd(),
    );
  }
  const passed = total((result) => result.passed);
  const failed = total((result) => result.failed);
  const skipped = total((result) => result.skipped);
  write("");
  write(`${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ""}`);
  return failed === 0 && passed > 0;
}
