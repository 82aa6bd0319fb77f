import { marketIn } from "../markets/commands";
import type { MarketContent } from "../markets/schema";
import type { QueryContext } from "../platform/operation";
import { poolIn } from "../pools/commands";
import { namesOf } from "../pools/names";
import type { NameInput } from "../pricing/request";

/** A pool and a market of the workspace, as a request takes them. */
export async function partsOf(context: QueryContext, workspaceId: string, poolId: string, marketId: string) {
  const pool = await poolIn(context, workspaceId, poolId);
  const market = await marketIn(context, workspaceId, marketId);
  const content = market.content as MarketContent;
  const quotedNames: Record<string, NameInput[]> = {};
  for (const quoted of content.quotedPools ?? []) {
    const linked = await poolIn(context, workspaceId, quoted.poolId).catch(() => null);
    if (linked) quotedNames[quoted.poolId] = await namesOf(context.tx, quoted.poolId);
  }
  return {
    currency: pool.currency,
    names: await namesOf(context.tx, poolId),
    pricingDate: market.pricingDate,
    market: content,
    quotedNames,
  };
}
