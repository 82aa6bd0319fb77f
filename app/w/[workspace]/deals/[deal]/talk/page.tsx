import { ask } from "@/app/_ui/ask";
import { queries as discussion } from "@/lib/discussion/queries";
import { queries as notices } from "@/lib/notices/queries";
import { Talk } from "../../_talk/Talk";

export const metadata = { title: "Talk" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const talk = await ask(discussion.list, { workspaceId, dealId });
  const { state } = await ask(notices.followed, { workspaceId, dealId });
  return <Talk workspaceId={workspaceId} dealId={dealId} talk={talk} follow={state} />;
}
