import { z } from "zod";
import { inWorkspace } from "../workspaces/schema";

/** Which entries: of a deal, a person, a room of the workspace (the part of the kind before its point). */
export const listInput = inWorkspace.extend({
  dealId: z.string().max(100).optional(),
  personId: z.string().max(100).optional(),
  room: z.string().max(40).optional(),
  before: z.string().regex(/^\d+$/).optional(),
});
export const exportInput = listInput.omit({ before: true });
