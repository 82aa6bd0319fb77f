import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/deals/queries";
import { History } from "../../_history/History";

export const metadata = { title: "History" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const { versions } = await ask(queries.history, { workspaceId, dealId });
  return <History workspaceId={workspaceId} dealId={dealId} versions={versions} />;
}
