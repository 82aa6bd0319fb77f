import { createHash } from "node:crypto";
import { mkdirSync, realpathSync, rmSync } from "node:fs";
import { connect, createServer, type Server } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";

/**
 * Locks a data folder for this process. The lock is a socket that the system drops with the process, so a killed one
 * leaves nothing stale. @returns the release. @throws Error in one sentence naming the process that holds the folder.
 */
export async function lockFolder(folder: string): Promise<() => Promise<void>> {
  mkdirSync(folder, { recursive: true });
  const address = lockAddress(realpathSync(folder));
  for (let attempt = 0; attempt < 2; attempt++) {
    try {
      const server = await listen(address);
      return () => new Promise((resolve) => server.close(() => resolve()));
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== "EADDRINUSE") throw error;
      const holder = await holderOf(address);
      if (holder)
        throw new Error(`The data folder ${folder} is in use by another Loadline (process ${holder}).`);
      if (process.platform === "darwin") rmSync(address, { force: true });
    }
  }
  throw new Error(`The data folder ${folder} cannot be locked.`);
}

function lockAddress(folder: string): string {
  const name = `loadline-${createHash("sha256").update(folder).digest("hex").slice(0, 24)}`;
  if (process.platform === "linux") return `\0${name}`;
  if (process.platform === "win32") return `\\\\.\\pipe\\${name}`;
  return join(tmpdir(), `${name}.sock`);
}

function listen(address: string): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = createServer((socket) => socket.end(String(process.pid)));
    server.once("error", reject);
    server.listen(address, () => {
      server.unref();
      resolve(server);
    });
  });
}

function holderOf(address: string): Promise<string | null> {
  return new Promise((resolve) => {
    let text = "";
    const socket = connect(address);
    socket.on("data", (data) => {
      text += data;
    });
    socket.on("close", () => resolve(text || null));
    socket.on("error", () => resolve(null));
  });
}
