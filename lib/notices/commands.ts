import { dealIn } from "../deals/find";
import { defineCommand } from "../platform/operation";
import { followInput, mailInput, readInput } from "./schema";

/** Marks lines of one's own inbox as read or unread. */
const read = defineCommand({
  name: "notices.read",
  input: readInput,
  async run({ tx, actor, now, member }, { workspaceId, which, isRead }) {
    await member(workspaceId);
    await tx.notice.updateMany({
      where: {
        workspaceId,
        userId: actor.userId,
        ...(which === "all" ? {} : { id: { in: which.map(BigInt) } }),
        readAt: isRead ? null : { not: null },
      },
      data: { readAt: isRead ? now : null },
    });
    return null;
  },
});

/** Follows a deal, mutes it, or neither. */
const follow = defineCommand({
  name: "notices.follow",
  input: followInput,
  async run(context, { workspaceId, dealId, state }) {
    const { tx, actor, member } = context;
    await member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const key = { dealId, userId: actor.userId };
    if (state === "neither") await tx.follow.deleteMany({ where: key });
    else
      await tx.follow.upsert({
        where: { dealId_userId: key },
        create: { ...key, state },
        update: { state },
      });
    return null;
  },
});

/** How one's notices of this workspace are mailed. */
const setMail = defineCommand({
  name: "notices.setMail",
  input: mailInput,
  async run({ tx, actor, now, member }, { workspaceId, mail }) {
    await member(workspaceId);
    const { userId } = actor;
    const where = { workspaceId_userId: { workspaceId, userId } };
    const before = await tx.member.findUniqueOrThrow({ where });
    await tx.member.update({ where, data: { mail } });
    // What came while mail was off stays in the inbox alone.
    if (before.mail === "off")
      await tx.notice.updateMany({ where: { workspaceId, userId, mailedAt: null }, data: { mailedAt: now } });
    return null;
  },
});

export const commands = { read, follow, setMail };
