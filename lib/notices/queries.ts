import { peopleNames } from "../platform/accounts/peopleNames";
import { config } from "../platform/config";
import { defineQuery } from "../platform/operation";
import { inWorkspace } from "../workspaces/schema";
import type { NoticeOf } from "./notify";
import { followedInput } from "./schema";

const MOST_SHOWN = 200;

/** One's own inbox of a workspace, newest first. */
const list = defineQuery({
  name: "notices.list",
  input: inWorkspace,
  async run({ tx, actor, member }, { workspaceId }) {
    await member(workspaceId);
    const own = await tx.member.findUniqueOrThrow({
      where: { workspaceId_userId: { workspaceId, userId: actor.userId } },
      select: { mail: true },
    });
    const notices = await tx.notice.findMany({
      where: { workspaceId, userId: actor.userId },
      orderBy: { id: "desc" },
      take: MOST_SHOWN,
    });
    const nameOf = await peopleNames(
      tx,
      notices.map(({ actorId }) => actorId),
    );
    const dealIds = notices.flatMap(({ dealId }) => (dealId ? [dealId] : []));
    const deals = await tx.deal.findMany({
      where: { id: { in: dealIds } },
      select: { id: true, name: true },
    });
    const dealName = new Map(deals.map(({ id, name }) => [id, name]));
    return {
      mail: own.mail as "off" | "digest" | "atOnce",
      isMailPossible: config().SMTP_URL !== undefined,
      notices: notices.map(({ id, kind, dealId, actorId, payload, at, readAt }) => ({
        id: String(id),
        kind: kind as NoticeOf["kind"],
        dealId: dealId && dealName.has(dealId) ? dealId : null,
        deal: dealId ? (dealName.get(dealId) ?? null) : null,
        by: nameOf(actorId),
        payload: payload as NoticeOf["payload"],
        at: at.toISOString(),
        isRead: readAt !== null,
      })),
    };
  },
});

/** How many lines of one's inbox are unread. */
const count = defineQuery({
  name: "notices.count",
  input: inWorkspace,
  async run({ tx, actor, member }, { workspaceId }) {
    await member(workspaceId);
    return { unread: await tx.notice.count({ where: { workspaceId, userId: actor.userId, readAt: null } }) };
  },
});

/** Whether one follows a deal or has muted it. */
const followed = defineQuery({
  name: "notices.followed",
  input: followedInput,
  async run({ tx, actor, member }, { workspaceId, dealId }) {
    await member(workspaceId);
    const row = await tx.follow.findUnique({ where: { dealId_userId: { dealId, userId: actor.userId } } });
    return { state: (row?.state ?? "neither") as "following" | "muted" | "neither" };
  },
});

export const queries = { list, count, followed };
