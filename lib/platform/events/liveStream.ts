import type { Actor } from "../accounts/actor";
import { store } from "../db/store";
import { membershipOf } from "../run";
import { eventHub, type LiveEvent } from "./hub";

const HEARTBEAT = 15_000;

/**
 * A stream of a workspace's events for one person. It ends when the person's membership does: each event about members
 * has it checked again.
 * @throws Refusal when the person is no member.
 */
export async function liveStream(
  workspaceId: string,
  actor: Actor,
  since: bigint | null,
  signal: AbortSignal,
): Promise<ReadableStream<Uint8Array>> {
  const { database } = await store();
  await membershipOf(database, workspaceId, actor.userId);
  const hub = await eventHub();
  const encoder = new TextEncoder();
  return new ReadableStream({
    async start(controller) {
      let isOpen = true;
      let unsubscribe = () => {};
      const end = () => {
        if (!isOpen) return;
        isOpen = false;
        clearInterval(heartbeat);
        unsubscribe();
        try {
          controller.close();
        } catch {
          // The client is gone already.
        }
      };
      const send = (text: string) => {
        if (!isOpen) return;
        try {
          controller.enqueue(encoder.encode(text));
        } catch {
          end();
        }
      };
      const heartbeat = setInterval(() => send(": still here\n\n"), HEARTBEAT);
      signal.addEventListener("abort", end);
      send("retry: 1000\n\n");
      const tell = (event: LiveEvent) => {
        send(`id: ${event.id}\ndata: ${JSON.stringify(event)}\n\n`);
        if (event.kind.startsWith("member.")) {
          membershipOf(database, workspaceId, actor.userId).catch(end);
        }
      };
      unsubscribe = await hub.subscribe(workspaceId, since, tell);
      if (!isOpen) unsubscribe();
    },
  });
}

/** Whether a person may have a workspace's stream now. @throws Refusal when the person is no member. */
export async function mustBeMember(workspaceId: string, actor: Actor): Promise<void> {
  const { database } = await store();
  await membershipOf(database, workspaceId, actor.userId);
}
