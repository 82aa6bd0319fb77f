import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/workspaces/queries";
import { People } from "./People";

export const metadata = { title: "People" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  return <People workspaceId={workspace} people={await ask(queries.people, { workspaceId: workspace })} />;
}
