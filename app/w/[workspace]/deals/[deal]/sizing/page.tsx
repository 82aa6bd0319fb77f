import { ask } from "@/app/_ui/ask";
import { queries as alternatives } from "@/lib/alternatives/queries";
import { Sizing } from "../../_sizing/Sizing";

export const metadata = { title: "Sizing" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const { alternatives: kept } = await ask(alternatives.list, { workspaceId, dealId });
  return <Sizing kept={kept} />;
}
