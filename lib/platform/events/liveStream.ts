import type { Actor } from "../accounts/actor";
import { membershipOf } from "../run";
import type { LiveEvent } from "./hub";
import type { LiveProcess } from "./live";

/** A page that hears nothing for longer takes its connection for lost. */
const HEARTBEAT = 15_000;
/** Comings and goings within this time are told together. */
const PRESENCE_BURST = 200;

/** What a page asks for when it opens its stream. */
export interface StreamAsked {
  readonly workspaceId: string;
  readonly actor: Actor;
  /** The last event that the page had; null for those from now on. */
  readonly since: bigint | null;
  /** The page's own name for itself, and the deal that it shows. */
  readonly page: string;
  readonly dealId: string | null;
  readonly signal: AbortSignal;
}

/**
 * A stream of a workspace's events for one person, and of who looks at what. It ends when the person's membership does:
 * each event about members, and each heartbeat, has it checked again.
 * @throws Refusal when the person is no member.
 */
export async function liveStream(
  { database, hub, presence }: LiveProcess,
  { workspaceId, actor, since, page, dealId, signal }: StreamAsked,
): Promise<ReadableStream<Uint8Array>> {
  await membershipOf(database, workspaceId, actor.userId);
  const encoder = new TextEncoder();
  const endings: (() => void)[] = [];
  let isOpen = true;
  const end = () => {
    isOpen = false;
    for (const ending of endings.splice(0)) ending();
  };
  return new ReadableStream({
    async start(controller) {
      endings.push(() => {
        try {
          controller.close();
        } catch {
          // The client is gone already.
        }
      });
      const send = (text: string) => {
        if (!isOpen) return;
        try {
          controller.enqueue(encoder.encode(text));
        } catch {
          end();
        }
      };
      const checkMember = () => void membershipOf(database, workspaceId, actor.userId).catch(end);
      const heartbeat = setInterval(() => {
        send("event: beat\ndata: 1\n\n");
        checkMember();
      }, HEARTBEAT);
      endings.push(() => clearInterval(heartbeat));
      signal.addEventListener("abort", end);
      endings.push(() => signal.removeEventListener("abort", end));

      let soon: ReturnType<typeof setTimeout> | undefined;
      const tellPresence = () => {
        soon ??= setTimeout(() => {
          soon = undefined;
          send(`event: presence\ndata: ${JSON.stringify(presence.lookingAt(workspaceId))}\n\n`);
        }, PRESENCE_BURST);
      };
      endings.push(presence.watch(workspaceId, tellPresence), () => clearTimeout(soon));
      endings.push(presence.enter({ page, workspaceId, userId: actor.userId, name: actor.name, dealId }));

      send("retry: 1000\n\n");
      const unsubscribe = await hub.subscribe(workspaceId, since, (event) => {
        if (!isFor(event, actor.userId)) return;
        send(`id: ${event.id}\ndata: ${JSON.stringify(event)}\n\n`);
        if (event.kind.startsWith("member.")) checkMember();
      });
      if (isOpen) endings.push(unsubscribe);
      else unsubscribe();
      if (signal.aborted) end();
    },
    cancel: end,
  });
}

/** An event that names whom it is for is told to nobody else. */
function isFor({ payload }: LiveEvent, userId: string): boolean {
  const named = (payload as { for?: unknown } | null)?.for;
  return !Array.isArray(named) || named.includes(userId);
}
