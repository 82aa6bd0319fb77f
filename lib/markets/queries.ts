import { defineQuery } from "../platform/operation";
import { mayOf } from "../workspaces/policy";
import { inWorkspace } from "../workspaces/schema";
import { marketIn } from "./commands";
import { type MarketContent, marketInput } from "./schema";

const list = defineQuery({
  name: "markets.list",
  input: inWorkspace,
  async run({ tx, member }, { workspaceId }) {
    const may = mayOf(await member(workspaceId));
    const markets = await tx.market.findMany({
      where: { workspaceId },
      orderBy: { updatedAt: "desc" },
      include: { _count: { select: { deals: true } } },
    });
    return {
      may,
      markets: markets.map(({ id, name, pricingDate, content, archivedAt, _count }) => ({
        id,
        name,
        pricingDate,
        content: content as MarketContent,
        deals: _count.deals,
        isArchived: archivedAt !== null,
      })),
    };
  },
});

const open = defineQuery({
  name: "markets.open",
  input: marketInput,
  async run(context, { workspaceId, marketId }) {
    const may = mayOf(await context.member(workspaceId));
    const { id, name, pricingDate, content, version, archivedAt } = await marketIn(
      context,
      workspaceId,
      marketId,
    );
    const deals = await context.tx.deal.findMany({ where: { marketId }, select: { id: true, name: true } });
    return {
      may,
      id,
      name,
      pricingDate,
      content: content as MarketContent,
      version,
      isArchived: archivedAt !== null,
      deals,
    };
  },
});

export const queries = { list, open };
