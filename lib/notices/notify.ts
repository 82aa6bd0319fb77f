import type { CommandContext } from "../platform/operation";

/** What an inbox line is about; `payload` holds the ids that it leads to and the words that it quotes. */
export interface NoticeOf {
  readonly workspaceId: string;
  readonly dealId: string | null;
  readonly kind: "mention" | "reply" | "review.asked" | "review.answered" | "deal.changed";
  readonly payload: Readonly<Record<string, string | number>>;
}

/** Puts a line into the inbox of each person, the actor left out, in the command's own transaction. */
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
  if (members.length === 0) return;
  await tx.notice.createMany({
    data: members.map(({ userId }) => ({
      workspaceId,
      userId,
      dealId,
      kind,
      actorId: actor.userId,
      payload,
      at: now,
    })),
  });
  const told = members.map(({ userId }) => userId);
  await emit({ workspaceId, kind: "notice.new", payload: { for: told } });
}
