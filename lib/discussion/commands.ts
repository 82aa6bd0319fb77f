import { randomUUID } from "node:crypto";
import { dealIn } from "../deals/find";
import { notify } from "../notices/notify";
import type { Membership } from "../platform/accounts/actor";
import { notFound, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand } from "../platform/operation";
import { unpackedReport } from "../runs/stored";
import { need } from "../workspaces/policy";
import { type Anchor, figureAt } from "./anchor";
import { mayChange, mayComment } from "./policy";
import { deleteInput, editInput, replyInput, resolveInput, seenInput, startInput } from "./schema";

const MOST_A_MINUTE = 20;

const start = defineCommand({
  name: "discussion.start",
  input: startInput,
  async run(context, { workspaceId, dealId, body, mentions, anchor }) {
    await asCommenter(context, workspaceId);
    await dealIn(context, workspaceId, dealId);
    const { tx, actor, now } = context;
    await checkAnchor(context, dealId, anchor);
    const threadId = randomUUID();
    await tx.thread.create({
      data: {
        id: threadId,
        workspaceId,
        dealId,
        anchor,
        createdById: actor.userId,
        createdAt: now,
      },
    });
    const commentId = await addComment(
      context,
      { id: threadId, workspaceId, dealId },
      { body, mentions },
      "comment.posted",
    );
    return { threadId, commentId };
  },
});

const reply = defineCommand({
  name: "discussion.reply",
  input: replyInput,
  async run(context, { workspaceId, threadId, body, mentions }) {
    await asCommenter(context, workspaceId);
    const thread = await threadIn(context, workspaceId, threadId);
    return { commentId: await addComment(context, thread, { body, mentions }, "comment.replied") };
  },
});

const edit = defineCommand({
  name: "discussion.edit",
  input: editInput,
  async run(context, { workspaceId, commentId, version, body, mentions }) {
    const { comment, thread } = await ownComment(context, workspaceId, commentId);
    if (comment.version !== version)
      throw staleVersion("comment", { version: comment.version, body: comment.body });
    await context.tx.comment.update({
      where: { id: commentId },
      data: { body, mentions: [...mentions], version: version + 1, editedAt: context.now },
    });
    await told(context, thread, "comment.edited", commentId, { body: comment.body }, { body });
    const named = comment.mentions as string[];
    const added = mentions.filter((userId) => !named.includes(userId));
    await tellNamed(context, thread, commentId, body, added);
    return { version: version + 1 };
  },
});

const remove = defineCommand({
  name: "discussion.delete",
  input: deleteInput,
  async run(context, { workspaceId, commentId }) {
    const { comment, thread } = await ownComment(context, workspaceId, commentId);
    await context.tx.comment.update({ where: { id: commentId }, data: { body: "", deletedAt: context.now } });
    await told(context, thread, "comment.deleted", commentId, { body: comment.body });
    return null;
  },
});

const resolve = defineCommand({
  name: "discussion.resolve",
  input: resolveInput,
  async run(context, { workspaceId, threadId, resolved }) {
    await asCommenter(context, workspaceId);
    const thread = await threadIn(context, workspaceId, threadId);
    const { tx, now, actor } = context;
    await tx.thread.update({
      where: { id: threadId },
      data: { resolvedAt: resolved ? now : null, resolvedById: resolved ? actor.userId : null },
    });
    await told(context, thread, resolved ? "thread.resolved" : "thread.reopened", threadId);
    return null;
  },
});

/** How far a person has read: for their own unread marks only, so neither record nor event. */
const seen = defineCommand({
  name: "discussion.seen",
  input: seenInput,
  async run({ tx, actor, now, member }, { workspaceId, dealId, threadIds }) {
    await member(workspaceId);
    const threads = await tx.thread.findMany({
      where: { workspaceId, dealId, id: { in: threadIds } },
      select: { id: true },
    });
    for (const { id: threadId } of threads) {
      const key = { threadId, userId: actor.userId };
      await tx.threadSeen.upsert({
        where: { threadId_userId: key },
        create: { ...key, seenAt: now },
        update: { seenAt: now },
      });
    }
    return null;
  },
});

