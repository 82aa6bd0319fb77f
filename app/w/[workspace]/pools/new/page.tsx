import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/pools/queries";
import { ImportDesk } from "../_import/ImportDesk";

export const metadata = { title: "Import a pool" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { may } = await ask(queries.list, { workspaceId: workspace });
  return <ImportDesk workspaceId={workspace} into={null} mayEdit={may.edit} />;
}
