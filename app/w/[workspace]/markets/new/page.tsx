import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/markets/queries";
import { MarketDesk } from "../_desk/MarketDesk";

export const metadata = { title: "New market" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { may } = await ask(queries.list, { workspaceId: workspace });
  const today = new Date().toISOString().slice(0, 10);
  return <MarketDesk workspaceId={workspace} market={null} today={today} mayEdit={may.edit} />;
}
