/** `npm start`: checks the settings, builds when sources changed, migrates, makes the demo on a first start, serves. */
import { createServer } from "node:http";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import next from "next";
import { ADDRESS_HEADER, trustedAddress } from "../accounts/address";
import { config } from "../config";
import { closeStore, store } from "../db/store";
import { checkPort } from "./freePort";
import { buildWhenStale } from "./freshBuild";

interface Seed {
  plantDemo(): Promise<{ readonly email: string; readonly password: string } | null>;
}

async function main(): Promise<void> {
  const settings = config();
  await checkPort(settings.PORT, settings.HOST);
  buildWhenStale();
  process.env.NEXT_MANUAL_SIG_HANDLE = "true";
  (process.env as Record<string, string>).NODE_ENV = "production";
  const { mode } = await store();
  const { plantDemo } = (await import(pathToFileURL(join(process.cwd(), "seed", "index.ts")).href)) as Seed;
  const demo = await plantDemo();
  const app = next({ dev: false, hostname: settings.HOST, port: settings.PORT });
  await app.prepare();
  const handle = app.getRequestHandler();
  const server = createServer((request, response) => {
    const forwarded = request.headers["x-forwarded-for"];
    const address = trustedAddress(
      request.socket.remoteAddress,
      String(forwarded ?? ""),
      settings.TRUST_PROXY === "yes",
    );
    request.headers[ADDRESS_HEADER] = address;
    void handle(request, response);
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(settings.PORT, settings.HOST, resolve);
  });
  console.warn(
    `Loadline serves at ${settings.PUBLIC_URL} (${mode === "embedded" ? `data in ${settings.DATA_DIR}` : "PostgreSQL server"}).`,
  );
  if (demo) console.warn(`Demo workspace: sign in as ${demo.email} with the password ${demo.password}`);
  let isStopping = false;
  const stop = () => {
    if (isStopping) return;
    isStopping = true;
    server.close();
    server.closeAllConnections();
    void closeStore().finally(() => process.exit(0));
  };
  process.on("SIGINT", stop);
  process.on("SIGTERM", stop);
  watchParent(stop);
}

/** A signal to npm leaves its child running: when the parent is gone, so are we. */
function watchParent(stop: () => void): void {
  const parent = process.ppid;
  if (process.env.npm_lifecycle_event !== "start" || parent <= 1) return;
  setInterval(() => {
    if (process.ppid !== parent) stop();
  }, 1_000).unref();
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : String(error));
  process.exit(1);
});
