import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeCompute } from "@/lib/compute/serverPool";
import { commands } from "@/lib/jobs/commands";
import { queries } from "@/lib/jobs/queries";
import { workOn } from "@/lib/jobs/start";
import { takeTurn } from "@/lib/jobs/turn";
import { execute } from "@/lib/platform/run";
import { noShock } from "@/lib/pricing/shock";
import { shockedFigures } from "@/lib/pricing/shockedFigures";
import { withDatabase } from "../support/database";
import { refusal } from "../support/refusal";
import { aGrid, aRequest, aWorld } from "../support/world";

const place = withDatabase();
let world: Awaited<ReturnType<typeof aWorld>>;

beforeAll(async () => {
  world = await aWorld(place.store.database);
});
afterAll(closeCompute);

const as = (role: "owner" | "structurer" | "analyst" | "viewer") => ({
  database: place.store.database,
  actor: world.people[role],
});

async function started(role: "owner" | "structurer" | "analyst", grid: unknown = aGrid): Promise<string> {
  const { workspaceId, dealId } = world;
  const input = { workspaceId, dealId, request: aRequest(), grid };
  return (await execute(commands.start, input, as(role))).jobId;
}

const opened = (jobId: string) =>
  execute(queries.open, { workspaceId: world.workspaceId, jobId }, as("viewer"));

async function until(jobId: string, state: string) {
  for (let i = 0; i < 300; i++) {
    const job = await opened(jobId);
    if (job.state === state) return job;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`The job did not become ${state}: it is ${(await opened(jobId)).state}.`);
}

const wide = { ...aGrid, correlations: Array.from({ length: 20 }, (_, i) => i / 100) };

describe("background work", () => {
  it("works a grid out cell by cell: what it keeps are the figures of each shock, and pages are told", async () => {
    const stop = await workOn(place.store);
    try {
      const job = await until(await started("analyst"), "done");
      expect([job.done, job.total, job.cells.length]).toEqual([5, 5, 5]);
      expect(job.cells[0]).toEqual(shockedFigures(aRequest(), noShock));
      expect(job.cells[4]).toEqual(shockedFigures(aRequest(), { ...noShock, scale: 2, correlation: 0.1 }));
      const events = await place.store.database.event.findMany({ where: { kind: { startsWith: "job." } } });
      const kinds = events.map(({ kind }) => kind).filter((kind) => kind !== "job.progress");
      expect(kinds).toEqual(["job.queued", "job.done"]);
    } finally {
      await stop();
    }
  });

  it("takes up what waited while no server was there, and what a killed one left half done, without losing cells", async () => {
    const waiting = await started("owner");
    const halfDone = await started("structurer", wide);
    expect(await takeTurn(place.store.database, halfDone, () => true)).toBe("more");
    const before = await opened(halfDone);
    expect(before.state).toBe("running");
    expect(before.cells.length).toBeGreaterThan(0);
    expect(before.cells.length).toBeLessThan(41);
    // On a server another process may be at it: it is taken up when it has been silent for some minutes.
    const longAgo = new Date(Date.now() - 3_600_000);
    await place.store.database.job.update({ where: { id: halfDone }, data: { updatedAt: longAgo } });
    const stop = await workOn(place.store);
    try {
      await until(waiting, "done");
      const after = await until(halfDone, "done");
      expect(after.cells.slice(0, before.cells.length)).toEqual(before.cells);
      expect(after.cells).toHaveLength(41);
    } finally {
      await stop();
    }
  });

  it("is called off by whoever asked for it or an owner, keeps what it has, and does not go on", async () => {
    const { workspaceId } = world;
    const jobId = await started("analyst");
    const other = execute(commands.cancel, { workspaceId, jobId }, as("structurer"));
    expect((await refusal(other)).kind).toBe("forbidden");
    await execute(commands.cancel, { workspaceId, jobId }, as("owner"));
    expect(await takeTurn(place.store.database, jobId, () => false)).toBe("over");
    expect((await opened(jobId)).state).toBe("cancelled");
    const again = execute(commands.cancel, { workspaceId, jobId }, as("analyst"));
    expect((await refusal(again)).kind).toBe("conflict");
  });

  it("is bounded: three a person, and a request or grid with a fault is refused with its path", async () => {
    const { workspaceId, dealId } = world;
    for (let i = 0; i < 3; i++) await started("analyst");
    expect((await refusal(started("analyst"))).kind).toBe("limited");
    await started("structurer");
    const request = { ...aRequest(), correlation: { kind: "flat", rho: 2 } };
    const faulty = execute(commands.start, { workspaceId, dealId, request, grid: aGrid }, as("owner"));
    expect((await refusal(faulty)).problems[0]!.path).toBe("correlation.rho");
    expect((await refusal(started("owner", { ...aGrid, correlations: [3] }))).kind).toBe("invalid");
  });

  it("answers a shock that cannot be priced with its reasons, and goes on", async () => {
    const jobId = await started("owner", { ...aGrid, shock: { recovery: 0.9 } });
    expect(await takeTurn(place.store.database, jobId, () => false)).toBe("over");
    const { state, cells } = await opened(jobId);
    expect(state).toBe("done");
    expect(cells.slice(1).every((cell) => !cell.ok && cell.problems[0]!.path === "pool.0.recovery")).toBe(
      true,
    );
  });
});
