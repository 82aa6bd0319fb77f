import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { closeCompute } from "@/lib/compute/serverPool";
import { commands as deals } from "@/lib/deals/commands";
import { commands as discussion } from "@/lib/discussion/commands";
import { queries as discussionQueries } from "@/lib/discussion/queries";
import { commands as notices } from "@/lib/notices/commands";
import { queries as noticeQueries } from "@/lib/notices/queries";
import { execute } from "@/lib/platform/run";
import { commands as runs } from "@/lib/runs/commands";
import { queries as runQueries } from "@/lib/runs/queries";
import { withDatabase } from "../support/database";
import { aDealContent, aWorld } from "../support/world";

const place = withDatabase();
type Role = "owner" | "structurer" | "analyst" | "viewer";
let world: Awaited<ReturnType<typeof aWorld>>;
let runId: string;

const as = (role: Role) => ({ database: place.store.database, actor: world.people[role] });
const start = (role: Role, part: Record<string, unknown> = {}) => {
  const { workspaceId, dealId } = world;
  return execute(discussion.start, { workspaceId, dealId, body: "Why?", ...part } as never, as(role));
};
const threads = async (role: Role) => {
  const { workspaceId, dealId } = world;
  return (await execute(discussionQueries.list, { workspaceId, dealId }, as(role))).threads;
};
const inbox = async (role: Role) =>
  (await execute(noticeQueries.list, { workspaceId: world.workspaceId }, as(role))).notices;

beforeAll(async () => {
  world = await aWorld(place.store.database);
  const { workspaceId, dealId } = world;
  ({ runId } = await execute(runs.price, { workspaceId, dealId, version: 1, note: "" }, as("owner")));
});

beforeEach(async () => {
  await place.store.database.notice.deleteMany({});
  await place.store.database.thread.deleteMany({});
});

afterAll(async () => {
  await closeCompute();
});

describe("TALK: a thread pinned to a figure", () => {
  it("shows the value then and in the latest run, found by the class's id, and keeps the first for ever", async () => {
    const { workspaceId, dealId, poolId, marketId } = world;
    const figure = {
      kind: "figure",
      runId,
      path: "tranches/E/expectedLoss",
      label: "Expected loss of First",
    };
    await start("analyst", { anchor: figure });
    const { report } = await execute(runQueries.open, { workspaceId, runId }, as("viewer"));
    const first = report.tranches.find(({ id }) => id === "E")?.expectedLoss;
    expect((await threads("viewer"))[0]?.pin).toMatchObject({
      run: 1,
      valueThen: first,
      latestRun: 1,
      valueNow: first,
    });

    const save = (version: number, classes: (typeof aDealContent)["classes"]) =>
      execute(
        deals.save,
        {
          workspaceId,
          dealId,
          version,
          name: "Deal",
          poolId,
          marketId,
          content: { ...aDealContent, classes },
        },
        as("owner"),
      );
    const [lower, upper] = aDealContent.classes;
    await save(1, [upper!, { ...lower!, detachment: 0.05 }]);
    const { runId: second } = await execute(
      runs.price,
      { workspaceId, dealId, version: 2, note: "" },
      as("owner"),
    );
    const later = await execute(runQueries.open, { workspaceId, runId: second }, as("viewer"));
    const now = later.report.tranches.find(({ id }) => id === "E")?.expectedLoss;
    expect(now).not.toBe(first);
    expect((await threads("viewer"))[0]?.pin).toMatchObject({
      valueThen: first,
      latestRun: 2,
      valueNow: now,
    });

    await save(2, [upper!]);
    await execute(runs.price, { workspaceId, dealId, version: 3, note: "" }, as("owner"));
    expect((await threads("viewer"))[0]?.pin).toMatchObject({
      valueThen: first,
      latestRun: 3,
      valueNow: null,
    });
  });

  it("is refused where the run has no such figure", async () => {
    const anchor = { kind: "figure", runId, path: "tranches/none/parSpread", label: "x" };
    await expect(start("analyst", { anchor })).rejects.toMatchObject({ problems: [{ code: "noFigure" }] });
  });

  it("pinned to a class that is gone stays, and says what it was pinned to", async () => {
    await start("analyst", { anchor: { kind: "class", id: "gone", label: "Old mezzanine" } });
    expect((await threads("viewer"))[0]?.pin).toEqual({
      kind: "class",
      id: "gone",
      label: "Old mezzanine",
      isGone: true,
    });
  });
});

