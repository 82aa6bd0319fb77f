import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/pools/queries";
import { PoolDesk } from "./PoolDesk";

export const metadata = { title: "Pool" };

export default async function Page({ params }: { params: Promise<{ workspace: string; pool: string }> }) {
  const { workspace, pool: poolId } = await params;
  const pool = await ask(queries.open, { workspaceId: workspace, poolId });
  return <PoolDesk key={`${pool.id} ${pool.version}`} workspaceId={workspace} pool={pool} />;
}
