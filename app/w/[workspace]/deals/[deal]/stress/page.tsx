import { ask } from "@/app/_ui/ask";
import { queries as jobs } from "@/lib/jobs/queries";
import { queries as scenarios } from "@/lib/scenarios/queries";
import { Stress } from "../../_stress/Stress";

export const metadata = { title: "Stress" };

export default async function Page({ params }: { params: Promise<{ workspace: string; deal: string }> }) {
  const { workspace: workspaceId, deal: dealId } = await params;
  const work = await ask(jobs.list, { workspaceId, dealId });
  const kept = await ask(scenarios.list, { workspaceId });
  return <Stress work={work} kept={kept} />;
}
