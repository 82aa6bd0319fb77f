import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries } from "@/lib/runs/queries";
import { RunView } from "../../../_report/RunView";

export default async function Page({
  params,
}: {
  params: Promise<{ workspace: string; deal: string; run: string }>;
}) {
  const { workspace: workspaceId, deal: dealId, run: runId } = await params;
  const deal = await ask(deals.open, { workspaceId, dealId });
  const run = await ask(queries.open, { workspaceId, runId });
  const names = Object.fromEntries(deal.content.classes.map((row) => [row.id, row.name]));
  return (
    <RunView
      workspaceId={workspaceId}
      deal={{ id: deal.id, name: deal.name, version: deal.version }}
      run={run}
      classNames={names}
    />
  );
}
