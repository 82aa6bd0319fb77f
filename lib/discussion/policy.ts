import type { Membership } from "../platform/accounts/actor";
import { mayWork } from "../workspaces/policy";

/** Comment, reply, resolve: everyone but viewers. */
export function mayComment(member: Pick<Membership, "role">): boolean {
  return mayWork(member);
}

/** A comment is changed by its author alone, and only while the author may comment. */
export function mayChange(
  member: Membership,
  comment: { readonly authorId: string; readonly deletedAt: Date | null },
): boolean {
  return mayComment(member) && comment.authorId === member.userId && comment.deletedAt === null;
}
