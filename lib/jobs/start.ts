import type { Prisma } from "@/lib/generated/prisma/client";
import type { Store } from "../platform/db/open";
import { beforeClosing, store } from "../platform/db/store";
import { logError } from "../platform/log";
import { startQueue } from "../platform/queue";
import { JOBS_CHANNEL } from "./channel";
import { unfinished } from "./states";
import { takeTurn } from "./turn";

const HANDS = 2;
const LOOK_FOR_LOST = 30_000;
/** A job that is being worked on says so every second or after its longest cell: silent for this long, its process is gone. */
const SILENCE = 7 * 60_000;

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
 * up again: on the embedded database at once, on a server when they have been silent for some minutes.
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
  const sendAll = async (waiting: Prisma.JobWhereInput) => {
    const rows = await opened.database.job.findMany({
      where: waiting,
      orderBy: { createdAt: "asc" },
      select: { id: true },
    });
    for (const { id } of rows) await send(id);
  };
  const sendLost = () =>
    sendAll({
      OR: [{ state: "queued" }, { state: "running", updatedAt: { lt: new Date(Date.now() - SILENCE) } }],
    });
  const unlisten = await opened.listen(JOBS_CHANNEL, (id) => void (id ? send(id) : sendLost()));
  await (opened.mode === "embedded" ? sendAll({ state: { in: [...unfinished] } }) : sendLost());
  const timer = setInterval(() => {
    sendLost().catch((error: unknown) => logError("jobs", error));
  }, LOOK_FOR_LOST);
  timer.unref();
  return async () => {
    isStopping = true;
    clearInterval(timer);
    await unlisten();
    await queue.stop();
  };
}
