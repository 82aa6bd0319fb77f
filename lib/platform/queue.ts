import PgBoss from "pg-boss";
import type { Store } from "./db/open";
import { logError } from "./log";

/** What is to be done with one piece of work: its id in, whether more of it is left out. */
export type Work = (id: string) => Promise<"over" | "more">;

/** A running queue of this process. */
export interface WorkQueue {
  /** Has a piece of work taken up soon, here or in another process; one that waits already is not doubled. */
  send(id: string): Promise<void>;
  /** Ends after the pieces under way have come to a stop; what is left is taken up by another process or the next start. */
  stop(): Promise<void>;
}

/** Longer than any one turn of work may take: after this a killed process's work is given to another. */
const EXPIRY = 6 * 60;
const LOOK_EVERY = 2;
const LONGEST_STOP = 20_000;

/**
 * Works through a queue on the store's own database, `hands` pieces at a time. A piece with more left goes to the end of
 * the queue after its turn, so that a long one lets the others through.
 */
export async function startQueue(store: Store, name: string, hands: number, work: Work): Promise<WorkQueue> {
  let isOpen = true;
  const boss = new PgBoss({
    db: {
      executeSql: async (text: string, values?: readonly unknown[]) =>
        isOpen ? store.sql(text, values) : { rows: [] },
    },
    schedule: false,
    maintenanceIntervalSeconds: 30,
  });
  boss.on("error", (error) => logError(`queue ${name}`, error));
  await boss.start();
  await boss.createQueue(name, { name, policy: "short", retryLimit: 3, expireInSeconds: EXPIRY });
  const workers: string[] = [];
  const send = async (id: string) => {
    await boss.send(name, { id }, { singletonKey: id });
    for (const worker of workers) boss.notifyWorker(worker);
  };
  const options = { batchSize: 1, pollingIntervalSeconds: LOOK_EVERY };
  for (let i = 0; i < hands; i++) {
    const worker = await boss.work<{ id: string }>(name, options, async ([job]) => {
      if (job && (await work(job.data.id)) === "more") await send(job.data.id);
    });
    workers.push(worker);
  }
  return {
    send,
    async stop() {
      await boss.stop({ graceful: true, wait: true, timeout: LONGEST_STOP });
      isOpen = false;
    },
  };
}
