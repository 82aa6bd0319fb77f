import { createServer } from "node:net";

/** @throws Error in one sentence when something else listens there. */
export function checkPort(port: number, host: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", (error: NodeJS.ErrnoException) => {
      const reason =
        error.code === "EADDRINUSE"
          ? "is in use by another program: set PORT to another one"
          : `cannot be used (${error.code})`;
      reject(new Error(`Port ${port} on ${host} ${reason}.`));
    });
    probe.listen(port, host, () => probe.close(() => resolve()));
  });
}
