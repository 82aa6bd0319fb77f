"use client";

import { Alert, Button, Group, Table, Text } from "@mantine/core";
import type { DraftRow } from "@/lib/pools/draft";
import { cellText, type GridColumn, valueIn } from "@/lib/pools/grid";

const MOST_SHOWN = 40;

/** Someone saved meanwhile: what is typed here beside what is saved now, and the choice between the two. */
export function Newer({
  rows,
  columns,
  savedName,
  name,
  onMine,
  onTheirs,
}: {
  rows: readonly DraftRow[];
  columns: readonly GridColumn[];
  savedName: string;
  name: string;
  onMine: () => void;
  onTheirs: () => void;
}) {
  const cells = rows.flatMap((row) =>
    columns
      .filter((column) => row.typed[column.key] !== undefined)
      .map((column) => ({
        row: row.saved?.id ?? "not saved any more, or added here",
        column: column.header,
        theirs: row.saved ? cellText(valueIn(row.saved, column), column.unit) : "",
        mine: row.typed[column.key] ?? "",
      })),
  );
  if (name !== savedName) cells.unshift({ row: "the pool", column: "Name", theirs: savedName, mine: name });
  return (
    <Alert color="orange" role="alert" title="Someone saved a newer version of this pool meanwhile">
      <Text size="sm">Nothing you typed is lost. Choose what goes on top, then save.</Text>
      <Table verticalSpacing={2} aria-label="Both versions">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Name</Table.Th>
            <Table.Th>Column</Table.Th>
            <Table.Th>Saved now</Table.Th>
            <Table.Th>Typed here</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {cells.slice(0, MOST_SHOWN).map(({ row, column, theirs, mine }) => (
            <Table.Tr key={`${row} ${column} ${mine}`}>
              <Table.Td>{row}</Table.Td>
              <Table.Td>{column}</Table.Td>
              <Table.Td>{theirs || "—"}</Table.Td>
              <Table.Td>{mine || "—"}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
      {cells.length > MOST_SHOWN && <Text size="sm">… and {cells.length - MOST_SHOWN} more cells.</Text>}
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
