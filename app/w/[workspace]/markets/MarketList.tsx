"use client";

import { Badge, Button, Group, Stack, Switch, Table, Text, Title } from "@mantine/core";
import Link from "next/link";
import { useState } from "react";
import type { Operations } from "@/lib/operations";

type MarketLine = Operations["markets.list"]["output"]["markets"][number];

const curveWords = { flat: "flat rate", zero: "zero rates", par: "par swap rates" };

/** All markets of a workspace, newest save first; archived ones on request. */
export function MarketList({
  workspaceId,
  markets,
  mayEdit,
}: {
  workspaceId: string;
  markets: readonly MarketLine[];
  mayEdit: boolean;
}) {
  const [isWithArchived, setWithArchived] = useState(false);
  const shown = markets.filter((market) => isWithArchived || !market.isArchived);
  const home = `/w/${workspaceId}/markets`;
  return (
    <Stack gap="md">
      <Group justify="space-between">
        <Title order={1}>Markets</Title>
        {mayEdit && (
          <Button component={Link} href={`${home}/new`}>
            New market
          </Button>
        )}
      </Group>
      {markets.length === 0 ? (
        <Text>
          There is no market yet: a pricing date with its discount curve, payment dates and holidays, shared
          by deals.
        </Text>
      ) : (
        <>
          <Switch
            label="With archived"
            checked={isWithArchived}
            onChange={(event) => setWithArchived(event.currentTarget.checked)}
          />
          <Table.ScrollContainer minWidth={560}>
            <Table highlightOnHover verticalSpacing="xs">
              <Table.Thead>
                <Table.Tr>
                  <Table.Th>Market</Table.Th>
                  <Table.Th>Pricing date</Table.Th>
                  <Table.Th>Discount curve</Table.Th>
                  <Table.Th>Payments</Table.Th>
                  <Table.Th ta="right">Deals</Table.Th>
                </Table.Tr>
              </Table.Thead>
              <Table.Tbody>
                {shown.map((market) => (
                  <MarketRow key={market.id} market={market} href={`${home}/${market.id}`} />
                ))}
              </Table.Tbody>
            </Table>
          </Table.ScrollContainer>
        </>
      )}
    </Stack>
  );
}

function MarketRow({ market, href }: { market: MarketLine; href: string }) {
  const { discount, schedule } = market.content;
  return (
    <Table.Tr>
      <Table.Td>
        <Link href={href}>{market.name}</Link>{" "}
        {market.isArchived && <Badge variant="default">Archived</Badge>}
      </Table.Td>
      <Table.Td>{market.pricingDate}</Table.Td>
      <Table.Td>{curveWords[discount.kind]}</Table.Td>
      <Table.Td>
        {schedule.kind === "even" ? `${schedule.perYear} a year, even` : "standard quarterly dates"}
      </Table.Td>
      <Table.Td ta="right">{market.deals}</Table.Td>
    </Table.Tr>
  );
}
