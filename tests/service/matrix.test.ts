import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeCompute } from "@/lib/compute/serverPool";
import { findOperation, operations } from "@/lib/operations";
import { Refusal, type RefusalKind } from "@/lib/platform/errors";
import { execute } from "@/lib/platform/run";
import { withDatabase } from "../support/database";
import { aDealContent, aGrid, aMarketContent, aName, aRequest, aWorld } from "../support/world";

type World = Awaited<ReturnType<typeof aWorld>>;
type Outcome = "ok" | RefusalKind;
type Who = "owner" | "structurer" | "analyst" | "viewer" | "stranger" | "signedOut";
type Expected = readonly [
  owner: Outcome,
  structurer: Outcome,
  analyst: Outcome,
  viewer: Outcome,
  stranger: Outcome,
];

const everyone: Expected = ["ok", "ok", "ok", "ok", "notFound"];
const workers: Expected = ["ok", "ok", "ok", "forbidden", "notFound"];
const editors: Expected = ["ok", "ok", "forbidden", "forbidden", "notFound"];
const owners: Expected = ["ok", "forbidden", "forbidden", "forbidden", "notFound"];
/** Anyone who is signed in, whatever the workspace. */
const anyone: Expected = ["ok", "ok", "ok", "ok", "ok"];

interface Row {
  readonly expected: Expected;
  input(world: World): unknown;
}

/** What each operation is given and who may; an operation without a row fails the first test. */
const rows: Record<string, Row> = {
  "workspaces.create": { expected: anyone, input: () => ({ name: "Another" }) },
  "workspaces.rename": { expected: owners, input: ({ workspaceId }) => ({ workspaceId, name: "Renamed" }) },
  "workspaces.invite": { expected: owners, input: ({ workspaceId }) => ({ workspaceId, role: "viewer" }) },
  "workspaces.revoke": {
    expected: ["notFound", "forbidden", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, invitationId: "none" }),
  },
  "workspaces.join": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: () => ({ token: "none" }),
  },
  "workspaces.invitation": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: () => ({ token: "none" }),
  },
  "workspaces.changeRole": {
    expected: owners,
    input: ({ workspaceId, people }) => ({ workspaceId, userId: people.viewer.userId, role: "viewer" }),
  },
  "workspaces.removeMember": {
    expected: ["notFound", "forbidden", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, userId: "nobody" }),
  },
  "workspaces.leave": {
    expected: ["conflict", "ok", "ok", "ok", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId }),
  },
  "workspaces.mine": { expected: anyone, input: () => ({}) },
  "workspaces.open": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "workspaces.people": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "pools.create": {
    expected: editors,
    input: ({ workspaceId }) => ({ workspaceId, name: "P", currency: "EUR", names: [aName("A")] }),
  },
  "pools.save": {
    expected: ["conflict", "conflict", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId, poolId }) => ({
      workspaceId,
      poolId,
      version: 99,
      name: "P",
      currency: "EUR",
      names: [aName("A")],
    }),
  },
  "pools.copy": {
    expected: editors,
    input: ({ workspaceId, poolId }) => ({ workspaceId, poolId, name: "Copy" }),
  },
  "pools.archive": {
    expected: editors,
    input: ({ workspaceId, poolId }) => ({ workspaceId, poolId, archived: false }),
  },
  "pools.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "pools.open": { expected: everyone, input: ({ workspaceId, poolId }) => ({ workspaceId, poolId }) },
  "markets.create": {
    expected: editors,
    input: ({ workspaceId }) => ({
      workspaceId,
      name: "M",
      pricingDate: "2026-12-01",
      content: aMarketContent,
    }),
  },
  "markets.save": {
    expected: ["conflict", "conflict", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId, marketId }) => ({
      workspaceId,
      marketId,
      version: 99,
      name: "M",
      pricingDate: "2026-12-01",
      content: aMarketContent,
    }),
  },
  "markets.copy": {
    expected: editors,
    input: ({ workspaceId, marketId }) => ({ workspaceId, marketId, name: "C", pricingDate: "2026-12-02" }),
  },
  "markets.archive": {
    expected: editors,
    input: ({ workspaceId, marketId }) => ({ workspaceId, marketId, archived: false }),
  },
  "markets.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "markets.open": { expected: everyone, input: ({ workspaceId, marketId }) => ({ workspaceId, marketId }) },
  "deals.create": {
    expected: editors,
    input: ({ workspaceId, poolId, marketId }) => ({
      workspaceId,
      name: "D",
      poolId,
      marketId,
      content: aDealContent,
    }),
  },
  "deals.save": {
    expected: ["conflict", "conflict", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId, dealId, poolId, marketId }) => ({
      workspaceId,
      dealId,
      version: 99,
      name: "D",
      poolId,
      marketId,
      content: aDealContent,
    }),
  },
  "deals.restoreVersion": {
    expected: ["notFound", "notFound", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, version: 77 }),
  },
  "deals.copy": {
    expected: editors,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, name: "Copy" }),
  },
  "deals.archive": {
    expected: editors,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, archived: false }),
  },
  "deals.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "deals.open": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "deals.history": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "deals.parts": {
    expected: everyone,
    input: ({ workspaceId, poolId, marketId }) => ({ workspaceId, poolId, marketId }),
  },
  "deals.request": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "runs.price": {
    expected: workers,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, version: 1 }),
  },
  "runs.list": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "runs.open": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, runId: "none" }),
  },
  "scenarios.create": {
    expected: ["ok", "conflict", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, name: "Wider", content: { shock: { scale: 2 } } }),
  },
  "scenarios.save": {
    expected: ["notFound", "notFound", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({
      workspaceId,
      scenarioId: "none",
      version: 1,
      name: "Wider",
      content: { shock: {} },
    }),
  },
  "scenarios.remove": {
    expected: ["notFound", "notFound", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, scenarioId: "none" }),
  },
  "scenarios.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "alternatives.keep": {
    expected: editors,
    input: ({ workspaceId, dealId }) => ({
      workspaceId,
      dealId,
      name: "Thicker",
      content: { classes: aDealContent.classes },
    }),
  },
  "alternatives.remove": {
    expected: ["notFound", "notFound", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, alternativeId: "none" }),
  },
  "alternatives.list": {
    expected: everyone,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }),
  },
  "jobs.start": {
    expected: workers,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, request: aRequest(), grid: aGrid }),
  },
  "jobs.cancel": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, jobId: "none" }),
  },
  "jobs.list": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "jobs.open": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, jobId: "none" }),
  },
  "runs.repeat": {
    expected: ["notFound", "notFound", "notFound", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, runId: "none" }),
  },
  "reviews.ask": {
    expected: ["notFound", "notFound", "forbidden", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, runId: "none", reviewers: ["someone"] }),
  },
  "reviews.answer": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, reviewId: "none", answer: "signed", checks: [] }),
  },
  "reviews.withdraw": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, reviewId: "none" }),
  },
  "reviews.saveSettings": {
    expected: owners,
    input: ({ workspaceId }) => ({ workspaceId, settings: { checklist: ["Pool"], needed: 1 } }),
  },
  "reviews.standing": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "reviews.list": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "reviews.open": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, reviewId: "none" }),
  },
  "reviews.settings": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "discussion.start": {
    expected: workers,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, body: "Hello" }),
  },
  "discussion.reply": {
    expected: ["notFound", "notFound", "notFound", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, threadId: "none", body: "Hello" }),
  },
  "discussion.edit": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, commentId: "none", version: 1, body: "x" }),
  },
  "discussion.delete": {
    expected: ["notFound", "notFound", "notFound", "notFound", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, commentId: "none" }),
  },
  "discussion.resolve": {
    expected: ["notFound", "notFound", "notFound", "forbidden", "notFound"],
    input: ({ workspaceId }) => ({ workspaceId, threadId: "none", resolved: true }),
  },
  "discussion.list": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "discussion.marks": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "discussion.seen": {
    expected: everyone,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, threadIds: [] }),
  },
  "notices.read": {
    expected: everyone,
    input: ({ workspaceId }) => ({ workspaceId, which: "all", isRead: true }),
  },
  "notices.follow": {
    expected: everyone,
    input: ({ workspaceId, dealId }) => ({ workspaceId, dealId, state: "following" }),
  },
  "notices.setMail": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId, mail: "off" }) },
  "notices.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "notices.count": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "notices.followed": { expected: everyone, input: ({ workspaceId, dealId }) => ({ workspaceId, dealId }) },
  "activity.choices": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "activity.export": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
  "activity.list": { expected: everyone, input: ({ workspaceId }) => ({ workspaceId }) },
};

