import { z } from "zod";
import { dealInput } from "../deals/schema";
import { inWorkspace } from "../workspaces/schema";

const body = z
  .string()
  .trim()
  .min(1, "Write something first.")
  .max(4_000, "A comment has at most 4,000 characters.");
const commentId = z.string().min(1).max(100);
const threadId = z.string().min(1).max(100);

export const startInput = dealInput.extend({ body });
export const replyInput = inWorkspace.extend({ threadId, body });
export const editInput = inWorkspace.extend({ commentId, version: z.number().int(), body });
export const deleteInput = inWorkspace.extend({ commentId });
export const resolveInput = inWorkspace.extend({ threadId, resolved: z.boolean() });
