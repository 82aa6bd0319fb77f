"use client";

import { Button, Group, Stack, Table, Text, TextInput, Title } from "@mantine/core";
import type { ClassText } from "@/lib/deals/form";

const columns = [
  { field: "name", label: "Class", unit: "" },
  { field: "attachment", label: "Attachment", unit: "%" },
  { field: "detachment", label: "Detachment", unit: "%" },
  { field: "running", label: "Coupon", unit: "bp" },
  { field: "upfront", label: "Upfront", unit: "%" },
] as const;

/** The capital structure as typed, a class a row. */
export function ClassesEditor({
  classes,
  isReadOnly,
  problemAt,
  onChange,
}: {
  classes: readonly ClassText[];
  isReadOnly: boolean;
  problemAt(path: string): string | undefined;
  onChange(classes: readonly ClassText[]): void;
}) {
  const set = (i: number, part: Partial<ClassText>) =>
    onChange(classes.map((row, k) => (k === i ? { ...row, ...part } : row)));
  const add = () => {
    const last = classes[classes.length - 1];
    const key = `C${Date.now().toString(36)}`;
    onChange([
      ...classes,
      {
        key,
        id: key,
        name: "",
        attachment: last?.detachment ?? "0",
        detachment: "",
        running: "",
        upfront: "",
      },
    ]);
  };
  return (
    <Stack gap="xs">
      <Title order={2} size="h4">
        Classes
      </Title>
      {classes.length === 0 ? (
        <Text c="dimmed">
          No class yet: without one only the pool and its n-th-to-default contracts are priced.
        </Text>
      ) : (
        <Table.ScrollContainer minWidth={640}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                {columns.map(({ field, label, unit }) => (
                  <Table.Th key={field}>
                    {label}
                    {unit && ` (${unit})`}
                  </Table.Th>
                ))}
                <Table.Th />
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {classes.map((row, i) => (
                <Table.Tr key={row.key}>
                  {columns.map(({ field, label }) => (
                    <Table.Td key={field}>
                      <TextInput
                        size="xs"
                        aria-label={`${label} of class ${i + 1}`}
                        className={field === "name" ? undefined : "figure"}
                        disabled={isReadOnly}
                        value={row[field]}
                        error={
                          problemAt(`content.classes.${i}.${field}`) !== undefined ||
                          (field === "name" && problemAt(`content.classes.${i}`) !== undefined)
                        }
                        onChange={(event) => set(i, { [field]: event.currentTarget.value })}
                      />
                    </Table.Td>
                  ))}
                  <Table.Td>
                    {!isReadOnly && (
                      <Button
                        size="compact-xs"
                        variant="default"
                        aria-label={`Remove class ${i + 1}`}
                        onClick={() => onChange(classes.filter((_, k) => k !== i))}
                      >
                        Remove
                      </Button>
                    )}
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
      {!isReadOnly && (
        <Group>
          <Button size="compact-sm" variant="default" onClick={add}>
            Add a class
          </Button>
        </Group>
      )}
    </Stack>
  );
}
