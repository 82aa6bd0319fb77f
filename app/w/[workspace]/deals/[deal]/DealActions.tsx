"use client";

import { Button, Group, Stack, TextInput } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

type OpenDeal = Operations["deals.open"]["output"];

/** Price the saved version, copy, archive: what this member may do with the deal. */
export function DealActions({ workspaceId, deal }: { workspaceId: string; deal: OpenDeal }) {
  const router = useRouter();
  const [note, setNote] = useState("");
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [isPricing, setPricing] = useState(false);
  const price = async () => {
    setPricing(true);
    setProblems([]);
    const answer = await call("runs.price", { workspaceId, dealId: deal.id, version: deal.version, note });
    setPricing(false);
    if (answer.ok) router.push(`/w/${workspaceId}/deals/${deal.id}/runs/${answer.output.runId}`);
    else setProblems(answer.problems);
  };
  const copy = async () => {
    const answer = await call("deals.copy", {
      workspaceId,
      dealId: deal.id,
      name: `${deal.name} (copy)`.slice(0, 120),
    });
    if (answer.ok) router.push(`/w/${workspaceId}/deals/${answer.output.dealId}`);
    else setProblems(answer.problems);
  };
  const archive = async () => {
    const answer = await call("deals.archive", { workspaceId, dealId: deal.id, archived: !deal.isArchived });
    if (!answer.ok) setProblems(answer.problems);
    router.refresh();
  };
  return (
    <Stack gap="xs">
      <Group align="end">
        {deal.may.work && (
          <>
            <TextInput
              size="xs"
              aria-label="Note for the run"
              placeholder="Note for the run"
              maxLength={500}
              value={note}
              onChange={(event) => setNote(event.currentTarget.value)}
            />
            <Button onClick={price} loading={isPricing}>
              Price version {deal.version}
            </Button>
          </>
        )}
        {deal.may.edit && (
          <>
            <Button variant="default" onClick={copy}>
              Copy
            </Button>
            <Button variant="default" onClick={archive}>
              {deal.isArchived ? "Restore" : "Archive"}
            </Button>
          </>
        )}
      </Group>
      <Problems title="Nothing was priced" problems={problems} />
    </Stack>
  );
}
