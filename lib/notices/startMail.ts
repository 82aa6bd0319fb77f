import { config } from "../platform/config";
import { beforeClosing, store } from "../platform/db/store";
import { logError } from "../platform/log";
import { mailNotices } from "./mail";

const LOOK_EVERY = 10_000;

const shared = globalThis as typeof globalThis & { loadlineMail?: boolean | undefined };

/** Has this process mail notices while it runs, where SMTP is set; it stops before the store closes. */
export async function startNoticeMail(): Promise<void> {
  if (!config().SMTP_URL || shared.loadlineMail) return;
  shared.loadlineMail = true;
  const { database } = await store();
  let underWay: Promise<unknown> | null = null;
  const timer = setInterval(() => {
    underWay ??= mailNotices(database)
      .catch((error: unknown) => logError("mail of notices", error))
      .finally(() => {
        underWay = null;
      });
  }, LOOK_EVERY);
  timer.unref();
  beforeClosing(async () => {
    clearInterval(timer);
    shared.loadlineMail = undefined;
    await underWay;
  });
}
