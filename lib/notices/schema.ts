import { z } from "zod";
import { inWorkspace } from "../workspaces/schema";

const dealId = z.string().min(1).max(100);

export const readInput = inWorkspace.extend({
  /** Ids of notices, or "all". */
  which: z.union([z.literal("all"), z.array(z.string().regex(/^\d+$/)).max(500)]),
  isRead: z.boolean(),
});
export const followInput = inWorkspace.extend({ dealId, state: z.enum(["following", "muted", "neither"]) });
export const followedInput = inWorkspace.extend({ dealId });
export const mailInput = inWorkspace.extend({ mail: z.enum(["off", "digest", "atOnce"]) });
