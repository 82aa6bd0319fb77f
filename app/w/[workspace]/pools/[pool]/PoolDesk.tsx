"use client";

import { Badge, Group, Stack, Text, Title } from "@mantine/core";
import Link from "next/link";
import { PoolNames } from "../_desk/PoolNames";
import { usePoolDraft } from "../_desk/usePoolDraft";
import type { OpenPool } from "./openPool";
import { PoolActions } from "./PoolActions";
import { PoolSummary } from "./PoolSummary";

/** One pool: its names to be looked at, sorted, found and edited; saved as a whole, over no one else's version. */
export function PoolDesk({ workspaceId, pool }: { workspaceId: string; pool: OpenPool }) {
  const draft = usePoolDraft(workspaceId, pool);
  return (
    <Stack gap="md">
      <Group justify="space-between" align="end">
        <div>
          <Link href={`/w/${workspaceId}/pools`}>Pools</Link>
          <Title order={1}>
            {draft.base.name} {pool.isArchived && <Badge variant="default">Archived</Badge>}
          </Title>
        </div>
        <PoolActions workspaceId={workspaceId} pool={pool} isDirty={draft.isDirty} />
      </Group>
      {!pool.may.edit && <Text c="dimmed">You can read this pool; a structurer can change it.</Text>}
      <PoolSummary names={draft.settledNames} currency={draft.base.currency} />
      <PoolNames pool={draft} mayEdit={pool.may.edit && !pool.isArchived} hasName />
    </Stack>
  );
}
