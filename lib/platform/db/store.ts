import { config } from "../config";
import { openEmbedded, openServer, type Store } from "./open";

/** The framework evaluates modules more than once a process: the one open store is kept where all of them see it. */
const shared = globalThis as typeof globalThis & {
  loadlineStore?: Promise<Store> | undefined;
  loadlineUsers?: (() => Promise<void>)[] | undefined;
};

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

/** Has something that uses the store ended before the store closes. */
export function beforeClosing(end: () => Promise<void>): void {
  shared.loadlineUsers = [...(shared.loadlineUsers ?? []), end];
}

/** Closes the store if it is open, after what uses it. */
export async function closeStore(): Promise<void> {
  const users = shared.loadlineUsers ?? [];
  shared.loadlineUsers = undefined;
  await Promise.allSettled(users.map((end) => end()));
  const opened = shared.loadlineStore;
  shared.loadlineStore = undefined;
  if (opened) await (await opened).close();
}
