import { marketIn } from "../markets/commands";
import type { MarketContent } from "../markets/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery } from "../platform/operation";
import { poolIn } from "../pools/commands";
import { mayOf } from "../workspaces/policy";
import { inWorkspace } from "../workspaces/schema";
import { currentHash, requestOfDeal } from "./current";
import { dealIn } from "./find";
import { partsOf } from "./parts";
import { type DealContent, dealInput, partsInput } from "./schema";

const list = defineQuery({
  name: "deals.list",
  input: inWorkspace,
  async run(context, { workspaceId }) {
    const may = mayOf(await context.member(workspaceId));
    const deals = await context.tx.deal.findMany({
      where: { workspaceId },
      orderBy: { updatedAt: "desc" },
      include: {
        pool: { select: { name: true, currency: true } },
        market: { select: { name: true } },
        runs: {
          orderBy: { number: "desc" },
          take: 1,
          select: { number: true, createdAt: true, requestHash: true },
        },
      },
    });
    const hashes = new Map<string, string>();
    for (const { id, runs } of deals)
      if (runs.length > 0) hashes.set(id, await currentHash(context, workspaceId, id));
    return {
      may,
      deals: deals.map(({ id, name, pool, market, content, version, archivedAt, updatedAt, runs }) => ({
        id,
        name,
        pool: pool.name,
        currency: pool.currency,
        market: market.name,
        classes: (content as DealContent).classes.length,
        version,
        isArchived: archivedAt !== null,
        updatedAt: updatedAt.toISOString(),
        lastRun: runs[0]
          ? {
              number: runs[0].number,
              at: runs[0].createdAt.toISOString(),
              isCurrent: runs[0].requestHash === hashes.get(id),
            }
          : null,
      })),
    };
  },
});

const open = defineQuery({
  name: "deals.open",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const { tx } = context;
    const may = mayOf(await context.member(workspaceId));
    const deal = await dealIn(context, workspaceId, dealId);
    const pool = await poolIn(context, workspaceId, deal.poolId);
    const market = await marketIn(context, workspaceId, deal.marketId);
    const pools = await tx.pool.findMany({
      where: { workspaceId },
      select: { id: true, name: true, archivedAt: true },
      orderBy: { name: "asc" },
    });
    const markets = await tx.market.findMany({
      where: { workspaceId },
      select: { id: true, name: true, pricingDate: true, content: true, archivedAt: true },
      orderBy: { name: "asc" },
    });
    const sums = await tx.poolName.aggregate({
      where: { poolId: pool.id },
      _sum: { notional: true },
      _count: true,
    });
    return {
      may,
      id: deal.id,
      name: deal.name,
      version: deal.version,
      isArchived: deal.archivedAt !== null,
      content: deal.content as DealContent,
      pool: {
        id: pool.id,
        name: pool.name,
        currency: pool.currency,
        names: sums._count,
        notional: sums._sum.notional ?? 0,
        version: pool.version,
      },
      market: {
        id: market.id,
        name: market.name,
        pricingDate: market.pricingDate,
        content: market.content as MarketContent,
        version: market.version,
      },
      pools: pools
        .filter((row) => row.archivedAt === null || row.id === pool.id)
        .map(({ id, name }) => ({ id, name })),
      markets: markets
        .filter((row) => row.archivedAt === null || row.id === market.id)
        .map(({ id, name, pricingDate, content }) => ({
          id,
          name,
          pricingDate,
          scheduleKind: (content as MarketContent).schedule.kind,
        })),
    };
  },
});

const history = defineQuery({
  name: "deals.history",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const versions = await context.tx.dealVersion.findMany({
      where: { dealId },
      orderBy: { version: "desc" },
    });
    const nameOf = await peopleNames(
      context.tx,
      versions.map((row) => row.savedById),
    );
    return {
      versions: versions.map(({ version, savedById, savedAt, content }) => ({
        version,
        savedBy: nameOf(savedById),
        savedAt: savedAt.toISOString(),
        content,
      })),
    };
  },
});

/** A pool and a market as a deal's request takes them, whether a deal links them yet or not. */
const parts = defineQuery({
  name: "deals.parts",
  input: partsInput,
  async run(context, { workspaceId, poolId, marketId }) {
    await context.member(workspaceId);
    return partsOf(context, workspaceId, poolId, marketId);
  },
});

/** The request that pricing the deal now would make. */
const request = defineQuery({
  name: "deals.request",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    await context.member(workspaceId);
    return requestOfDeal(context, workspaceId, dealId);
  },
});

export const queries = { list, open, history, parts, request };
