/**
 * `npm test`: types and lint, unit and reference tests, service tests on both databases, browser tests.
 * `npm test -- unit service` runs only the stages named. Ends with the plain line `N passed, N failed`.
 */
import { browserStage } from "./runner/browser";
import { checkStage } from "./runner/check";
import { serviceStages } from "./runner/service";
import { printSummary, type StageResult } from "./runner/summary";
import { vitestStage } from "./runner/vitest";

const stages: Record<string, () => Promise<StageResult[]>> = {
  check: async () => [await checkStage()],
  unit: async () => [
    await vitestStage("unit and reference", ["--exclude", "tests/service/**", "--exclude", "tests/slow/**"]),
  ],
  slow: async () => [await vitestStage("slow", ["tests/slow", "--passWithNoTests"])],
  service: serviceStages,
  browser: async () => [await browserStage()],
};

const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !(name in stages));
if (unknown.length > 0) {
  console.error(`There is no stage ${unknown.join(", ")}; the stages are ${Object.keys(stages).join(", ")}.`);
  process.exit(2);
}

const results: StageResult[] = [];
for (const [name, run] of Object.entries(stages)) {
  if (asked.length === 0 || asked.includes(name)) results.push(...(await run()));
}
process.exit(printSummary(results) ? 0 : 1);
