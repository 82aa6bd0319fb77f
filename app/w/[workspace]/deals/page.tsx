import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/deals/queries";
import { DealList } from "./DealList";

export const metadata = { title: "Deals" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { deals, may } = await ask(queries.list, { workspaceId: workspace });
  return <DealList workspaceId={workspace} deals={deals} mayEdit={may.edit} />;
}
