import type { CommandContext } from "../platform/operation";

/** What an inbox line is about; `payload` holds the ids that it leads to and the words that it quotes. */
export interface NoticeOf {
  readonly workspaceId: string;
  readonly dealId: string | null;
  readonly kind: "mention" | "reply" | "review.asked" | "review.answered" | "deal.changed";
  readonly payload: Readonly<Record<string, string | number>>;
}

/** Puts a line into the inbox of each person, in the command's own transaction; the actor and those who muted the deal are left out. */
export async function notify(
  { tx, actor, now, emit }: CommandContext,
  userIds: readonly string[],
  { workspaceId, dealId, kind, payload }: NoticeOf,
): Promise<void> {
  const others = [...new Set(userIds)].filter((userId) => userId !== actor.userId);
  if (others.length === 0) return;
  const members = await tx.member.findMany({
    where: { workspaceId, userId: { in: others } },
    select: { userId: true },
  });
  const muted =
    dealId === null
      ? []
      : await tx.follow.findMany({ where: { dealId, state: "muted" }, select: { userId: true } });
  const quiet = new Set(muted.map(({ userId }) => userId));
  const told = members.map(({ userId }) => userId).filter((userId) => !quiet.has(userId));
  if (told.length === 0) return;
  await tx.notice.createMany({
    data: told.map((userId) => ({
      workspaceId,
      userId,
      dealId,
      kind,
      actorId: actor.userId,
      payload,
      at: now,
    })),
  });
  await emit({ workspaceId, kind: "notice.new", payload: { for: told } });
}

/** Tells those who follow a deal that it changed. */
export async function notifyFollowers(
  context: CommandContext,
  notice: NoticeOf & { readonly dealId: string },
): Promise<void> {
  const { dealId } = notice;
  const followers = await context.tx.follow.findMany({
    where: { dealId, state: "following" },
    select: { userId: true },
  });
  await notify(
    context,
    followers.map(({ userId }) => userId),
    notice,
  );
}
