import type { Membership } from "../platform/accounts/actor";
import { mayManage, mayWork } from "../workspaces/policy";

/** Have work done in the background: everyone but viewers, who work it out in their own browser. */
export function mayStart(member: Pick<Membership, "role">): boolean {
  return mayWork(member);
}

/** Work is called off by whoever asked for it, or by an owner. */
export function mayCancel(member: Membership, job: { readonly createdById: string }): boolean {
  return mayManage(member) || (mayStart(member) && job.createdById === member.userId);
}
