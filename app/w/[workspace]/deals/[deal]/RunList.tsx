"use client";

import { Stack, Table, Text, Title } from "@mantine/core";
import Link from "next/link";
import type { Operations } from "@/lib/operations";

type RunLine = Operations["runs.list"]["output"]["runs"][number];

/** Every run of a deal, newest first; a run never changes. */
export function RunList({
  workspaceId,
  dealId,
  runs,
}: {
  workspaceId: string;
  dealId: string;
  runs: readonly RunLine[];
}) {
  return (
    <Stack gap="xs">
      <Title order={2} size="h4">
        Runs
      </Title>
      {runs.length === 0 ? (
        <Text c="dimmed">Not priced yet.</Text>
      ) : (
        <Table.ScrollContainer minWidth={560}>
          <Table verticalSpacing={4}>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Run</Table.Th>
                <Table.Th>Deal version</Table.Th>
                <Table.Th>By</Table.Th>
                <Table.Th>When (UTC)</Table.Th>
                <Table.Th>Note</Table.Th>
                <Table.Th>Request</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {runs.map((run) => (
                <Table.Tr key={run.id}>
                  <Table.Td>
                    <Link href={`/w/${workspaceId}/deals/${dealId}/runs/${run.id}`}>Run {run.number}</Link>
                  </Table.Td>
                  <Table.Td>
                    {run.dealVersion}
                    {run.isCurrent ? "" : " (changed since)"}
                  </Table.Td>
                  <Table.Td>{run.by}</Table.Td>
                  <Table.Td>{run.at.slice(0, 16).replace("T", " ")}</Table.Td>
                  <Table.Td>{run.note}</Table.Td>
                  <Table.Td>
                    <code title={run.requestHash}>{run.requestHash.slice(0, 12)}</code>
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
    </Stack>
  );
}
