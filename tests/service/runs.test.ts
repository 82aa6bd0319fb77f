import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeCompute } from "@/lib/compute/serverPool";
import { commands as deals } from "@/lib/deals/commands";
import { queries as dealQueries } from "@/lib/deals/queries";
import { commands as discussion } from "@/lib/discussion/commands";
import { queries as discussionQueries } from "@/lib/discussion/queries";
import { checkSignIn, countFailure } from "@/lib/platform/accounts/signInLimit";
import { execute } from "@/lib/platform/run";
import { commands as pools } from "@/lib/pools/commands";
import { queries as poolQueries } from "@/lib/pools/queries";
import { requestHash } from "@/lib/pricing/canonical";
import { price } from "@/lib/pricing/price";
import { commands as runs } from "@/lib/runs/commands";
import { queries as runQueries } from "@/lib/runs/queries";
import { withDatabase } from "../support/database";
import { aDealContent, aWorld } from "../support/world";

const place = withDatabase();
let world: Awaited<ReturnType<typeof aWorld>>;

beforeAll(async () => {
  world = await aWorld(place.store.database);
});

afterAll(async () => {
  await closeCompute();
});

const as = (role: "owner" | "structurer" | "analyst" | "viewer") => ({
  database: place.store.database,
  actor: world.people[role],
});

describe("runs", () => {
  it("keep request and report for ever: the request's hash is the report's, and pricing it again gives the same bits", async () => {
    const { workspaceId, dealId } = world;
    const { runId, number } = await execute(
      runs.price,
      { workspaceId, dealId, version: 1, note: "first" },
      as("analyst"),
    );
    const run = await execute(runQueries.open, { workspaceId, runId }, as("viewer"));
    expect(number).toBe(1);
    expect(requestHash(run.request)).toBe(run.requestHash);
    const again = price(run.request);
    expect(again.ok && JSON.stringify(again.report)).toBe(JSON.stringify(run.report));
  });

  it("stand for the deal while its request has their hash: notes change nothing, a changed pool does, and changing it back undoes it", async () => {
    const { workspaceId, dealId, poolId, marketId } = world;
    const isCurrent = async () => {
      const { runs: list } = await execute(runQueries.list, { workspaceId, dealId }, as("viewer"));
      return list.at(-1)?.isCurrent;
    };
    const pool = await execute(poolQueries.open, { workspaceId, poolId }, as("owner"));
    const { name, currency, names } = pool;
    const savePool = (version: number, changed: typeof names) =>
      execute(pools.save, { workspaceId, poolId, version, name, currency, names: changed }, as("owner"));
    expect(await isCurrent()).toBe(true);
    const content = { ...aDealContent, notes: "a remark" };
    await execute(
      deals.save,
      { workspaceId, dealId, version: 1, name: "Deal", poolId, marketId, content },
      as("owner"),
    );
    expect(await isCurrent()).toBe(true);
    await savePool(1, [{ ...names[0]!, recovery: 0.1 }, ...names.slice(1)]);
    expect(await isCurrent()).toBe(false);
    await savePool(2, names);
    expect(await isCurrent()).toBe(true);
  });

  it("refuse a version that is not the saved one", async () => {
    const { workspaceId, dealId } = world;
    await expect(execute(runs.price, { workspaceId, dealId, version: 9 }, as("owner"))).rejects.toMatchObject(
      { kind: "conflict" },
    );
  });
});

describe("deals", () => {
  it("refuse saving over a newer version, and show it", async () => {
    const { workspaceId, dealId, poolId, marketId } = world;
    const fields = {
      workspaceId,
      dealId,
      poolId,
      marketId,
      name: "Deal",
      content: { ...aDealContent, notes: "mine" },
    };
    await execute(deals.save, { ...fields, version: 2 }, as("structurer"));
    const refusal = execute(deals.save, { ...fields, version: 2 }, as("owner"));
    await expect(refusal).rejects.toMatchObject({ kind: "conflict", current: { version: 3 } });
    const { versions } = await execute(dealQueries.history, { workspaceId, dealId }, as("viewer"));
    expect(versions.map((row) => row.version)).toEqual([3, 2, 1]);
  });

  it("refuse overlapping classes and a wrong correlation, all at once, beside their fields", async () => {
    const { workspaceId, poolId, marketId } = world;
    const classes = [aDealContent.classes[0], { ...aDealContent.classes[1], attachment: 0.05 }];
    const content = { ...aDealContent, classes, nthToDefault: [11] };
    const refusal = execute(
      deals.create,
      { workspaceId, name: "Bad", poolId, marketId, content },
      as("owner"),
    );
    await expect(refusal).rejects.toMatchObject({
      kind: "invalid",
      problems: expect.arrayContaining([
        expect.objectContaining({ path: "content.classes.1" }),
        expect.objectContaining({ path: "content.nthToDefault.0" }),
      ]),
    });
  });
});

describe("talk", () => {
  it("keeps a trace of a deleted comment, and only the author may delete it", async () => {
    const { workspaceId, dealId } = world;
    const { commentId } = await execute(
      discussion.start,
      { workspaceId, dealId, body: "One" },
      as("analyst"),
    );
    await expect(execute(discussion.remove, { workspaceId, commentId }, as("owner"))).rejects.toMatchObject({
      kind: "forbidden",
    });
    await execute(discussion.remove, { workspaceId, commentId }, as("analyst"));
    const { threads } = await execute(discussionQueries.list, { workspaceId, dealId }, as("viewer"));
    expect(threads[0]!.comments[0]).toMatchObject({ isDeleted: true, body: "" });
  });
});

describe("sign-in limits", () => {
  it("count an account whatever address the tries come from", async () => {
    const now = new Date();
    for (let i = 0; i < 10; i++)
      await countFailure(place.store.database, { account: "a@b.invalid", address: `10.0.0.${i}` }, now);
    await expect(
      checkSignIn(place.store.database, { account: "A@B.invalid", address: "10.9.9.9" }, now),
    ).rejects.toMatchObject({ kind: "limited" });
    await expect(
      checkSignIn(place.store.database, { account: "c@b.invalid", address: "10.9.9.9" }, now),
    ).resolves.toBeUndefined();
  });
});
