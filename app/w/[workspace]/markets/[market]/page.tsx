import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/markets/queries";
import { queries as poolQueries } from "@/lib/pools/queries";
import { MarketDesk } from "../_desk/MarketDesk";

export const metadata = { title: "Market" };

export default async function Page({ params }: { params: Promise<{ workspace: string; market: string }> }) {
  const { workspace, market: marketId } = await params;
  const market = await ask(queries.open, { workspaceId: workspace, marketId });
  const { pools } = await ask(poolQueries.list, { workspaceId: workspace });
  return (
    <MarketDesk
      key={`${market.id} ${market.version}`}
      workspaceId={workspace}
      market={market}
      today={market.pricingDate}
      pools={pools}
      mayEdit={market.may.edit && !market.isArchived}
    />
  );
}
