"use client";

import { Alert, Button, Group, Table, Text } from "@mantine/core";
import type { MarketForm } from "@/lib/markets/form";

const labels: Record<keyof MarketForm, string> = {
  name: "Name",
  pricingDate: "Pricing date",
  discountKind: "Curve given as",
  rate: "Flat rate (%)",
  nodes: "Nodes (years: %)",
  scheduleKind: "Payment dates",
  perYear: "Payments a year",
  holidays: "Holidays",
  quotedPools: "Quoted pools",
};

/** Someone saved meanwhile: both versions of every field that differs, and the choice between them. */
export function NewerMarket({
  theirs,
  mine,
  onMine,
  onTheirs,
}: {
  theirs: MarketForm;
  mine: MarketForm;
  onMine: () => void;
  onTheirs: () => void;
}) {
  const differing = (Object.keys(labels) as (keyof MarketForm)[]).filter(
    (field) => textOf(theirs, field) !== textOf(mine, field),
  );
  return (
    <Alert color="orange" role="alert" title="Someone saved a newer version of this market meanwhile">
      <Text size="sm">Nothing you typed is lost. Choose which version goes on, then save.</Text>
      <Table verticalSpacing={2} aria-label="Both versions">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Field</Table.Th>
            <Table.Th>Saved now</Table.Th>
            <Table.Th>Typed here</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {differing.map((field) => (
            <Table.Tr key={field}>
              <Table.Td>{labels[field]}</Table.Td>
              <Table.Td>{textOf(theirs, field) || "—"}</Table.Td>
              <Table.Td>{textOf(mine, field) || "—"}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
      <Group mt="xs">
        <Button size="xs" onClick={onMine}>
          Keep mine on top of the newer version
        </Button>
        <Button size="xs" variant="default" onClick={onTheirs}>
          Take the newer version, drop mine
        </Button>
      </Group>
    </Alert>
  );
}

function textOf(form: MarketForm, field: keyof MarketForm): string {
  const isFlat = form.discountKind === "flat";
  if ((field === "nodes" && isFlat) || (field === "rate" && !isFlat)) return "";
  if (field === "nodes") return form.nodes.map(({ years, rate }) => `${years}: ${rate}`).join(", ");
  if (field === "quotedPools")
    return form.quotedPools.map(({ name, quotes }) => `${name}: ${quotes.replace(/\s+/g, " ")}`).join("; ");
  return form[field].replace(/\s+/g, " ");
}
