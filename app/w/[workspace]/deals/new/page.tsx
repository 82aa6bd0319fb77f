import { ask } from "@/app/_ui/ask";
import { queries as markets } from "@/lib/markets/queries";
import { queries as pools } from "@/lib/pools/queries";
import { DealDesk } from "../_desk/DealDesk";

export const metadata = { title: "New deal" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace: workspaceId } = await params;
  const pool = await ask(pools.list, { workspaceId });
  const market = await ask(markets.list, { workspaceId });
  return (
    <DealDesk
      workspaceId={workspaceId}
      deal={null}
      mayEdit={pool.may.edit}
      pools={pool.pools.filter((row) => !row.isArchived)}
      markets={market.markets
        .filter((row) => !row.isArchived)
        .map(({ id, name, pricingDate, content }) => ({
          id,
          name,
          pricingDate,
          scheduleKind: content.schedule.kind,
        }))}
    />
  );
}
