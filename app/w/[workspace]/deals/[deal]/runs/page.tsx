import { ask } from "@/app/_ui/ask";
import { queries as runs } from "@/lib/runs/queries";
import { RunList } from "../RunList";

export const metadata = { title: "Runs" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const { runs: list } = await ask(runs.list, { workspaceId, dealId });
  return <RunList workspaceId={workspaceId} dealId={dealId} runs={list} />;
}
