import { createHash } from "node:crypto";
import { refuse } from "../platform/errors";
import type { QueryContext } from "../platform/operation";

/** What is stored of an invitation's token: whoever reads the store cannot use it. */
export function hashOfToken(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}

/** The open invitation of a token, with its workspace and who made it. @throws Refusal when it is not open any more. */
export async function openInvitation({ tx, now }: Pick<QueryContext, "tx" | "now">, token: string) {
  const invitation = await tx.invitation.findUnique({
    where: { tokenHash: hashOfToken(token) },
    include: { workspace: true, inviter: true },
  });
  if (invitation?.status !== "pending" || invitation.expiresAt < now) {
    throw refuse("notFound", "invitation", "This invitation is not open any more: ask for a new one.");
  }
  return invitation;
}
