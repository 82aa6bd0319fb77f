import { dealIn } from "../deals/find";
import { type DealContent, dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery, type QueryContext } from "../platform/operation";
import type { PricingReport } from "../pricing/report";
import { unpackedReport } from "../runs/stored";
import { type Anchor, figureAt, markKey } from "./anchor";
import { mayChange, mayComment } from "./policy";

const list = defineQuery({
  name: "discussion.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const { tx, actor } = context;
    const member = await context.member(workspaceId);
    const deal = await dealIn(context, workspaceId, dealId);
    const threads = await tx.thread.findMany({
      where: { dealId },
      orderBy: { createdAt: "desc" },
      include: {
        comments: { orderBy: { createdAt: "asc" } },
        seen: { where: { userId: actor.userId }, select: { seenAt: true } },
      },
    });
    const nameOf = await peopleNames(
      tx,
      threads.flatMap((thread) => thread.comments.map((comment) => comment.authorId)),
    );
    const pins = await pinsOf(
      context,
      deal,
      threads.map(({ anchor }) => anchor as Anchor),
    );
    const members = await tx.member.findMany({ where: { workspaceId }, include: { user: true } });
    return {
      may: { comment: mayComment(member) },
      members: members.map(({ userId, user }) => ({ userId, name: user.name })),
      threads: threads.map(({ id, anchor, resolvedAt, comments, seen }) => {
        const newest = comments.findLast(({ authorId }) => authorId !== actor.userId);
        const seenAt = seen[0]?.seenAt;
        return {
          id,
          pin: pins(anchor as Anchor),
          isResolved: resolvedAt !== null,
          isMine: comments.some(({ authorId }) => authorId === actor.userId),
          isUnread: newest !== undefined && (!seenAt || newest.createdAt > seenAt),
          comments: comments.map((comment) => ({
            id: comment.id,
            author: nameOf(comment.authorId),
            body: comment.body,
            version: comment.version,
            at: comment.createdAt.toISOString(),
            isEdited: comment.editedAt !== null,
            isDeleted: comment.deletedAt !== null,
            may: { change: mayChange(member, comment) },
          })),
        };
      }),
    };
  },
});

/** How many open threads each thing of a deal has, for the marks beside them; and who can be named in a new one. */
const marks = defineQuery({
  name: "discussion.marks",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const member = await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const { tx } = context;
    const threads = await tx.thread.findMany({
      where: { dealId, resolvedAt: null },
      select: { anchor: true },
    });
    const counts = new Map<string, number>();
    for (const { anchor } of threads) {
      const key = markKey(anchor as Anchor);
      if (key !== null) counts.set(key, (counts.get(key) ?? 0) + 1);
    }
    const members = await tx.member.findMany({ where: { workspaceId }, include: { user: true } });
    return {
      may: { comment: mayComment(member) },
      open: [...counts].map(([key, count]) => ({ key, count })),
      members: members.map(({ userId, user }) => ({ userId, name: user.name })),
    };
  },
});

/** What a thread is pinned to, as shown: where it still is, and for a figure its value then and now. */
export type Pin =
  | { readonly kind: "deal" }
  | {
      readonly kind: "class" | "name" | "quote";
      readonly id: string;
      readonly label: string;
      readonly isGone: boolean;
    }
  | {
      readonly kind: "figure";
      readonly path: string;
      readonly label: string;
      readonly runId: string;
      readonly run: number;
      readonly valueThen: number | null;
      readonly latestRun: number | null;
      readonly valueNow: number | null;
    };

interface Deal {
  readonly id: string;
  readonly poolId: string;
  readonly content: unknown;
}

/** Looks up what the anchors of a deal's threads need, once for all of them. */
async function pinsOf(
  { tx }: QueryContext,
  deal: Deal,
  anchors: readonly Anchor[],
): Promise<(anchor: Anchor) => Pin> {
  const runIds = anchors.flatMap((anchor) => (anchor.kind === "figure" ? [anchor.runId] : []));
  const latest =
    runIds.length > 0
      ? await tx.run.findFirst({ where: { dealId: deal.id }, orderBy: { number: "desc" } })
      : null;
  const runs = await tx.run.findMany({ where: { id: { in: runIds } } });
  const reports = new Map<string, { number: number; report: PricingReport }>();
  for (const { id, number, report } of latest ? [...runs, latest] : runs)
    reports.set(id, { number, report: unpackedReport(report) });
  const nameIds = anchors.flatMap((anchor) => (anchor.kind === "name" ? [anchor.id] : []));
  const names = await tx.poolName.findMany({
    where: { poolId: deal.poolId, key: { in: nameIds } },
    select: { key: true },
  });
  const here = {
    class: new Set((deal.content as DealContent).classes.map(({ id }) => id)),
    name: new Set(names.map(({ key }) => key)),
  };
  return (anchor) => {
    if (anchor.kind === "deal") return anchor;
    if (anchor.kind !== "figure")
      return { ...anchor, isGone: anchor.kind !== "quote" && !here[anchor.kind].has(anchor.id) };
    const then = reports.get(anchor.runId);
    const now = latest ? reports.get(latest.id) : undefined;
    return {
      kind: "figure",
      path: anchor.path,
      label: anchor.label,
      runId: anchor.runId,
      run: then?.number ?? 0,
      valueThen: then ? figureAt(then.report, anchor.path) : null,
      latestRun: now?.number ?? null,
      valueNow: now ? figureAt(now.report, anchor.path) : null,
    };
  };
}

export const queries = { list, marks };
