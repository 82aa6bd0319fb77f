import type { Actor } from "../accounts/actor";
import type { Store } from "../db/open";
import { beforeClosing, store } from "../db/store";
import { membershipOf } from "../run";
import { EventHub } from "./hub";
import { Presence } from "./presence";

/** What the streams of one process stand on. */
export interface LiveProcess {
  readonly database: Store["database"];
  readonly hub: EventHub;
  readonly presence: Presence;
}

const shared = globalThis as typeof globalThis & { loadlineLive?: Promise<LiveProcess> | undefined };

/** The process's own, started on first use; it stops before the store closes. */
export function live(): Promise<LiveProcess> {
  shared.loadlineLive ??= store().then(async (opened) => {
    const started = await liveOn(opened);
    beforeClosing(async () => {
      shared.loadlineLive = undefined;
      await Promise.all([started.hub.stop(), started.presence.stop()]);
    });
    return started;
  });
  return shared.loadlineLive;
}

/** Listens on a store. */
export async function liveOn(opened: Store): Promise<LiveProcess> {
  return {
    database: opened.database,
    hub: await EventHub.on(opened),
    presence: await Presence.on(opened),
  };
}

/** Whether a person may have a workspace's stream now. @throws Refusal when the person is no member. */
export async function mustBeMember(workspaceId: string, actor: Actor): Promise<void> {
  const { database } = await store();
  await membershipOf(database, workspaceId, actor.userId);
}

/** A person's open page shows another deal, or none. @throws Refusal when the person is no member. */
export async function movePage(
  workspaceId: string,
  actor: Actor,
  page: string,
  dealId: string | null,
): Promise<void> {
  await mustBeMember(workspaceId, actor);
  const { presence } = await live();
  await presence.move({ page, workspaceId, userId: actor.userId, name: actor.name, dealId });
}
