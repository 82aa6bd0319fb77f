import { spawn } from "node:child_process";

/** Runs a command with the terminal's own output; resolves with its exit code (1 when it could not start). */
export function runCommand(
  command: string,
  args: readonly string[],
  environment: Record<string, string> = {},
): Promise<number> {
  return new Promise((resolve) => {
    const child = spawn(command, args, { stdio: "inherit", env: { ...process.env, ...environment } });
    child.once("error", () => resolve(1));
    child.once("exit", (code) => resolve(code ?? 1));
  });
}

/** Seconds that a piece of work took, beside its result. */
export async function timed<Result>(
  work: () => Promise<Result>,
): Promise<{ result: Result; seconds: number }> {
  const start = performance.now();
  const result = await work();
  return { result, seconds: (performance.now() - start) / 1000 };
}
