import { z } from "zod";
import { dealInput } from "../deals/schema";
import { inWorkspace } from "../workspaces/schema";

export const priceInput = dealInput.extend({
  version: z.number().int(),
  note: z.string().trim().max(500, "A note has at most 500 characters.").default(""),
});
export const runInput = inWorkspace.extend({ runId: z.string().min(1).max(100) });
