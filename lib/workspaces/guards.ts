import type { QueryContext } from "../platform/operation";
import { mayEdit, need } from "./policy";

/** @throws Refusal unless the actor may create and edit pools, markets and deals here; `act` says what was tried. */
export async function asEditor(context: QueryContext, workspaceId: string, act: string): Promise<void> {
  const member = await context.member(workspaceId);
  need(mayEdit(member), member.role, act);
}
