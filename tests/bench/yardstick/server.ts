import { execFileSync, spawn } from "node:child_process";
import { createInterface } from "node:readline";

/** A yardstick in a process of its own: asked for one run, it answers with the milliseconds. */
export interface Yardstick {
  run(): Promise<number>;
  values(): Promise<number[]>;
  end(): void;
}

/** Starts a yardstick, or says null where its command is missing. */
export function startYardstick(command: string, options: readonly string[]): Yardstick {
  const single = { OMP_NUM_THREADS: "1", OPENBLAS_NUM_THREADS: "1" };
  const child = spawn(command, options, {
    stdio: ["pipe", "pipe", "inherit"],
    env: { ...process.env, ...single },
  });
  const lines = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
  const ask = async (line: string) => {
    child.stdin.write(`${line}\n`);
    return String((await lines.next()).value).trim();
  };
  return {
    run: async () => Number(await ask("run")) / 1e6,
    values: async () => (await ask("values")).split(" ").map(Number),
    end: () => child.stdin.end(),
  };
}

/** Whether a command runs without complaint. */
export function canRun(command: string, options: readonly string[]): boolean {
  try {
    execFileSync(command, options, { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
}
