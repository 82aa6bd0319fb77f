"use client";

import { Button, Group, Text } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { type Answer, call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { saveFile } from "@/app/_ui/saveFile";
import type { Problem } from "@/lib/platform/errors";
import { poolCsv } from "@/lib/pools/export";
import type { OpenPool } from "./openPool";

/** What can be done with a pool as a whole. Export gives what is saved. */
export function PoolActions({
  workspaceId,
  pool,
  isDirty,
}: {
  workspaceId: string;
  pool: OpenPool;
  isDirty: boolean;
}) {
  const router = useRouter();
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const here = { workspaceId, poolId: pool.id };
  const go = <Output,>(answer: Answer<Output>, onDone: (output: Output) => void) =>
    answer.ok ? onDone(answer.output) : setRefused(answer.problems);
  const copy = async () =>
    go(await call("pools.copy", { ...here, name: `Copy of ${pool.name}`.slice(0, 120) }), ({ poolId }) =>
      router.push(`/w/${workspaceId}/pools/${poolId}`),
    );
  const archive = async () =>
    go(await call("pools.archive", { ...here, archived: !pool.isArchived }), () => router.refresh());
  return (
    <div>
      <Group gap="xs">
        <Button variant="default" onClick={() => saveFile(`${pool.name}.csv`, poolCsv(pool.names))}>
          Export CSV
        </Button>
        {pool.may.edit && (
          <>
            {!pool.isArchived && (
              <Button
                variant="default"
                component={Link}
                href={`/w/${workspaceId}/pools/${pool.id}/import`}
                {...(isDirty ? { "data-disabled": true } : {})}
              >
                Import names
              </Button>
            )}
            <Button variant="default" onClick={copy}>
              Copy
            </Button>
            <Button variant="default" onClick={archive}>
              {pool.isArchived ? "Restore" : "Archive"}
            </Button>
          </>
        )}
      </Group>
      {pool.deals.length > 0 && (
        <Text size="sm" c="dimmed">
          Used by{" "}
          {pool.deals.map(({ id, name }, i) => (
            <span key={id}>
              {i > 0 && ", "}
              <Link href={`/w/${workspaceId}/deals/${id}`}>{name}</Link>
            </span>
          ))}
        </Text>
      )}
      <Problems title="That was not done" problems={refused} />
    </div>
  );
}
