import { randomUUID } from "node:crypto";
import { z } from "zod";
import type { Store } from "../db/open";
import { logError } from "../log";

const PRESENCE_CHANNEL = "loadline_presence";
/** A notification carries less than 8 kB, and an open page takes at most 900 bytes of it. */
const PAGES_AT_ONCE = 8;
const LONGEST_NAME = 100;

const pageSchema = z.object({
  page: z.string().max(64),
  workspaceId: z.string().max(100),
  userId: z.string().max(100),
  name: z.string().max(LONGEST_NAME),
  dealId: z.string().max(100).nullable(),
});
/** An open page: whose it is and the deal that it shows. */
export type OpenPage = z.infer<typeof pageSchema>;

const newsSchema = z.object({
  from: z.string(),
  pages: z.array(pageSchema).default([]),
  closed: z.array(z.string()).default([]),
  moved: pageSchema.optional(),
  isNew: z.boolean().default(false),
});
type News = z.input<typeof newsSchema>;

/** Who looks at each deal of a workspace, each person once, by name. */
export type LookingAt = Readonly<Record<string, readonly { userId: string; name: string }[]>>;

/**
 * Who looks at what, in every process of one database. Nothing is stored: each process tells the others of the pages whose
 * streams it holds, when they change and every `every` milliseconds; a process unheard for three times as long is gone.
 */
export class Presence {
  private readonly process = randomUUID();
  private readonly own = new Map<string, OpenPage & { readonly stream: symbol }>();
  private readonly others = new Map<string, OpenPage & { readonly from: string; readonly until: number }>();
  private readonly watchers = new Map<string, Set<() => void>>();
  private timer: ReturnType<typeof setInterval> | undefined;
  private unlisten: () => Promise<void> = async () => {};

  private constructor(
    private readonly store: Store,
    private readonly every: number,
  ) {}

  /** Listens on a store, and asks the other processes what they hold. */
  static async on(store: Store, every = 20_000): Promise<Presence> {
    const presence = new Presence(store, every);
    presence.unlisten = await store.listen(PRESENCE_CHANNEL, (text) => presence.heard(text));
    presence.timer = setInterval(() => presence.beat(), every);
    presence.timer.unref();
    await presence.tell({ isNew: true });
    return presence;
  }

  /** A page whose stream this process holds; returns what to call when the stream ends. */
  enter(opened: OpenPage): () => void {
    const page = { ...opened, name: opened.name.slice(0, LONGEST_NAME) };
    const key = keyOf(page);
    const stream = Symbol("stream");
    this.own.set(key, { ...page, stream });
    this.changed(page.workspaceId);
    void this.tell({ pages: [page] });
    return () => {
      // A page that has come back already holds a newer stream under the same key.
      if (this.own.get(key)?.stream !== stream) return;
      this.own.delete(key);
      this.changed(page.workspaceId);
      void this.tell({ closed: [key] });
    };
  }

  /** A page shows another deal now, whichever process holds its stream. */
  async move(page: OpenPage): Promise<void> {
    if (this.own.has(keyOf(page))) {
      this.moved(page);
      return;
    }
    await this.tell({ moved: { ...page, name: page.name.slice(0, LONGEST_NAME) } });
  }

  /** Who looks at the deals of a workspace. */
  lookingAt(workspaceId: string): LookingAt {
    const deals: Record<string, Map<string, string>> = {};
    for (const page of [...this.own.values(), ...this.others.values()]) {
      if (page.workspaceId !== workspaceId || page.dealId === null) continue;
      deals[page.dealId] ??= new Map();
      deals[page.dealId]?.set(page.userId, page.name);
    }
    return Object.fromEntries(
      Object.entries(deals).map(([dealId, people]) => [
        dealId,
        [...people]
          .map(([userId, name]) => ({ userId, name }))
          .sort((a, b) => a.name.localeCompare(b.name) || a.userId.localeCompare(b.userId)),
      ]),
    );
  }

  /** Calls back whenever somebody in the workspace comes, goes or moves; returns the way to stop. */
  watch(workspaceId: string, changed: () => void): () => void {
    const known = this.watchers.get(workspaceId) ?? new Set();
    known.add(changed);
    this.watchers.set(workspaceId, known);
    return () => {
      known.delete(changed);
      if (known.size === 0 && this.watchers.get(workspaceId) === known) this.watchers.delete(workspaceId);
    };
  }

  /** Tells the others that this process's pages are gone, and hears nothing any more. */
  async stop(): Promise<void> {
    clearInterval(this.timer);
    await this.unlisten();
    await this.tell({ closed: [...this.own.keys()] });
    this.own.clear();
  }

  private heard(text: string): void {
    // An empty payload: this process's connection was lost for a while, so all tell what they hold.
    if (text === "") {
      void this.tell({ isNew: true });
      this.announce();
      return;
    }
    const news = newsSchema.safeParse(parsed(text)).data;
    if (!news || news.from === this.process) return;
    if (news.isNew) this.announce();
    for (const page of news.pages) this.learn(page, news.from);
    for (const key of news.closed) if (this.others.get(key)?.from === news.from) this.forget(key);
    if (news.moved) this.moved(news.moved);
  }

  private learn(page: OpenPage, from: string): void {
    const key = keyOf(page);
    const before = this.others.get(key);
    this.others.set(key, { ...page, from, until: Date.now() + 3 * this.every });
    if (!before || before.dealId !== page.dealId) this.changed(page.workspaceId);
  }

  /** The process that holds a page's stream takes its new deal over, and tells the others. */
  private moved(page: OpenPage): void {
    const key = keyOf(page);
    const known = this.own.get(key);
    if (!known || known.workspaceId !== page.workspaceId || known.dealId === page.dealId) return;
    const { stream, ...rest } = known;
    const now = { ...rest, dealId: page.dealId };
    this.own.set(key, { ...now, stream });
    this.changed(page.workspaceId);
    void this.tell({ pages: [now] });
  }

  private forget(key: string): void {
    const page = this.others.get(key);
    if (!page) return;
    this.others.delete(key);
    this.changed(page.workspaceId);
  }

  private beat(): void {
    const now = Date.now();
    for (const [key, { until }] of this.others) if (until < now) this.forget(key);
    this.announce();
  }

  private announce(): void {
    const pages = [...this.own.values()].map(({ stream: _stream, ...page }) => page);
    for (let i = 0; i < pages.length; i += PAGES_AT_ONCE)
      void this.tell({ pages: pages.slice(i, i + PAGES_AT_ONCE) });
  }

  private changed(workspaceId: string): void {
    for (const watcher of this.watchers.get(workspaceId) ?? []) watcher();
  }

  private async tell(news: Omit<News, "from">): Promise<void> {
    const { closed = [] } = news;
    if (closed.length > PAGES_AT_ONCE) {
      await this.tell({ closed: closed.slice(0, PAGES_AT_ONCE) });
      await this.tell({ ...news, closed: closed.slice(PAGES_AT_ONCE) });
      return;
    }
    const text = JSON.stringify({ from: this.process, ...news });
    await this.store
      .sql("SELECT pg_notify($1, $2)", [PRESENCE_CHANNEL, text])
      .catch((error: unknown) => logError("presence", error));
  }
}

/** A page's name for itself counts only beside its person. */
function keyOf({ userId, page }: OpenPage): string {
  return `${userId} ${page}`;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
