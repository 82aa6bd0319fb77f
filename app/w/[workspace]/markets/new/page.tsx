import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/markets/queries";
import { queries as poolQueries } from "@/lib/pools/queries";
import { MarketDesk } from "../_desk/MarketDesk";

export const metadata = { title: "New market" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { may } = await ask(queries.list, { workspaceId: workspace });
  const today = new Date().toISOString().slice(0, 10);
  const { pools } = await ask(poolQueries.list, { workspaceId: workspace });
  return (
    <MarketDesk
      workspaceId={workspace}
      market={null}
      today={today}
      mayEdit={may.edit}
      pools={pools.filter((pool) => !pool.isArchived)}
    />
  );
}
