import { dealIn } from "../deals/commands";
import { dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery } from "../platform/operation";
import { mayChange, mayComment } from "./policy";

const list = defineQuery({
  name: "discussion.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const member = await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const threads = await context.tx.thread.findMany({
      where: { dealId },
      orderBy: { createdAt: "desc" },
      include: { comments: { orderBy: { createdAt: "asc" } } },
    });
    const authors = threads.flatMap((thread) => thread.comments.map((comment) => comment.authorId));
    const nameOf = await peopleNames(context.tx, authors);
    return {
      may: { comment: mayComment(member) },
      threads: threads.map(({ id, resolvedAt, comments }) => ({
        id,
        isResolved: resolvedAt !== null,
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
      })),
    };
  },
});

export const queries = { list };
