"use client";

import { Table, Text, Title } from "@mantine/core";
import type { InputDifference } from "@/lib/runs/differences";
import styles from "./compare.module.css";

const MOST_SHOWN = 200;

/** Every input in which the two requests differ, as the request has it: decimals and years. */
export function InputDifferences({
  differences,
  nameOf,
}: {
  differences: readonly InputDifference[];
  nameOf(id: string): string;
}) {
  if (differences.length === 0) return <Text c="dimmed">Both runs asked for exactly the same.</Text>;
  const label = ({ part, what }: InputDifference) => {
    const [id = "", ...rest] = what.split(", ");
    return part === "Structure" ? [nameOf(id), ...rest].join(", ") : what;
  };
  return (
    <div>
      <Title order={3} size="h5">
        Inputs that differ ({differences.length})
      </Title>
      <Table.ScrollContainer minWidth={560}>
        <Table fz="sm" verticalSpacing={2}>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Part</Table.Th>
              <Table.Th>What</Table.Th>
              <Table.Th>Earlier (decimals, years)</Table.Th>
              <Table.Th>Later (decimals, years)</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {differences.slice(0, MOST_SHOWN).map((difference) => (
              <Table.Tr key={`${difference.part} ${difference.what}`}>
                <Table.Td>{difference.part}</Table.Td>
                <Table.Td>{label(difference)}</Table.Td>
                <Table.Td className={styles.value}>{inputWords(difference.before)}</Table.Td>
                <Table.Td className={styles.value}>{inputWords(difference.after)}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      {differences.length > MOST_SHOWN && (
        <Text size="sm">… and {differences.length - MOST_SHOWN} more.</Text>
      )}
    </div>
  );
}

function inputWords(value: unknown): string {
  if (value === null || value === undefined) return "—";
  if (typeof value !== "object") return String(value);
  return JSON.stringify(value).replace(/[{}"]/g, "").replace(/,/g, ", ").replace(/:/g, " ");
}
