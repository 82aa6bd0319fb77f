import { ask } from "@/app/_ui/ask";
import { queries as deals } from "@/lib/deals/queries";
import { queries as reviews } from "@/lib/reviews/queries";
import { queries as runs } from "@/lib/runs/queries";
import { Sheet } from "./Sheet";

export const metadata = { title: "Deal sheet" };

/** The deal sheet of a run, to be printed: figures, chart, assumptions, sign-off and caution on paper. */
export default async function Page({ params }: { params: Promise<{ workspace: string; run: string }> }) {
  const { workspace: workspaceId, run: runId } = await params;
  const run = await ask(runs.open, { workspaceId, runId });
  const deal = await ask(deals.open, { workspaceId, dealId: run.dealId });
  const { reviews: list } = await ask(reviews.list, { workspaceId, dealId: run.dealId });
  const ofRun = list.filter((review) => review.requestHash === run.requestHash);
  return (
    <Sheet workspaceId={workspaceId} deal={{ id: deal.id, name: deal.name }} run={run} reviews={ofRun} />
  );
}
