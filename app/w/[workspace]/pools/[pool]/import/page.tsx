import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/pools/queries";
import { ImportDesk } from "../../_import/ImportDesk";

export const metadata = { title: "Import names" };

export default async function Page({ params }: { params: Promise<{ workspace: string; pool: string }> }) {
  const { workspace, pool } = await params;
  const { id, name, currency, version, may } = await ask(queries.open, {
    workspaceId: workspace,
    poolId: pool,
  });
  return <ImportDesk workspaceId={workspace} into={{ id, name, currency, version }} mayEdit={may.edit} />;
}
