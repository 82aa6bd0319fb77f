import { defineQuery } from "../platform/operation";
import { mayOf } from "../workspaces/policy";
import { inWorkspace } from "../workspaces/schema";
import { poolIn } from "./commands";
import { namesOf } from "./names";
import { poolInput } from "./schema";

const list = defineQuery({
  name: "pools.list",
  input: inWorkspace,
  async run({ tx, member }, { workspaceId }) {
    const may = mayOf(await member(workspaceId));
    const pools = await tx.pool.findMany({
      where: { workspaceId },
      orderBy: { updatedAt: "desc" },
      include: { _count: { select: { names: true, deals: true } } },
    });
    const sums = await tx.poolName.groupBy({
      by: ["poolId"],
      where: { pool: { workspaceId } },
      _sum: { notional: true },
    });
    const notional = new Map(sums.map((row) => [row.poolId, row._sum.notional ?? 0]));
    return {
      may,
      pools: pools.map(({ id, name, currency, archivedAt, updatedAt, _count }) => ({
        id,
        name,
        currency,
        names: _count.names,
        deals: _count.deals,
        notional: notional.get(id) ?? 0,
        isArchived: archivedAt !== null,
        updatedAt: updatedAt.toISOString(),
      })),
    };
  },
});

const open = defineQuery({
  name: "pools.open",
  input: poolInput,
  async run(context, { workspaceId, poolId }) {
    const may = mayOf(await context.member(workspaceId));
    const { id, name, currency, version, archivedAt } = await poolIn(context, workspaceId, poolId);
    const deals = await context.tx.deal.findMany({ where: { poolId }, select: { id: true, name: true } });
    return {
      may,
      id,
      name,
      currency,
      version,
      isArchived: archivedAt !== null,
      names: await namesOf(context.tx, poolId),
      deals,
    };
  },
});

export const queries = { list, open };
