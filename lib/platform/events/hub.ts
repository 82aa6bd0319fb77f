import type { Store } from "../db/open";
import { logError } from "../log";
import { CHANNEL } from "./channel";

/** What a stream is told; ids rise within a workspace. */
export interface LiveEvent {
  readonly id: string;
  readonly dealId: string | null;
  readonly kind: string;
  readonly payload: unknown;
}

interface Subscriber {
  /** The last event that it was given, or need not be given. */
  reached: bigint;
  readonly tell: (event: LiveEvent) => void;
}

const AT_ONCE = 500;
const AGAIN_AFTER = 1_000;

/** One listener a process, any number of streams: events are read once a workspace and handed out in their order. */
export class EventHub {
  private readonly subscribers = new Map<string, Set<Subscriber>>();
  private readonly underWay = new Map<string, "reading" | "readAgain">();
  private unlisten: () => Promise<void> = async () => {};

  private constructor(private readonly opened: Store) {}

  /** Listens on a store. */
  static async on(opened: Store): Promise<EventHub> {
    const hub = new EventHub(opened);
    hub.unlisten = await opened.listen(CHANNEL, (payload) => hub.heard(payload.split(" ")[0] ?? ""));
    return hub;
  }

  /** Streams a workspace's events from after `since` (or from now); resolves with the way to stop. */
  async subscribe(
    workspaceId: string,
    since: bigint | null,
    tell: (event: LiveEvent) => void,
  ): Promise<() => void> {
    const subscriber: Subscriber = { reached: since ?? (await this.newest(workspaceId)), tell };
    const known = this.subscribers.get(workspaceId) ?? new Set();
    known.add(subscriber);
    this.subscribers.set(workspaceId, known);
    this.heard(workspaceId);
    return () => {
      known.delete(subscriber);
      if (known.size === 0 && this.subscribers.get(workspaceId) === known)
        this.subscribers.delete(workspaceId);
    };
  }

  /** Hears nothing any more. */
  async stop(): Promise<void> {
    this.subscribers.clear();
    await this.unlisten();
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
      if (this.underWay.has(each)) this.underWay.set(each, "readAgain");
      else void this.readAll(each);
    }
  }

  /** Reads until nothing more was heard of; a failed reading is tried again, for its events were announced only once. */
  private async readAll(workspaceId: string): Promise<void> {
    do {
      this.underWay.set(workspaceId, "reading");
      try {
        while ((await this.read(workspaceId)) === AT_ONCE);
      } catch (error) {
        logError("events", error);
        setTimeout(() => this.heard(workspaceId), AGAIN_AFTER).unref();
      }
    } while (this.underWay.get(workspaceId) === "readAgain");
    this.underWay.delete(workspaceId);
  }

  /** One reading serves those who are there when it starts; who comes meanwhile with an older number has the next one. */
  private async read(workspaceId: string): Promise<number> {
    const readers = [...(this.subscribers.get(workspaceId) ?? [])];
    const [first, ...others] = readers;
    if (!first) return 0;
    const after = others.reduce((least, { reached }) => (reached < least ? reached : least), first.reached);
    const rows = await this.opened.database.event.findMany({
      where: { workspaceId, id: { gt: after } },
      orderBy: { id: "asc" },
      take: AT_ONCE,
    });
    for (const { id, dealId, kind, payload } of rows) {
      const event = { id: String(id), dealId, kind, payload };
      for (const reader of readers) {
        if (id <= reader.reached) continue;
        reader.reached = id;
        reader.tell(event);
      }
    }
    return rows.length;
  }
}
