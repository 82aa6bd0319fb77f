import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { commands as discussion } from "@/lib/discussion/commands";
import type { Actor } from "@/lib/platform/accounts/actor";
import { type LiveProcess, liveOn } from "@/lib/platform/events/live";
import { liveStream } from "@/lib/platform/events/liveStream";
import { execute } from "@/lib/platform/run";
import { commands as workspaces } from "@/lib/workspaces/commands";
import { withDatabase } from "../support/database";
import { aWorld } from "../support/world";

const place = withDatabase();
let world: Awaited<ReturnType<typeof aWorld>>;
/** Two web processes on one database; on the embedded one, two of its listeners. */
let here: LiveProcess;
let there: LiveProcess;
const opened: AbortController[] = [];

beforeAll(async () => {
  world = await aWorld(place.store.database);
  here = await liveOn(place.store);
  there = await liveOn(await place.another());
});

afterAll(async () => {
  for (const { hub, presence } of [here, there]) await Promise.all([hub.stop(), presence.stop()]);
});

afterEach(() => {
  for (const controller of opened.splice(0)) controller.abort();
});

interface Told {
  readonly id: string;
  readonly kind: string;
}

/** A stream read as it comes: its events, the last word on who looks at what, and whether it has ended. */
async function aStream(process: LiveProcess, actor: Actor, since: string | null = null, page = actor.userId) {
  const controller = new AbortController();
  opened.push(controller);
  const asked = { workspaceId: world.workspaceId, actor, page, dealId: world.dealId };
  const stream = await liveStream(process, {
    ...asked,
    since: since === null ? null : BigInt(since),
    signal: controller.signal,
  });
  const seen = { events: [] as Told[], looking: [] as string[], isOver: false };
  void (async () => {
    let text = "";
    for await (const part of stream.pipeThrough(
      new TextDecoderStream() as never,
    ) as unknown as AsyncIterable<string>) {
      text += part;
      const blocks = text.split("\n\n");
      text = blocks.pop() ?? "";
      for (const block of blocks) {
        const [, data] = /^data: (.*)$/m.exec(block) ?? [];
        if (data === undefined || block.includes("event: beat")) continue;
        if (block.startsWith("event: presence"))
          seen.looking = (JSON.parse(data)[world.dealId] ?? []).map(({ name }: { name: string }) => name);
        else seen.events.push(JSON.parse(data));
      }
    }
    seen.isOver = true;
  })().catch(() => undefined);
  return { seen, drop: () => controller.abort() };
}

const say = (actor: Actor, body: string) => {
  const { workspaceId, dealId } = world;
  const input = { workspaceId, dealId, body, mentions: [], anchor: { kind: "deal" as const } };
  return execute(discussion.start, input, { database: place.store.database, actor });
};
const soon = (check: () => void) => expect.poll(() => attempt(check), { timeout: 3_000 }).toBe(true);
function attempt(check: () => void): boolean {
  try {
    check();
    return true;
  } catch {
    return false;
  }
}

