import { Stack } from "@mantine/core";
import type { ReactNode } from "react";
import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries as discussion } from "@/lib/discussion/queries";
import { queries as reviews } from "@/lib/reviews/queries";
import { DealFrame } from "../_frame/DealFrame";
import { DealHeader } from "../_frame/DealHeader";
import { Pins } from "../_talk/Pins";

/** The frame of a deal's desk: its head, its rooms, and the live connection. */
export default async function DealLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ workspace: string; deal: string }>;
}) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const deal = await ask(deals.open, { workspaceId, dealId });
  const { standing } = await ask(reviews.standing, { workspaceId, dealId });
  const marks = await ask(discussion.marks, { workspaceId, dealId });
  return (
    <DealFrame
      workspaceId={workspaceId}
      deal={deal}
      mayEdit={deal.may.edit && !deal.isArchived}
      pools={deal.pools}
      markets={deal.markets}
    >
      <DealHeader standing={standing} />
      <Pins workspaceId={workspaceId} dealId={dealId} marks={marks}>
        <Stack gap="lg" mt="md">
          {children}
        </Stack>
      </Pins>
    </DealFrame>
  );
}
