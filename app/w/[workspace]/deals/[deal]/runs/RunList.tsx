"use client";

import { Badge, Button, Group, Radio, Stack, Table, Text, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Figure } from "@/app/_ui/Figure";
import type { Operations } from "@/lib/operations";
import { roomAddress } from "../../_frame/rooms";

type RunLine = Operations["runs.list"]["output"]["runs"][number];

/** Every run of a deal, newest first; a run never changes. Any two are laid side by side. */
export function RunList({
  workspaceId,
  dealId,
  runs,
  earlier,
  later,
}: {
  workspaceId: string;
  dealId: string;
  runs: readonly RunLine[];
  earlier: string | undefined;
  later: string | undefined;
}) {
  const router = useRouter();
  const [first, setFirst] = useState(earlier ?? runs[1]?.id ?? null);
  const [second, setSecond] = useState(later ?? runs[0]?.id ?? null);
  if (runs.length === 0) {
    return (
      <Text c="dimmed">
        Not priced yet. The button "Price" above makes a run: its request and report are kept for ever.
      </Text>
    );
  }
  const compare = () => {
    const choice = new URLSearchParams({ earlier: first ?? "", later: second ?? "" });
    router.replace(`${roomAddress(workspaceId, dealId, "runs")}?${choice}`, { scroll: false });
  };
  const isPair = first !== null && second !== null && first !== second;
  return (
    <Stack gap="xs">
      <Group justify="space-between">
        <Title order={2} size="h4">
          Runs
        </Title>
        {runs.length > 1 && (
          <Button size="compact-sm" variant="default" disabled={!isPair} onClick={compare}>
            Lay the two chosen side by side
          </Button>
        )}
      </Group>
      <Table.ScrollContainer minWidth={760}>
        <Table verticalSpacing={4} horizontalSpacing={8} fz="sm">
          <Table.Thead>
            <Table.Tr>
              {runs.length > 1 && <Table.Th>Earlier, later</Table.Th>}
              <Table.Th>Run</Table.Th>
              <Table.Th>Deal version</Table.Th>
              <Table.Th>By</Table.Th>
              <Table.Th>When (UTC)</Table.Th>
              <Table.Th ta="right">Took (ms)</Table.Th>
              <Table.Th>Note</Table.Th>
              <Table.Th>Request</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {runs.map((run) => (
              <Table.Tr key={run.id}>
                {runs.length > 1 && (
                  <Table.Td>
                    <Group gap="xs" wrap="nowrap">
                      <Radio
                        size="xs"
                        name="earlier"
                        aria-label={`Run ${run.number} as the earlier one`}
                        checked={first === run.id}
                        onChange={() => setFirst(run.id)}
                      />
                      <Radio
                        size="xs"
                        name="later"
                        aria-label={`Run ${run.number} as the later one`}
                        checked={second === run.id}
                        onChange={() => setSecond(run.id)}
                      />
                    </Group>
                  </Table.Td>
                )}
                <Table.Td>
                  <Link href={roomAddress(workspaceId, dealId, `runs/${run.id}`)}>Run {run.number}</Link>{" "}
                  {run.isCurrent && (
                    <Badge size="xs" variant="outline">
                      stands
                    </Badge>
                  )}
                </Table.Td>
                <Table.Td>{run.dealVersion}</Table.Td>
                <Table.Td>{run.by}</Table.Td>
                <Table.Td>{run.at.slice(0, 16).replace("T", " ")}</Table.Td>
                <Table.Td ta="right">
                  <Figure value={run.milliseconds} />
                </Table.Td>
                <Table.Td>{run.note}</Table.Td>
                <Table.Td>
                  <code title={run.requestHash}>{run.requestHash.slice(0, 12)}</code>
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      <Text size="xs" c="dimmed">
        A run stands while pricing the deal now would ask for exactly the same. Otherwise the deal, its pool
        or its market has changed since.
      </Text>
    </Stack>
  );
}
