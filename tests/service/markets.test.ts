import { describe, expect, it } from "vitest";
import { commands } from "@/lib/markets/commands";
import { queries } from "@/lib/markets/queries";
import type { Actor } from "@/lib/platform/accounts/actor";
import { execute } from "@/lib/platform/run";
import { aPerson, aWorkspace } from "../support/actors";
import { aMarket } from "../support/builders";
import { withDatabase } from "../support/database";
import { refusal } from "../support/refusal";

const place = withDatabase();
const as = (actor: Actor) => ({ database: place.store.database, actor });

async function setUp() {
  const { workspaceId, members } = await aWorkspace(place.store.database);
  const by = as(members.structurer);
  const { marketId } = await execute(commands.create, { workspaceId, ...aMarket() }, by);
  return { workspaceId, members, by, marketId };
}

describe("markets", () => {
  it("come back as they were stored", async () => {
    const { workspaceId, marketId, by } = await setUp();
    expect(await execute(queries.open, { workspaceId, marketId }, by)).toMatchObject({
      ...aMarket(),
      version: 1,
      deals: [],
    });
  });

  it("are not saved over a newer version: the refusal carries what is stored now", async () => {
    const { workspaceId, marketId, by } = await setUp();
    const save = (name: string) =>
      execute(commands.save, { workspaceId, marketId, version: 1, ...aMarket(), name }, by);
    expect(await save("First")).toEqual({ version: 2 });
    const refused = await refusal(save("Second"));
    expect(refused.kind).toBe("conflict");
    expect(refused.current).toMatchObject({ version: 2, name: "First" });
  });

  it.each([
    [
      "content.discount.nodes.1.years",
      {
        discount: {
          kind: "zero",
          nodes: [
            { years: 5, rate: 0.02 },
            { years: 3, rate: 0.02 },
          ],
        },
      },
    ],
    ["content.discount.nodes.0.years", { discount: { kind: "par", nodes: [{ years: 1.5, rate: 0.02 }] } }],
    ["content.discount.nodes", { discount: { kind: "zero", nodes: [] } }],
    ["content.schedule.holidays.0", { schedule: { kind: "standard", holidays: ["2026-02-30"] } }],
    ["content.schedule.perYear", { schedule: { kind: "even", perYear: 0 } }],
  ] as const)("are refused beside %s", async (path, part) => {
    const { workspaceId, by } = await setUp();
    const market = aMarket();
    const content = { ...market.content, ...part };
    const refused = await refusal(execute(commands.create, { workspaceId, ...market, content } as never, by));
    expect(refused.kind).toBe("invalid");
    expect(refused.problems.map((problem) => problem.path)).toEqual([path]);
  });

  it("are refused on a date that does not exist", async () => {
    const { workspaceId, by } = await setUp();
    const input = { workspaceId, ...aMarket(), pricingDate: "2026-02-30" };
    expect((await refusal(execute(commands.create, input, by))).problems[0]?.path).toBe("pricingDate");
  });

  it("are copied to another date, and archived and restored", async () => {
    const { workspaceId, marketId, by } = await setUp();
    const input = { workspaceId, marketId, name: "Later", pricingDate: "2027-01-04" };
    await execute(commands.copy, input, by);
    await execute(commands.archive, { workspaceId, marketId, archived: true }, by);
    const { markets } = await execute(queries.list, { workspaceId }, by);
    expect(
      markets.map(({ name, pricingDate, isArchived }) => [name, pricingDate, isArchived]).sort(),
    ).toEqual([
      ["Later", "2027-01-04", false],
      ["Year end", "2026-11-30", true],
    ]);
    await execute(commands.archive, { workspaceId, marketId, archived: false }, by);
    expect((await execute(queries.open, { workspaceId, marketId }, by)).isArchived).toBe(false);
  });

  it("are not saved while archived", async () => {
    const { workspaceId, marketId, by } = await setUp();
    await execute(commands.archive, { workspaceId, marketId, archived: true }, by);
    const saved = execute(commands.save, { workspaceId, marketId, version: 1, ...aMarket() }, by);
    expect((await refusal(saved)).problems[0]?.code).toBe("archived");
  });

  it("are changed by owner and structurer, read by analyst and viewer, unknown to strangers", async () => {
    const { workspaceId, marketId, members } = await setUp();
    const archiveBy = (actor: Actor) =>
      execute(commands.archive, { workspaceId, marketId, archived: false }, as(actor));
    const openBy = (actor: Actor) => execute(queries.open, { workspaceId, marketId }, as(actor));
    await archiveBy(members.owner);
    for (const reader of [members.analyst, members.viewer]) {
      expect((await openBy(reader)).may.edit).toBe(false);
      expect((await refusal(archiveBy(reader))).kind).toBe("forbidden");
    }
    const stranger = await aPerson(place.store.database);
    expect((await refusal(openBy(stranger))).kind).toBe("notFound");
  });
});