describe("LIVE: events", () => {
  it("reach the streams of every process within a second of the commit, in their order", async () => {
    const { owner, analyst, viewer } = world.people;
    const streams = [await aStream(here, owner), await aStream(there, viewer)];
    const from = Date.now();
    for (let i = 0; i < 5; i++) await say(analyst, `${i}`);
    const committed = Date.now();
    await soon(() => {
      for (const { seen } of streams) expect(seen.events).toHaveLength(5);
    });
    expect(Date.now() - committed).toBeLessThan(1_000 + (committed - from));
    for (const { seen } of streams) {
      const ids = seen.events.map(({ id }) => Number(id));
      expect(ids).toEqual([...ids].sort((a, b) => a - b));
    }
  });

  it("missed while the connection was lost are told when it resumes, each once, while others go on", async () => {
    const { owner, structurer, viewer } = world.people;
    const other = await aStream(here, viewer);
    const first = await aStream(here, owner);
    await say(structurer, "before");
    await soon(() => expect(first.seen.events).toHaveLength(1));
    const last = first.seen.events[0]!.id;
    first.drop();
    for (let i = 0; i < 3; i++) await say(structurer, "meanwhile");
    // Somebody speaks at the very moment of the return: neither what was missed nor this may be lost or doubled.
    const [resumed, elsewhere] = await Promise.all([
      aStream(here, owner, last),
      aStream(there, owner, last),
      say(structurer, "at the return"),
    ]);
    await say(structurer, "after");
    await soon(() => {
      for (const { seen } of [resumed, elsewhere]) expect(seen.events).toHaveLength(5);
      expect(other.seen.events).toHaveLength(6);
    });
    for (const { seen } of [resumed, elsewhere])
      expect(seen.events.map(({ id }) => id)).toEqual(other.seen.events.slice(1).map(({ id }) => id));
  });

  it("committed while the database server had dropped a process's connection are told when it is back", async (test) => {
    if (place.store.mode === "embedded") test.skip();
    const { owner, structurer } = world.people;
    const { seen } = await aStream(there, owner);
    const { rows } = await place.store.sql(
      "SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = current_database() AND query LIKE 'LISTEN%'",
    );
    expect(rows.length).toBeGreaterThanOrEqual(4);
    for (let i = 0; i < 3; i++) await say(structurer, "unheard");
    await soon(() => expect(seen.events).toHaveLength(3));
  });

  it("that name whom they are for are told to nobody else", async () => {
    const { owner, analyst, viewer } = world.people;
    const named = await aStream(here, owner);
    const unnamed = await aStream(here, viewer);
    const { workspaceId, dealId } = world;
    const input = {
      workspaceId,
      dealId,
      body: "@owner",
      mentions: [owner.userId],
      anchor: { kind: "deal" as const },
    };
    await execute(discussion.start, input, { database: place.store.database, actor: analyst });
    await soon(() => expect(named.seen.events.map(({ kind }) => kind)).toContain("notice.new"));
    await soon(() => expect(unnamed.seen.events.map(({ kind }) => kind)).toEqual(["comment.posted"]));
  });
});

describe("LIVE: who looks at a deal", () => {
  it("is told across processes, each person once, and no longer when their last page closes", async () => {
    const { owner, viewer } = world.people;
    const watching = await aStream(here, owner);
    const one = await aStream(there, viewer, null, "one");
    const two = await aStream(there, viewer, null, "two");
    await soon(() => expect(watching.seen.looking).toEqual([owner.name, viewer.name]));
    one.drop();
    await new Promise((resolve) => setTimeout(resolve, 400));
    expect(watching.seen.looking).toEqual([owner.name, viewer.name]);
    two.drop();
    await soon(() => expect(watching.seen.looking).toEqual([owner.name]));
  });

  it("follows a page that goes to another deal, whichever process hears of it", async () => {
    const { owner, viewer } = world.people;
    const watching = await aStream(here, owner);
    await aStream(there, viewer, null, "page");
    await soon(() => expect(watching.seen.looking).toHaveLength(2));
    const { workspaceId } = world;
    const page = { page: "page", workspaceId, userId: viewer.userId, name: viewer.name, dealId: null };
    await here.presence.move({ ...page, userId: owner.userId });
    await here.presence.move(page);
    await soon(() => expect(watching.seen.looking).toEqual([owner.name]));
  });

  it("keeps a page that has come back before its old stream was known to be lost", async () => {
    const { owner, viewer } = world.people;
    const watching = await aStream(here, owner);
    const old = await aStream(there, viewer, null, "page");
    await aStream(there, viewer, null, "page");
    old.drop();
    await new Promise((resolve) => setTimeout(resolve, 400));
    expect(watching.seen.looking).toEqual([owner.name, viewer.name]);
  });
});

describe("LIVE: membership", () => {
  it("refuses a stranger's stream as if the workspace did not exist", async () => {
    await expect(aStream(here, world.stranger)).rejects.toMatchObject({ kind: "notFound" });
  });

  it("ends every open stream of a removed member, in each process, and nobody else's", async () => {
    const { owner, viewer } = world.people;
    const theirs = [await aStream(here, viewer), await aStream(there, viewer, null, "second")];
    const other = await aStream(there, owner);
    const { workspaceId } = world;
    await execute(
      workspaces.removeMember,
      { workspaceId, userId: viewer.userId },
      { database: place.store.database, actor: owner },
    );
    await soon(() => {
      for (const { seen } of theirs) expect(seen.isOver).toBe(true);
    });
    await say(owner, "without them");
    await soon(() => expect(other.seen.events.at(-1)?.kind).toBe("comment.posted"));
    expect(other.seen.isOver).toBe(false);
  });
});
