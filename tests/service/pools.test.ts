import { describe, expect, it } from "vitest";
import type { Actor } from "@/lib/platform/accounts/actor";
import { execute } from "@/lib/platform/run";
import { commands } from "@/lib/pools/commands";
import { queries } from "@/lib/pools/queries";
import { aPerson, aWorkspace } from "../support/actors";
import { aName, aPool } from "../support/builders";
import { withDatabase } from "../support/database";
import { refusal } from "../support/refusal";

const place = withDatabase();
const as = (actor: Actor) => ({ database: place.store.database, actor });

async function setUp() {
  const { workspaceId, members } = await aWorkspace(place.store.database);
  const by = as(members.structurer);
  const pool = aPool();
  const { poolId } = await execute(commands.create, { workspaceId, ...pool }, by);
  const open = () => execute(queries.open, { workspaceId, poolId }, by);
  return { workspaceId, members, by, pool, poolId, open };
}

describe("pools", () => {
  it("come back with their names in order, to the last bit", async () => {
    const { open, pool } = await setUp();
    expect(await open()).toMatchObject({ ...pool, version: 1, isArchived: false });
  });

  it("are saved as a whole: rows added, changed, removed and moved", async () => {
    const { open, by, workspaceId, poolId } = await setUp();
    const names = [aName({ id: "A03" }), aName({ id: "B01" }), aName({ id: "A01", recovery: 0.1 + 0.2 })];
    const input = { workspaceId, poolId, version: 1, name: "Renamed", currency: "USD", names };
    expect(await execute(commands.save, input, by)).toEqual({ version: 2 });
    expect(await open()).toMatchObject({ name: "Renamed", currency: "USD", version: 2, names });
    const { after } = await place.store.database.activity.findFirstOrThrow({
      where: { subjectId: poolId, kind: "pool.saved" },
    });
    expect(after).toMatchObject({ added: 1, changed: 2, removed: 1 });
  });

  it("are not saved over a newer version: the refusal carries what is stored now, and nothing changes", async () => {
    const { open, by, workspaceId, poolId, pool } = await setUp();
    const save = (names: unknown[]) =>
      execute(commands.save, { workspaceId, poolId, version: 1, name: "N", currency: "EUR", names }, by);
    await save([aName({ id: "first" })]);
    const refused = await refusal(save([...pool.names]));
    expect(refused.kind).toBe("conflict");
    expect(refused.current).toMatchObject({ version: 2, names: [{ id: "first" }] });
    expect((await open()).names).toHaveLength(1);
  });

  it("are refused whole when one name does not fit, with every problem by row and field", async () => {
    const { by, workspaceId } = await setUp();
    const names = [
      aName({ id: "a", recovery: 1 }),
      aName({ id: "a", notional: -5 }),
      aName({ id: "c", credit: { kind: "yearly", probability: 2 } }),
      aName({
        id: "d",
        credit: {
          kind: "cumulative",
          nodes: [
            { years: 1, probability: 0.2 },
            { years: 2, probability: 0.1 },
          ],
        },
      }),
    ];
    const refused = await refusal(execute(commands.create, { workspaceId, ...aPool(), names }, by));
    expect(refused.problems.map(({ path }) => path).sort()).toEqual([
      "names.0.recovery",
      "names.1.id",
      "names.1.notional",
      "names.2.credit.probability",
      "names.3.credit.nodes.1.probability",
    ]);
    const { pools } = await execute(queries.list, { workspaceId }, by);
    expect(pools).toHaveLength(1);
  });

  it("are refused without any name, without a title, and in no currency", async () => {
    const { by, workspaceId } = await setUp();
    const refused = await refusal(
      execute(commands.create, { workspaceId, name: " ", currency: "euro", names: [] }, by),
    );
    expect(refused.problems.map(({ path }) => path).sort()).toEqual(["currency", "name"]);
    const empty = await refusal(execute(commands.create, { workspaceId, ...aPool(0) }, by));
    expect(empty.problems[0]?.path).toBe("names");
  });

  it("are copied with all names, and archived and restored", async () => {
    const { by, workspaceId, poolId, pool } = await setUp();
    const { poolId: copyId } = await execute(commands.copy, { workspaceId, poolId, name: "Second" }, by);
    const copy = await execute(queries.open, { workspaceId, poolId: copyId }, by);
    expect(copy).toMatchObject({ name: "Second", names: pool.names });
    const isArchived = async () => {
      const { pools } = await execute(queries.list, { workspaceId }, by);
      return pools.find(({ id }) => id === poolId)?.isArchived;
    };
    await execute(commands.archive, { workspaceId, poolId, archived: true }, by);
    expect(await isArchived()).toBe(true);
    await execute(commands.archive, { workspaceId, poolId, archived: false }, by);
    expect(await isArchived()).toBe(false);
  });

  it("are not saved while archived", async () => {
    const { by, workspaceId, poolId } = await setUp();
    await execute(commands.archive, { workspaceId, poolId, archived: true }, by);
    const saved = execute(commands.save, { workspaceId, poolId, version: 1, ...aPool(1) }, by);
    expect((await refusal(saved)).problems[0]?.code).toBe("archived");
  });

  it("are listed with their names counted and their notional summed", async () => {
    const { by, workspaceId } = await setUp();
    const { pools } = await execute(queries.list, { workspaceId }, by);
    expect(pools).toMatchObject([{ name: "Harbour pool", names: 3, notional: 30_000_000, deals: 0 }]);
  });

  it("are changed by owner and structurer, read by analyst and viewer, unknown to strangers", async () => {
    const { workspaceId, poolId, members } = await setUp();
    const copyBy = (actor: Actor) => execute(commands.copy, { workspaceId, poolId, name: "C" }, as(actor));
    const openBy = (actor: Actor) => execute(queries.open, { workspaceId, poolId }, as(actor));
    await copyBy(members.owner);
    for (const reader of [members.analyst, members.viewer]) {
      expect((await openBy(reader)).may.edit).toBe(false);
      expect((await refusal(copyBy(reader))).kind).toBe("forbidden");
    }
    const stranger = await aPerson(place.store.database);
    expect((await refusal(openBy(stranger))).kind).toBe("notFound");
    expect((await refusal(copyBy(stranger))).kind).toBe("notFound");
  });

  it("of another workspace do not exist, even for someone who is a member of both", async () => {
    const { poolId, members } = await setUp();
    const other = await aWorkspace(place.store.database);
    await place.store.database.member.create({
      data: { id: "both", workspaceId: other.workspaceId, userId: members.owner.userId, role: "owner" },
    });
    const open = execute(queries.open, { workspaceId: other.workspaceId, poolId }, as(members.owner));
    expect((await refusal(open)).kind).toBe("notFound");
  });

  it("hold ten thousand names, of which a save touches only what changed", async () => {
    const { by, workspaceId } = await setUp();
    const pool = aPool(10_000);
    const { poolId } = await execute(commands.create, { workspaceId, ...pool }, by);
    pool.names[5_000] = aName({ id: "A5001", recovery: 0.25 });
    await execute(commands.save, { workspaceId, poolId, version: 1, ...pool }, by);
    const { after } = await place.store.database.activity.findFirstOrThrow({
      where: { subjectId: poolId, kind: "pool.saved" },
    });
    expect(after).toMatchObject({ added: 0, changed: 1, removed: 0 });
  });
});