const roleOrder = ["owner", "structurer", "analyst", "viewer", "stranger"] as const;

const place = withDatabase();
let world: World;

beforeAll(async () => {
  world = await aWorld(place.store.database);
});

afterAll(async () => {
  await closeCompute();
});

async function outcomeOf(name: string, who: Who): Promise<Outcome> {
  const operation = findOperation(name)!;
  const actor = who === "signedOut" ? null : who === "stranger" ? world.stranger : world.people[who];
  try {
    await execute(operation, rows[name]!.input(world), { database: place.store.database, actor });
    return "ok";
  } catch (error) {
    if (error instanceof Refusal) return error.kind;
    throw error;
  }
}

describe("every operation × every role × stranger × signed out", () => {
  it("has a row for every operation, and no row too many", () => {
    expect(operations.map((operation) => operation.name).sort()).toEqual(Object.keys(rows).sort());
  });

  for (const [name, { expected }] of Object.entries(rows).filter(([known]) => known !== "workspaces.leave")) {
    it(name, async () => {
      const found: Record<string, Outcome> = {};
      for (const who of roleOrder) found[who] = await outcomeOf(name, who);
      expect(found).toEqual(Object.fromEntries(roleOrder.map((who, i) => [who, expected[i]])));
      expect(await outcomeOf(name, "signedOut")).toBe("signedOut");
    });
  }

  it("workspaces.leave: everyone but the last owner, then they are strangers", async () => {
    const { expected } = rows["workspaces.leave"]!;
    const found: Outcome[] = [];
    for (const who of roleOrder) found.push(await outcomeOf("workspaces.leave", who));
    expect(found).toEqual(expected);
    expect(await outcomeOf("workspaces.leave", "signedOut")).toBe("signedOut");
    expect(await outcomeOf("deals.open", "analyst")).toBe("notFound");
  });
});
