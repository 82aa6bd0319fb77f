import { z } from "zod";
import { roles } from "../platform/accounts/actor";

export const workspaceName = z
  .string()
  .trim()
  .min(1, "Give the workspace a name.")
  .max(80, "A name has at most 80 characters.");
export const role = z.enum(roles, { message: "The role must be owner, structurer, analyst or viewer." });
export const inWorkspace = z.strictObject({ workspaceId: z.string().min(1).max(100) });

export const createInput = z.strictObject({ name: workspaceName });
export const renameInput = inWorkspace.extend({ name: workspaceName });
export const inviteInput = inWorkspace.extend({
  role,
  email: z.union([z.literal(""), z.email("This is not an e-mail address.").max(200)]).optional(),
});
export const invitationInput = inWorkspace.extend({ invitationId: z.string().min(1).max(100) });
export const tokenInput = z.strictObject({ token: z.string().min(1).max(200) });
export const memberInput = inWorkspace.extend({ userId: z.string().min(1).max(100) });
export const changeRoleInput = memberInput.extend({ role });
