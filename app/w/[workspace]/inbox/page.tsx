import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/notices/queries";
import { Inbox } from "./Inbox";

export const metadata = { title: "Inbox" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace: workspaceId } = await params;
  return <Inbox workspaceId={workspaceId} inbox={await ask(queries.list, { workspaceId })} />;
}
