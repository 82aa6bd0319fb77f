import type { MarketContent } from "../markets/schema";
import type { QueryContext } from "../platform/operation";
import { requestHash } from "../pricing/canonical";
import { dealIn } from "./find";
import { partsOf } from "./parts";
import { toRequest } from "./request";
import type { DealContent } from "./schema";

const MOST_KEPT = 2_000;
const kept = new Map<string, string>();

/**
 * The hash of the request that pricing the deal now would make: it tells whether a run still stands for the deal, changes of
 * its pool and market included. Remembered for the versions it was made of.
 */
export async function currentHash(
  context: QueryContext,
  workspaceId: string,
  dealId: string,
): Promise<string> {
  const deal = await context.tx.deal.findUniqueOrThrow({
    where: { id: dealId },
    select: {
      version: true,
      pool: { select: { id: true, version: true } },
      market: { select: { id: true, version: true, content: true } },
    },
  });
  const { version, pool, market } = deal;
  const quoted = (market.content as MarketContent).quotedPools?.map(({ poolId }) => poolId) ?? [];
  const linked = await context.tx.pool.findMany({
    where: { workspaceId, id: { in: quoted } },
    select: { id: true, version: true },
    orderBy: { id: "asc" },
  });
  const pools = [pool, ...linked].map(({ id, version: of }) => `${id} ${of}`);
  const key = [dealId, version, market.id, market.version, ...pools].join(" ");
  const known = kept.get(key);
  if (known !== undefined) return known;
  const { request } = await requestOfDeal(context, workspaceId, dealId);
  const hash = requestHash(request);
  if (kept.size >= MOST_KEPT) kept.clear();
  kept.set(key, hash);
  return hash;
}

/** The request that pricing the deal now would make, and the version it is of. */
export async function requestOfDeal(context: QueryContext, workspaceId: string, dealId: string) {
  const deal = await dealIn(context, workspaceId, dealId);
  const linked = await partsOf(context, workspaceId, deal.poolId, deal.marketId);
  const request = toRequest({ ...linked, content: deal.content as DealContent });
  return { request, version: deal.version };
}
