import { beforeAll, describe, expect, it } from "vitest";
import { commands as alternatives } from "@/lib/alternatives/commands";
import { queries as alternativeQueries } from "@/lib/alternatives/queries";
import { execute } from "@/lib/platform/run";
import { noShock } from "@/lib/pricing/shock";
import { commands as scenarios } from "@/lib/scenarios/commands";
import { queries as scenarioQueries } from "@/lib/scenarios/queries";
import { withDatabase } from "../support/database";
import { refusal } from "../support/refusal";
import { aDealContent, aWorld } from "../support/world";

const place = withDatabase();
let world: Awaited<ReturnType<typeof aWorld>>;

beforeAll(async () => {
  world = await aWorld(place.store.database);
});

const as = (role: "owner" | "structurer" | "analyst" | "viewer") => ({
  database: place.store.database,
  actor: world.people[role],
});

describe("scenarios", () => {
  it("are kept whole for everyone, saved on their version, and deleted with a record of what they were", async () => {
    const { workspaceId } = world;
    const content = { shock: { scale: 1.5, defaults: { kind: "widest", count: 3 } }, note: "as in spring" };
    const made = await execute(scenarios.create, { workspaceId, name: "Spring", content }, as("structurer"));
    const read = async () =>
      (await execute(scenarioQueries.list, { workspaceId }, as("viewer"))).scenarios.find(
        ({ id }) => id === made.scenarioId,
      );
    expect((await read())?.content.shock).toEqual({ ...noShock, ...content.shock });

    const save = (version: number, name: string) =>
      execute(
        scenarios.save,
        { workspaceId, scenarioId: made.scenarioId, version, name, content },
        as("owner"),
      );
    expect(await save(1, "Late spring")).toEqual({ version: 2 });
    const stale = await refusal(save(1, "Summer"));
    expect(stale.kind).toBe("conflict");
    expect(stale.current).toMatchObject({ version: 2, name: "Late spring" });

    await execute(scenarios.remove, { workspaceId, scenarioId: made.scenarioId }, as("structurer"));
    expect(await read()).toBeUndefined();
    const removed = await place.store.database.activity.findFirst({ where: { kind: "scenario.removed" } });
    expect(removed?.before).toMatchObject({ name: "Late spring" });
  });

  it("bear names that tell them apart, and only shocks with a meaning", async () => {
    const { workspaceId } = world;
    const create = (name: string, shock: unknown) =>
      execute(scenarios.create, { workspaceId, name, content: { shock } }, as("owner"));
    await create("Wider", { scale: 2 });
    expect((await refusal(create(" Wider ", { scale: 3 }))).problems[0]!.path).toBe("name");
    expect((await refusal(create("Odd", { correlation: 2 }))).problems[0]!.path).toBe(
      "content.shock.correlation",
    );
  });
});

describe("alternatives", () => {
  it("stand beside a deal without changing it, and may not overlap themselves", async () => {
    const { workspaceId, dealId } = world;
    const keep = (classes: unknown) =>
      execute(
        alternatives.keep,
        { workspaceId, dealId, name: "Thicker first loss", content: { classes } },
        as("structurer"),
      );
    const [first, second] = aDealContent.classes;
    await keep([
      { ...first, detachment: 0.15 },
      { ...second, attachment: 0.15 },
    ]);
    const { alternatives: kept } = await execute(
      alternativeQueries.list,
      { workspaceId, dealId },
      as("viewer"),
    );
    expect(kept.map(({ content }) => content.classes.map(({ detachment }) => detachment))).toEqual([
      [0.15, 0.3],
    ]);
    const deal = await place.store.database.deal.findUniqueOrThrow({ where: { id: dealId } });
    expect(deal.content).toEqual(aDealContent);
    const overlapping = await refusal(keep([{ ...first, detachment: 0.2 }, second]));
    expect(overlapping.problems[0]!.code).toBe("overlap");
  });
});
