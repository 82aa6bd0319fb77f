import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/markets/queries";
import { MarketList } from "./MarketList";

export const metadata = { title: "Markets" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { markets, may } = await ask(queries.list, { workspaceId: workspace });
  return <MarketList workspaceId={workspace} markets={markets} mayEdit={may.edit} />;
}
