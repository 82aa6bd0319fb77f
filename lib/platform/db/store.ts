import { config } from "../config";
import { openEmbedded, openServer, type Store } from "./open";

/** The framework evaluates modules more than once a process: the one open store is kept where all of them see it. */
const shared = globalThis as typeof globalThis & { loadlineStore?: Promise<Store> | undefined };

/** The process's store, opened on first use; never during a build. */
export function store(): Promise<Store> {
  if (process.env.NEXT_PHASE === "phase-production-build") {
    return Promise.reject(new Error("The database is not opened during a build."));
  }
  shared.loadlineStore ??= open();
  return shared.loadlineStore;
}

async function open(): Promise<Store> {
  const { DATABASE_URL, DATA_DIR } = config();
  try {
    return await (DATABASE_URL ? openServer(DATABASE_URL) : openEmbedded(DATA_DIR));
  } catch (error) {
    shared.loadlineStore = undefined;
    throw error;
  }
}

/** Closes the store if it is open. */
export async function closeStore(): Promise<void> {
  const opened = shared.loadlineStore;
  shared.loadlineStore = undefined;
  if (opened) await (await opened).close();
}
