import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/activity/queries";
import { Activity } from "./Activity";

export const metadata = { title: "Activity" };

/** What changed in the workspace, newest first, chosen by deal, person and kind. */
export default async function Page({
  params,
  searchParams,
}: {
  params: Promise<{ workspace: string }>;
  searchParams: Promise<{ deal?: string; person?: string; room?: string; before?: string }>;
}) {
  const { workspace: workspaceId } = await params;
  const { deal, person, room, before } = await searchParams;
  const chosen = { dealId: deal || undefined, personId: person || undefined, room: room || undefined };
  const page = await ask(queries.list, {
    workspaceId,
    ...chosen,
    before: before && /^\d+$/.test(before) ? before : undefined,
  });
  const choices = await ask(queries.choices, { workspaceId });
  return <Activity workspaceId={workspaceId} page={page} choices={choices} chosen={chosen} />;
}
