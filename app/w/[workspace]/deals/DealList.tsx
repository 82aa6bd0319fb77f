"use client";

import { Badge, Button, Group, Stack, Table, Text, Title } from "@mantine/core";
import Link from "next/link";
import type { Operations } from "@/lib/operations";

type DealLine = Operations["deals.list"]["output"]["deals"][number];

/** All deals of a workspace with the state of their last run. */
export function DealList({
  workspaceId,
  deals,
  mayEdit,
}: {
  workspaceId: string;
  deals: readonly DealLine[];
  mayEdit: boolean;
}) {
  const home = `/w/${workspaceId}/deals`;
  return (
    <Stack gap="md">
      <Group justify="space-between">
        <Title order={1}>Deals</Title>
        {mayEdit && (
          <Button component={Link} href={`${home}/new`}>
            New deal
          </Button>
        )}
      </Group>
      {deals.length === 0 ? (
        <Text>There is no deal yet. A deal needs a pool and a market first.</Text>
      ) : (
        <Table.ScrollContainer minWidth={620}>
          <Table highlightOnHover verticalSpacing="xs">
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Deal</Table.Th>
                <Table.Th>Pool</Table.Th>
                <Table.Th>Market</Table.Th>
                <Table.Th ta="right">Classes</Table.Th>
                <Table.Th>Last run</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {deals.map((deal) => (
                <Table.Tr key={deal.id}>
                  <Table.Td>
                    <Link href={`${home}/${deal.id}`}>{deal.name}</Link>{" "}
                    {deal.isArchived && <Badge variant="default">Archived</Badge>}
                  </Table.Td>
                  <Table.Td>{deal.pool}</Table.Td>
                  <Table.Td>{deal.market}</Table.Td>
                  <Table.Td ta="right">{deal.classes}</Table.Td>
                  <Table.Td>
                    {deal.lastRun
                      ? `${deal.lastRun.number}, ${deal.lastRun.at.slice(0, 10)}${deal.lastRun.isCurrent ? "" : " (deal changed since)"}`
                      : "none"}
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
