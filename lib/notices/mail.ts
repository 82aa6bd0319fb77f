import type { Notice } from "@/lib/generated/prisma/client";
import { config } from "../platform/config";
import type { Database } from "../platform/db/client";
import { sendMail } from "../platform/mail";
import type { NoticeOf } from "./notify";
import { noticePlace, noticeWords } from "./words";

/** A digest is sent when its oldest notice has waited so long. */
const DIGEST_EVERY = 60 * 60_000;
/** What could not be sent for so long stays in the inbox alone. */
const WORTH_SENDING = 2 * 24 * 60 * 60_000;

/**
 * Mails what is due: for those who want it at once every unread notice not mailed yet, for those who want a digest all of
 * theirs when the oldest is an hour old; one mail a person and workspace. Several processes may do so at once: each takes
 * other notices, by row locks, before it sends; those of a mail that could not be sent are given back.
 * @returns how many mails were sent.
 */
export async function mailNotices(database: Database, now = new Date()): Promise<number> {
  let sent = 0;
  for (const notices of perInbox(await claim(database, now))) {
    const ids = notices.map(({ id }) => id);
    if (await mailOne(database, notices)) sent += 1;
    else await database.notice.updateMany({ where: { id: { in: ids } }, data: { mailedAt: null } });
  }
  return sent;
}

function claim(database: Database, now: Date): Promise<Notice[]> {
  const worth = new Date(now.getTime() - WORTH_SENDING);
  const digested = new Date(now.getTime() - DIGEST_EVERY);
  return database.$queryRaw<Notice[]>`
    UPDATE "notice" SET "mailedAt" = ${now}
    WHERE "mailedAt" IS NULL AND id IN (
      SELECT n.id FROM "notice" n
      JOIN "member" m ON m."workspaceId" = n."workspaceId" AND m."userId" = n."userId"
      WHERE n."mailedAt" IS NULL AND n."readAt" IS NULL AND n."at" > ${worth}
        AND (m.mail = 'atOnce' OR (m.mail = 'digest' AND EXISTS (
          SELECT 1 FROM "notice" o
          WHERE o."userId" = n."userId" AND o."workspaceId" = n."workspaceId" AND o."mailedAt" IS NULL
            AND o."readAt" IS NULL AND o."at" > ${worth} AND o."at" <= ${digested})))
      ORDER BY n.id
      FOR UPDATE OF n SKIP LOCKED
    )
    RETURNING *`;
}

function perInbox(notices: readonly Notice[]): Notice[][] {
  const inboxes = new Map<string, Notice[]>();
  for (const notice of [...notices].sort((a, b) => (a.id < b.id ? -1 : 1))) {
    const key = `${notice.workspaceId} ${notice.userId}`;
    inboxes.set(key, [...(inboxes.get(key) ?? []), notice]);
  }
  return [...inboxes.values()];
}

async function mailOne(database: Database, notices: readonly Notice[]): Promise<boolean> {
  const [{ workspaceId, userId }] = notices as [Notice];
  const people = await database.user.findMany({
    where: { id: { in: [userId, ...notices.map(({ actorId }) => actorId)] } },
    select: { id: true, name: true, email: true },
  });
  const deals = await database.deal.findMany({
    where: { id: { in: notices.flatMap(({ dealId }) => (dealId ? [dealId] : [])) } },
    select: { id: true, name: true },
  });
  const to = people.find(({ id }) => id === userId);
  if (!to) return true;
  const parts = notices.map((notice) => {
    const kind = notice.kind as NoticeOf["kind"];
    const payload = notice.payload as NoticeOf["payload"];
    const deal = deals.find(({ id }) => id === notice.dealId) ?? null;
    const by = people.find(({ id }) => id === notice.actorId)?.name ?? "Someone";
    const words = noticeWords({ kind, by, deal: deal?.name ?? null, payload });
    const address = deal && `${config().PUBLIC_URL}${noticePlace(workspaceId, deal.id, { kind, payload })}`;
    return {
      words,
      text: [words, payload.words && `  ${payload.words}`, address].filter(Boolean).join("\n"),
    };
  });
  const [first] = parts;
  const subject = parts.length === 1 ? (first?.words ?? "") : `${parts.length} notices in Loadline`;
  const foot = `How these are mailed is set in the inbox: ${config().PUBLIC_URL}/w/${workspaceId}/inbox`;
  return sendMail(to.email, oneLine(subject), [...parts.map(({ text }) => text), foot].join("\n\n"));
}

/** Names are typed by people: a subject is one line. */
function oneLine(text: string): string {
  return text.replace(/\s+/g, " ").slice(0, 150);
}
