import { ask } from "@/app/_ui/ask";
import { queries as reviews } from "@/lib/reviews/queries";
import { queries as runs } from "@/lib/runs/queries";
import { AskForReview } from "../../_signOff/AskForReview";
import { ReviewList } from "../../_signOff/ReviewList";

export const metadata = { title: "Sign-off" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const input = { workspaceId, dealId };
  const { may, settings, candidates, reviews: list } = await ask(reviews.list, input);
  const { runs: priced } = await ask(runs.list, input);
  return (
    <>
      {may.ask && (
        <AskForReview
          workspaceId={workspaceId}
          settings={settings}
          candidates={candidates}
          runs={priced.map(({ id, number, isCurrent }) => ({ id, number, isCurrent }))}
        />
      )}
      <ReviewList workspaceId={workspaceId} dealId={dealId} reviews={list} mayAsk={may.ask} />
    </>
  );
}
