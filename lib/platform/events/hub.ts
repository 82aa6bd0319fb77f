import type { Store } from "../db/open";
import { store } from "../db/store";
import { CHANNEL } from "./channel";

/** What a stream is told; ids rise within a workspace. */
export interface LiveEvent {
  readonly id: string;
  readonly dealId: string | null;
  readonly kind: string;
  readonly payload: unknown;
}

type Subscriber = (event: LiveEvent) => void;

/** One listener a process, any number of streams: events are read once a workspace and handed out. */
class EventHub {
  private readonly subscribers = new Map<string, Set<Subscriber>>();
  private readonly lastSeen = new Map<string, bigint>();
  private readonly reading = new Map<string, Promise<void>>();

  constructor(private readonly opened: Store) {}

  async start(): Promise<void> {
    await this.opened.listen(CHANNEL, (payload) => this.heard(payload.split(" ")[0] ?? ""));
  }

  /** Streams a workspace's events from after `since` (or from now); resolves with the way to stop. */
  async subscribe(workspaceId: string, since: bigint | null, subscriber: Subscriber): Promise<() => void> {
    const from = since ?? (await this.newest(workspaceId));
    let reached = from;
    const ordered: Subscriber = (event) => {
      const id = BigInt(event.id);
      if (id <= reached) return;
      reached = id;
      subscriber(event);
    };
    const known = this.subscribers.get(workspaceId) ?? new Set();
    known.add(ordered);
    this.subscribers.set(workspaceId, known);
    const seen = this.lastSeen.get(workspaceId);
    if (seen === undefined || from < seen) this.lastSeen.set(workspaceId, from);
    this.heard(workspaceId);
    return () => {
      known.delete(ordered);
      if (known.size === 0) {
        this.subscribers.delete(workspaceId);
        this.lastSeen.delete(workspaceId);
      }
    };
  }

  private async newest(workspaceId: string): Promise<bigint> {
    const { _max } = await this.opened.database.event.aggregate({
      where: { workspaceId },
      _max: { id: true },
    });
    return _max.id ?? 0n;
  }

  /** An empty workspace means the connection was lost for a while: everyone catches up. */
  private heard(workspaceId: string): void {
    const workspaces = workspaceId === "" ? [...this.subscribers.keys()] : [workspaceId];
    for (const each of workspaces) {
      if (!this.subscribers.has(each)) continue;
      const queued = (this.reading.get(each) ?? Promise.resolve())
        .then(() => this.read(each))
        .catch(() => undefined);
      this.reading.set(each, queued);
    }
  }

  private async read(workspaceId: string): Promise<void> {
    const after = this.lastSeen.get(workspaceId);
    if (after === undefined) return;
    const rows = await this.opened.database.event.findMany({
      where: { workspaceId, id: { gt: after } },
      orderBy: { id: "asc" },
      take: 500,
    });
    for (const row of rows) {
      const event = { id: String(row.id), dealId: row.dealId, kind: row.kind, payload: row.payload };
      for (const subscriber of this.subscribers.get(workspaceId) ?? []) subscriber(event);
      if (this.lastSeen.has(workspaceId)) this.lastSeen.set(workspaceId, row.id);
    }
    if (rows.length === 500) await this.read(workspaceId);
  }
}

const shared = globalThis as typeof globalThis & { loadlineHub?: Promise<EventHub> | undefined };

/** The process's hub, started on first use. */
export function eventHub(): Promise<Pick<EventHub, "subscribe">> {
  shared.loadlineHub ??= store().then(async (opened) => {
    const hub = new EventHub(opened);
    await hub.start();
    return hub;
  });
  return shared.loadlineHub;
}
