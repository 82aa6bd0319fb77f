import { notFound } from "next/navigation";
import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries } from "@/lib/runs/queries";
import { RunView } from "../../../_report/RunView";
import { Pointing } from "../../../_talk/Pointing";

export default async function Page({
  params,
}: {
  params: Promise<{ workspace: string; deal: string; run: string }>;
}) {
  const { workspace: workspaceId, deal: dealId, run: runId } = await params;
  const deal = await ask(deals.open, { workspaceId, dealId });
  const run = await ask(queries.open, { workspaceId, runId });
  if (run.dealId !== dealId) notFound();
  return (
    <Pointing runId={runId}>
      <RunView
        workspaceId={workspaceId}
        deal={{ id: deal.id, name: deal.name }}
        run={run}
        classNames={run.classNames}
      />
    </Pointing>
  );
}