interface ThreadPlace {
  readonly id: string;
  readonly workspaceId: string;
  readonly dealId: string;
}

async function asCommenter(context: CommandContext, workspaceId: string): Promise<Membership> {
  const member = await context.member(workspaceId);
  need(mayComment(member), member.role, "comment");
  return member;
}

async function addComment(
  context: CommandContext,
  thread: ThreadPlace,
  { body, mentions }: { body: string; mentions: readonly string[] },
  kind: "comment.posted" | "comment.replied",
): Promise<string> {
  const { tx, actor, now } = context;
  const recent = await tx.comment.count({
    where: { authorId: actor.userId, createdAt: { gt: new Date(now.getTime() - 60_000) } },
  });
  if (recent >= MOST_A_MINUTE)
    throw refuse("limited", "tooManyComments", "You have written many comments in a minute: wait a moment.");
  const id = randomUUID();
  await tx.comment.create({
    data: { id, threadId: thread.id, authorId: actor.userId, body, mentions: [...mentions], createdAt: now },
  });
  await told(context, thread, kind, id, undefined, { body });
  await tellOthers(context, thread, id, { body, mentions });
  return id;
}

function tellNamed(
  context: CommandContext,
  { id: threadId, workspaceId, dealId }: ThreadPlace,
  commentId: string,
  body: string,
  named: readonly string[],
): Promise<void> {
  const payload = { threadId, commentId, words: body.slice(0, 200) };
  return notify(context, named, { workspaceId, dealId, kind: "mention", payload });
}

/** Whom the comment names, and who else takes part in the thread, have it in their inbox. */
async function tellOthers(
  context: CommandContext,
  { id: threadId, workspaceId, dealId }: ThreadPlace,
  commentId: string,
  { body, mentions }: { body: string; mentions: readonly string[] },
): Promise<void> {
  await tellNamed(context, { id: threadId, workspaceId, dealId }, commentId, body, mentions);
  const payload = { threadId, commentId, words: body.slice(0, 200) };
  const others = await context.tx.comment.findMany({
    where: { threadId, authorId: { notIn: [...mentions] } },
    select: { authorId: true },
    distinct: ["authorId"],
  });
  const authors = others.map(({ authorId }) => authorId);
  await notify(context, authors, { workspaceId, dealId, kind: "reply", payload });
}

/** A figure is pinned as it stands in a run of the deal. */
async function checkAnchor({ tx }: CommandContext, dealId: string, anchor: Anchor): Promise<void> {
  if (anchor.kind !== "figure") return;
  const run = await tx.run.findFirst({ where: { id: anchor.runId, dealId }, select: { report: true } });
  if (!run) throw notFound("run");
  if (figureAt(unpackedReport(run.report), anchor.path) === null)
    throw refuse("invalid", "noFigure", "This run has no such figure to point at.", "anchor.path");
}

async function told(
  context: CommandContext,
  { id, workspaceId, dealId }: ThreadPlace,
  kind: string,
  subjectId: string,
  before?: unknown,
  after?: unknown,
) {
  const subjectKind = kind.startsWith("thread") ? "thread" : "comment";
  await context.record({ workspaceId, dealId, kind, subjectKind, subjectId, before, after });
  await context.emit({ workspaceId, dealId, kind, payload: { dealId, threadId: id } });
}

async function threadIn({ tx }: CommandContext, workspaceId: string, threadId: string) {
  const thread = await tx.thread.findFirst({ where: { id: threadId, workspaceId } });
  if (!thread) throw notFound("thread");
  return thread;
}

async function ownComment(context: CommandContext, workspaceId: string, commentId: string) {
  const member = await context.member(workspaceId);
  await context.tx.$queryRaw`SELECT id FROM "comment" WHERE id = ${commentId} FOR UPDATE`;
  const comment = await context.tx.comment.findFirst({
    where: { id: commentId, thread: { workspaceId } },
    include: { thread: true },
  });
  if (!comment) throw notFound("comment");
  need(mayChange(member, comment), member.role, "change this comment: only its author may");
  return { comment, thread: comment.thread };
}

export const commands = { start, reply, edit, remove, resolve, seen };
