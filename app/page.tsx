import { redirect } from "next/navigation";
import { queries } from "@/lib/workspaces/queries";
import { ask } from "./_ui/ask";
import { WorkspaceChoice } from "./WorkspaceChoice";

export const metadata = { title: "Workspaces" };

export default async function Page({ searchParams }: { searchParams: Promise<{ all?: string }> }) {
  const { workspaces } = await ask(queries.mine, {});
  const { all } = await searchParams;
  if (workspaces.length === 1 && all === undefined) redirect(`/w/${workspaces[0]!.id}`);
  return <WorkspaceChoice workspaces={workspaces} />;
}
