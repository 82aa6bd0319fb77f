import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/pools/queries";
import { PoolList } from "./PoolList";

export const metadata = { title: "Pools" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { pools, may } = await ask(queries.list, { workspaceId: workspace });
  return <PoolList workspaceId={workspace} pools={pools} mayEdit={may.edit} />;
}