describe("TALK: unread, mentions, replies", () => {
  it("is unread for others until they have seen it, and again after a new comment", async () => {
    const { workspaceId, dealId } = world;
    const { threadId } = await start("analyst");
    const isUnread = async (role: Role) => (await threads(role))[0]?.isUnread;
    expect([await isUnread("analyst"), await isUnread("owner")]).toEqual([false, true]);
    await execute(discussion.seen, { workspaceId, dealId, threadIds: [threadId] }, as("owner"));
    expect(await isUnread("owner")).toBe(false);
    await execute(
      discussion.reply,
      { workspaceId, threadId, body: "Because", mentions: [] },
      as("structurer"),
    );
    expect(await isUnread("owner")).toBe(true);
  });

  it("tells whom it names, and who takes part, never the writer, a stranger, or someone who muted the deal", async () => {
    const { workspaceId, dealId } = world;
    const { userId } = world.people.owner;
    const { threadId } = await start("analyst", {
      body: "@owner look",
      mentions: [userId, world.stranger.userId],
    });
    expect((await inbox("owner")).map(({ kind, by }) => [kind, by])).toEqual([
      ["mention", world.people.analyst.name],
    ]);
    expect(await inbox("analyst")).toEqual([]);
    await execute(discussion.reply, { workspaceId, threadId, body: "Seen", mentions: [] }, as("owner"));
    expect((await inbox("analyst")).map(({ kind }) => kind)).toEqual(["reply"]);
    expect(await place.store.database.notice.count({ where: { userId: world.stranger.userId } })).toBe(0);
    await execute(notices.follow, { workspaceId, dealId, state: "muted" }, as("analyst"));
    await execute(discussion.reply, { workspaceId, threadId, body: "Again", mentions: [] }, as("owner"));
    expect(await inbox("analyst")).toHaveLength(1);
    await execute(notices.follow, { workspaceId, dealId, state: "neither" }, as("analyst"));
  });
});

describe("TALK: changes and limits", () => {
  it("tells of an edit only those whom it names anew", async () => {
    const { workspaceId } = world;
    const { owner, structurer } = world.people;
    const { commentId } = await start("analyst", { body: "@owner", mentions: [owner.userId] });
    const mentions = [owner.userId, structurer.userId];
    const edit = { workspaceId, commentId, version: 1, body: "@owner @structurer", mentions };
    await execute(discussion.edit, edit, as("analyst"));
    expect(await inbox("owner")).toHaveLength(1);
    expect((await inbox("structurer")).map(({ kind }) => kind)).toEqual(["mention"]);
  });

  it("counts open threads by what they are pinned to, and no longer when they are resolved", async () => {
    const { workspaceId, dealId } = world;
    const anchor = { kind: "class", id: "E", label: "First" };
    const { threadId } = await start("analyst", { anchor });
    await start("owner", { anchor });
    await start("owner");
    const open = async () =>
      (await execute(discussionQueries.marks, { workspaceId, dealId }, as("viewer"))).open;
    expect(await open()).toEqual([{ key: "class E", count: 2 }]);
    await execute(discussion.resolve, { workspaceId, threadId, resolved: true }, as("analyst"));
    expect(await open()).toEqual([{ key: "class E", count: 1 }]);
  });

  it("keeps a comment as it was typed, whatever it looks like, up to 4,000 characters", async () => {
    const body = "<script>alert(1)</script> [x](javascript:alert(1))";
    await start("analyst", { body });
    expect((await threads("viewer"))[0]?.comments[0]?.body).toBe(body);
    await expect(start("analyst", { body: "x".repeat(4_001) })).rejects.toMatchObject({
      problems: [{ path: "body", message: "A comment has at most 4,000 characters." }],
    });
  });

  it("lets one person write twenty comments a minute, and says when it is too many", async () => {
    for (let i = 0; i < 20; i++) await start("structurer");
    await expect(start("structurer")).rejects.toMatchObject({
      kind: "limited",
      problems: [{ code: "tooManyComments" }],
    });
    await start("owner");
  });
});

describe("NOTICE: following", () => {
  it("tells a follower of a saved version and a run, marks what was read, and counts the rest", async () => {
    const { workspaceId, dealId } = world;
    await execute(notices.follow, { workspaceId, dealId, state: "following" }, as("viewer"));
    const deal = await place.store.database.deal.findUniqueOrThrow({ where: { id: dealId } });
    const { version } = deal;
    await execute(runs.price, { workspaceId, dealId, version, note: "for the follower" }, as("analyst"));
    const [notice] = await inbox("viewer");
    expect(notice).toMatchObject({
      kind: "deal.changed",
      payload: { words: "for the follower" },
      isRead: false,
    });
    const count = async () => (await execute(noticeQueries.count, { workspaceId }, as("viewer"))).unread;
    expect(await count()).toBe(1);
    await execute(notices.read, { workspaceId, which: [notice!.id], isRead: true }, as("viewer"));
    expect(await count()).toBe(0);
    await execute(notices.read, { workspaceId, which: "all", isRead: false }, as("owner"));
    expect(await count()).toBe(0);
  });
});
