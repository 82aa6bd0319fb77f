import { z } from "zod";
import { dealInput } from "../deals/schema";
import { inWorkspace } from "../workspaces/schema";
import { anchorSchema } from "./anchor";

const body = z
  .string()
  .trim()
  .min(1, "Write something first.")
  .max(4_000, "A comment has at most 4,000 characters.");
const commentId = z.string().min(1).max(100);
const threadId = z.string().min(1).max(100);

/** Ids of the members that the body names by @. */
const mentions = z.array(z.string().min(1).max(100)).max(20, "At most 20 people can be named.").default([]);

export const startInput = dealInput.extend({
  body,
  mentions,
  anchor: anchorSchema.default({ kind: "deal" }),
});
export const replyInput = inWorkspace.extend({ threadId, body, mentions });
export const seenInput = dealInput.extend({ threadIds: z.array(threadId).max(500) });
export const editInput = inWorkspace.extend({ commentId, version: z.number().int(), body, mentions });
export const deleteInput = inWorkspace.extend({ commentId });
export const resolveInput = inWorkspace.extend({ threadId, resolved: z.boolean() });
