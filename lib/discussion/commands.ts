import { randomUUID } from "node:crypto";
import { dealIn } from "../deals/commands";
import type { Membership } from "../platform/accounts/actor";
import { notFound, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand } from "../platform/operation";
import { need } from "../workspaces/policy";
import { mayChange, mayComment } from "./policy";
import { deleteInput, editInput, replyInput, resolveInput, startInput } from "./schema";

const MOST_A_MINUTE = 20;

const start = defineCommand({
  name: "discussion.start",
  input: startInput,
  async run(context, { workspaceId, dealId, body }) {
    await asCommenter(context, workspaceId);
    await dealIn(context, workspaceId, dealId);
    const { tx, actor, now } = context;
    const threadId = randomUUID();
    await tx.thread.create({
      data: {
        id: threadId,
        workspaceId,
        dealId,
        anchor: { kind: "deal" },
        createdById: actor.userId,
        createdAt: now,
      },
    });
    const commentId = await addComment(
      context,
      { id: threadId, workspaceId, dealId },
      body,
      "comment.posted",
    );
    return { threadId, commentId };
  },
});

const reply = defineCommand({
  name: "discussion.reply",
  input: replyInput,
  async run(context, { workspaceId, threadId, body }) {
    await asCommenter(context, workspaceId);
    const thread = await threadIn(context, workspaceId, threadId);
    return { commentId: await addComment(context, thread, body, "comment.replied") };
  },
});

const edit = defineCommand({
  name: "discussion.edit",
  input: editInput,
  async run(context, { workspaceId, commentId, version, body }) {
    const { comment, thread } = await ownComment(context, workspaceId, commentId);
    if (comment.version !== version)
      throw staleVersion("comment", { version: comment.version, body: comment.body });
    await context.tx.comment.update({
      where: { id: commentId },
      data: { body, version: version + 1, editedAt: context.now },
    });
    await told(context, thread, "comment.edited", commentId, { body: comment.body }, { body });
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
  body: string,
  kind: string,
): Promise<string> {
  const { tx, actor, now } = context;
  const recent = await tx.comment.count({
    where: { authorId: actor.userId, createdAt: { gt: new Date(now.getTime() - 60_000) } },
  });
  if (recent >= MOST_A_MINUTE)
    throw refuse("limited", "tooManyComments", "You have written many comments in a minute: wait a moment.");
  const id = randomUUID();
  await tx.comment.create({
    data: { id, threadId: thread.id, authorId: actor.userId, body, createdAt: now },
  });
  await told(context, thread, kind, id, undefined, { body });
  return id;
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

export const commands = { start, reply, edit, remove, resolve };
