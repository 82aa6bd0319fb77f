import type { Store } from "../platform/db/open";
import { beforeClosing, store } from "../platform/db/store";
import { logError } from "../platform/log";
import { startQueue } from "../platform/queue";
import { JOBS_CHANNEL } from "./channel";
import { unfinished } from "./states";
import { takeTurn } from "./turn";

const HANDS = 2;
const LOOK_FOR_LOST = 30_000;

const shared = globalThis as typeof globalThis & { loadlineJobs?: Promise<() => Promise<void>> | undefined };

/** Lets this process do background work, once; it stops before the store closes. */
export function startJobs(): Promise<() => Promise<void>> {
  shared.loadlineJobs ??= store().then(async (opened) => {
    const stop = await workOn(opened);
    beforeClosing(async () => {
      shared.loadlineJobs = undefined;
      await stop();
    });
    return stop;
  });
  return shared.loadlineJobs;
}

/**
 * Does background work on a store; resolves with the way to stop. Jobs left unfinished by a process that is gone are taken
 * up again: on the embedded database at once, on a server when the dead process's turn has expired.
 */
export async function workOn(opened: Store): Promise<() => Promise<void>> {
  let isStopping = false;
  const queue = await startQueue(opened, "jobs", HANDS, (id) =>
    takeTurn(opened.database, id, () => isStopping),
  );
  const send = (id: string) =>
    queue.send(id).catch((error: unknown) => {
      if (!isStopping) logError("jobs", error);
    });
  const sendAll = async (states: readonly string[]) => {
    const rows = await opened.database.job.findMany({
      where: { state: { in: [...states] } },
      orderBy: { createdAt: "asc" },
      select: { id: true },
    });
    for (const { id } of rows) await send(id);
  };
  const unlisten = await opened.listen(JOBS_CHANNEL, (id) => void (id ? send(id) : sendAll(["queued"])));
  await sendAll(opened.mode === "embedded" ? unfinished : ["queued"]);
  const timer = setInterval(() => {
    sendAll(["queued"]).catch((error: unknown) => logError("jobs", error));
  }, LOOK_FOR_LOST);
  timer.unref();
  return async () => {
    isStopping = true;
    clearInterval(timer);
    await unlisten();
    await queue.stop();
  };
}
