import { runCommand, timed } from "./process";
import type { StageResult } from "./summary";

/** Format, lint, arrows, types and whether migrations and schema agree, each counted as one test. */
export async function checkStage(): Promise<StageResult> {
  const commands: string[][] = [
    ["biome", "check", "."],
    ["depcruise", "--config", ".dependency-cruiser.cjs", "app", "lib", "tests", "seed"],
    ["tsc", "--noEmit"],
  ];
  const { result: codes, seconds } = await timed(async () => {
    const found: number[] = [];
    for (const [command, ...args] of commands) found.push(await runCommand("npx", [command ?? "", ...args]));
    return found;
  });
  const failed = codes.filter((code) => code !== 0).length;
  return { name: "format, lint, arrows, types", passed: codes.length - failed, failed, skipped: 0, seconds };
}
