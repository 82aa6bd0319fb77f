import type { Membership, Role } from "../platform/accounts/actor";
import { refuse } from "../platform/errors";

/** Members, roles and workspace settings. */
export function mayManage({ role }: Pick<Membership, "role">): boolean {
  return role === "owner";
}

/** Create and edit pools, markets and deals; ask for a review. */
export function mayEdit({ role }: Pick<Membership, "role">): boolean {
  return role === "owner" || role === "structurer";
}

/** Price a saved run, comment and resolve. */
export function mayWork({ role }: Pick<Membership, "role">): boolean {
  return role !== "viewer";
}

/** What a screen may offer to this member. */
export interface May {
  readonly manage: boolean;
  readonly edit: boolean;
  readonly work: boolean;
}

export function mayOf(member: Pick<Membership, "role">): May {
  return { manage: mayManage(member), edit: mayEdit(member), work: mayWork(member) };
}

/** @throws Refusal "forbidden" in words when a rule says no. */
export function need(allowed: boolean, role: Role, act: string): void {
  if (!allowed)
    throw refuse("forbidden", "forbidden", `As ${role} you may not ${act}: ask an owner of the workspace.`);
}
