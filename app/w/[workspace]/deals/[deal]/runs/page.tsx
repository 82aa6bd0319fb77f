import { ask } from "@/app/_ui/ask";
import { queries as runs } from "@/lib/runs/queries";
import { RunComparison } from "./_compare/RunComparison";
import { RunList } from "./RunList";

export const metadata = { title: "Runs" };

export default async function Page({
  params,
  searchParams,
}: {
  params: Promise<{ workspace: string; deal: string }>;
  searchParams: Promise<{ earlier?: string; later?: string }>;
}) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const { earlier, later } = await searchParams;
  const { runs: list } = await ask(runs.list, { workspaceId, dealId });
  const known = (id: string | undefined) => list.some((run) => run.id === id);
  const pair =
    known(earlier) && known(later)
      ? {
          earlier: await ask(runs.open, { workspaceId, runId: earlier! }),
          later: await ask(runs.open, { workspaceId, runId: later! }),
        }
      : null;
  return (
    <>
      <RunList workspaceId={workspaceId} dealId={dealId} runs={list} earlier={earlier} later={later} />
      {pair && <RunComparison key={`${earlier} ${later}`} {...pair} />}
    </>
  );
}
