import { Stack } from "@mantine/core";
import { ask } from "@/app/_ui/ask";
import { queries as markets } from "@/lib/markets/queries";
import { queries as pools } from "@/lib/pools/queries";
import { DealFrame } from "../_frame/DealFrame";
import { DealHeader } from "../_frame/DealHeader";
import { Structure } from "../_structure/Structure";

export const metadata = { title: "New deal" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace: workspaceId } = await params;
  const pool = await ask(pools.list, { workspaceId });
  const market = await ask(markets.list, { workspaceId });
  const choices = market.markets.filter((row) => !row.isArchived);
  return (
    <DealFrame
      workspaceId={workspaceId}
      deal={null}
      mayEdit={pool.may.edit}
      pools={pool.pools.filter((row) => !row.isArchived)}
      markets={choices.map(({ id, name, pricingDate, content }) => ({
        id,
        name,
        pricingDate,
        scheduleKind: content.schedule.kind,
      }))}
    >
      <DealHeader />
      <Stack gap="lg" mt="md">
        <Structure />
      </Stack>
    </DealFrame>
  );
}
