"use client";

import { Badge, Button, Group, Stack, Switch, Table, Text, TextInput, Title } from "@mantine/core";
import Link from "next/link";
import { useState } from "react";
import { Figure } from "@/app/_ui/Figure";
import type { Operations } from "@/lib/operations";

type PoolLine = Operations["pools.list"]["output"]["pools"][number];

/** All pools of a workspace; archived ones on request. */
export function PoolList({
  workspaceId,
  pools,
  mayEdit,
}: {
  workspaceId: string;
  pools: readonly PoolLine[];
  mayEdit: boolean;
}) {
  const [sought, setSought] = useState("");
  const [isWithArchived, setWithArchived] = useState(false);
  const shown = pools.filter(
    (pool) =>
      (isWithArchived || !pool.isArchived) && pool.name.toLowerCase().includes(sought.trim().toLowerCase()),
  );
  const home = `/w/${workspaceId}/pools`;
  return (
    <Stack gap="md">
      <Group justify="space-between">
        <Title order={1}>Pools</Title>
        {mayEdit && (
          <Button component={Link} href={`${home}/new`}>
            Import a pool
          </Button>
        )}
      </Group>
      {pools.length === 0 ? (
        <Text>
          There is no pool yet.{" "}
          {mayEdit
            ? "Import one from a file, or paste it from a spreadsheet."
            : "A structurer can import one."}
        </Text>
      ) : (
        <>
          <Group>
            <TextInput
              aria-label="Find a pool"
              placeholder="Find a pool"
              value={sought}
              onChange={(event) => setSought(event.currentTarget.value)}
            />
            <Switch
              label="With archived"
              checked={isWithArchived}
              onChange={(event) => setWithArchived(event.currentTarget.checked)}
            />
          </Group>
          <Table.ScrollContainer minWidth={560}>
            <Table highlightOnHover verticalSpacing="xs">
              <Table.Thead>
                <Table.Tr>
                  <Table.Th>Pool</Table.Th>
                  <Table.Th ta="right">Names</Table.Th>
                  <Table.Th ta="right">Notional</Table.Th>
                  <Table.Th ta="right">Deals</Table.Th>
                  <Table.Th>Saved</Table.Th>
                </Table.Tr>
              </Table.Thead>
              <Table.Tbody>
                {shown.map((pool) => (
                  <PoolRow key={pool.id} pool={pool} href={`${home}/${pool.id}`} />
                ))}
              </Table.Tbody>
            </Table>
          </Table.ScrollContainer>
          {shown.length === 0 && <Text>No pool fits. Clear what is sought, or show archived ones.</Text>}
        </>
      )}
    </Stack>
  );
}

function PoolRow({ pool, href }: { pool: PoolLine; href: string }) {
  return (
    <Table.Tr>
      <Table.Td>
        <Link href={href}>{pool.name}</Link> {pool.isArchived && <Badge variant="default">Archived</Badge>}
      </Table.Td>
      <Table.Td ta="right">{pool.names}</Table.Td>
      <Table.Td ta="right">
        <Figure value={pool.notional} unit="money" /> {pool.currency}
      </Table.Td>
      <Table.Td ta="right">{pool.deals}</Table.Td>
      <Table.Td>{pool.updatedAt.slice(0, 10)}</Table.Td>
    </Table.Tr>
  );
}
