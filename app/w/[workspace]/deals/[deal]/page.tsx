import { Badge, Group, Stack, Text, Title } from "@mantine/core";
import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries as discussion } from "@/lib/discussion/queries";
import { queries as runs } from "@/lib/runs/queries";
import { DealDesk } from "../_desk/DealDesk";
import { DealActions } from "./DealActions";
import { LivePage } from "./LivePage";
import { RunList } from "./RunList";
import { Talk } from "./Talk";

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const input = { workspaceId, dealId };
  const deal = await ask(deals.open, input);
  const list = await ask(runs.list, input);
  const talk = await ask(discussion.list, input);
  return (
    <Stack gap="xl">
      <LivePage workspaceId={workspaceId} dealId={dealId} />
      <Group justify="space-between">
        <div>
          <Title order={1}>
            {deal.name} {deal.isArchived && <Badge variant="default">Archived</Badge>}
          </Title>
          <Text c="dimmed">
            {deal.pool.names} names of {deal.pool.name}, {deal.market.name} ({deal.market.pricingDate})
          </Text>
        </div>
        <DealActions workspaceId={workspaceId} deal={deal} />
      </Group>
      <RunList workspaceId={workspaceId} dealId={dealId} runs={list.runs} />
      <DealDesk
        workspaceId={workspaceId}
        deal={deal}
        mayEdit={deal.may.edit && !deal.isArchived}
        pools={deal.pools}
        markets={deal.markets}
      />
      <Talk workspaceId={workspaceId} dealId={dealId} talk={talk} />
    </Stack>
  );
}
