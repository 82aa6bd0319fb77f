import { type ChildProcess, spawn } from "node:child_process";
import { createServer } from "node:net";

/** A Loadline of the test's own, beside the suite's. */
export interface AppProcess {
  readonly address: string;
  readonly output: () => string;
  /** Ends it by a signal and waits until it is gone. */
  kill(signal: NodeJS.Signals): Promise<number | null>;
}

function launch(settings: Readonly<Record<string, string>>) {
  const child = spawn(process.execPath, ["--import", "tsx", "lib/platform/start/main.ts"], {
    env: { ...process.env, DATABASE_URL: "", NODE_ENV: "production", ...settings } as NodeJS.ProcessEnv,
    stdio: ["ignore", "pipe", "pipe"],
  });
  let text = "";
  child.stdout.on("data", (data) => {
    text += data;
  });
  child.stderr.on("data", (data) => {
    text += data;
  });
  const ended = new Promise<number | null>((resolve) => child.once("exit", (code) => resolve(code)));
  return { child, ended, output: () => text };
}

/** Starts a Loadline on a port and waits until it serves. */
export async function startApp(
  settings: Readonly<Record<string, string>> & { PORT: string },
): Promise<AppProcess> {
  const { child, ended, output } = launch(settings);
  const address = `http://localhost:${settings.PORT}`;
  await waitUntilServing(child, address, output);
  return {
    address,
    output,
    async kill(signal) {
      child.kill(signal);
      return ended;
    },
  };
}

async function waitUntilServing(child: ChildProcess, address: string, output: () => string): Promise<void> {
  for (let i = 0; i < 300; i++) {
    if (child.exitCode !== null) throw new Error(`It did not start: ${output()}`);
    const answer = await fetch(`${address}/api/health`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`It does not serve: ${output()}`);
}

/** Starts a Loadline that cannot start: its exit code and what it said. */
export async function failedStart(settings: Readonly<Record<string, string>>) {
  const { ended, output } = launch(settings);
  const code = await ended;
  return { code, said: output().trim() };
}

/** A port that nothing listens on. */
export function freePort(): Promise<string> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "localhost", () => {
      const address = server.address();
      server.close(() => resolve(String(typeof address === "object" ? address?.port : address)));
    });
  });
}
