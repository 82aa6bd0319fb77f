import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries as pools } from "@/lib/pools/queries";
import { PoolRoom } from "../../_pool/PoolRoom";

export const metadata = { title: "Pool" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const deal = await ask(deals.open, { workspaceId, dealId });
  const pool = await ask(pools.open, { workspaceId, poolId: deal.pool.id });
  return <PoolRoom key={`${pool.id} ${pool.version}`} pool={pool} />;
}
