"use client";

import { Button, Table, TextInput } from "@mantine/core";
import { Figure } from "@/app/_ui/Figure";
import {
  blankTarget,
  limitFields,
  placingWords,
  type SizingForm,
  type TargetText,
} from "@/lib/alternatives/sizingForm";
import type { SizedClass } from "@/lib/pricing/sizing";
import styles from "./sizing.module.css";

/** The classes from the top with their limits, and beside each where it came to lie and why. */
export function TargetTable({
  form,
  sized,
  left,
  isPlaced,
  errorAt,
  onChange,
}: {
  form: SizingForm;
  sized: readonly SizedClass[];
  left: number | null;
  isPlaced: boolean;
  errorAt(path: string): string | undefined;
  onChange(form: SizingForm): void;
}) {
  const setRow = (i: number, part: Partial<TargetText>) =>
    onChange({ ...form, rows: form.rows.map((row, k) => (k === i ? { ...row, ...part } : row)) });
  const add = () => {
    const key = crypto.randomUUID().slice(0, 8);
    onChange({ ...form, rows: [...form.rows, blankTarget(key, `Class ${form.rows.length + 1}`)] });
  };
  return (
    <>
      <Table.ScrollContainer minWidth={980}>
        <Table verticalSpacing={3} horizontalSpacing={6} className={styles.targets} aria-label="Targets">
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Class, from the top</Table.Th>
              {limitFields.map(({ kind, label, unit }) => (
                <Table.Th key={kind} ta="right">
                  {label} ({unit})
                </Table.Th>
              ))}
              <Table.Th ta="right">Attachment (%)</Table.Th>
              <Table.Th ta="right">Detachment (%)</Table.Th>
              <Table.Th>Why there</Table.Th>
              <Table.Th aria-label="What can be done" className="screenOnly" />
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {form.rows.map((row, i) => {
              const found = sized.find(({ id }) => id === row.key);
              return (
                <Table.Tr key={row.key} data-impossible={(isPlaced && !found?.ok) || undefined}>
                  <Table.Td>
                    <TextInput
                      size="xs"
                      aria-label={`Name of class ${i + 1} from the top`}
                      value={row.name}
                      error={errorAt(`rows.${i}.name`)}
                      onChange={(event) => setRow(i, { name: event.currentTarget.value })}
                    />
                  </Table.Td>
                  {limitFields.map(({ kind, label, unit }) => (
                    <Table.Td key={kind}>
                      <TextInput
                        size="xs"
                        classNames={{ input: "numberInput" }}
                        aria-label={`${row.name}: ${label} (${unit})`}
                        placeholder="no limit"
                        value={row[kind]}
                        error={errorAt(`rows.${i}.${kind}`)}
                        onChange={(event) => setRow(i, { [kind]: event.currentTarget.value })}
                      />
                      {isPlaced && found?.ok && (
                        <div className={styles.came}>
                          comes to{" "}
                          <Figure
                            value={found.figures[kind]}
                            unit={kind === "parSpread" ? "basisPoints" : "percent"}
                          />
                          {found.binding === kind && " ◂ binds"}
                        </div>
                      )}
                    </Table.Td>
                  ))}
                  <Table.Td ta="right">
                    {isPlaced && found?.ok && <Figure value={found.attachment} unit="percent" />}
                  </Table.Td>
                  <Table.Td ta="right">
                    {isPlaced && found && <Figure value={found.detachment} unit="percent" />}
                  </Table.Td>
                  <Table.Td className={styles.why}>{isPlaced && placingWords(found)}</Table.Td>
                  <Table.Td className="screenOnly">
                    <Button
                      size="compact-xs"
                      variant="default"
                      aria-label={`Leave ${row.name} out`}
                      onClick={() => onChange({ ...form, rows: form.rows.filter((_, k) => k !== i) })}
                    >
                      Leave out
                    </Button>
                  </Table.Td>
                </Table.Tr>
              );
            })}
            <Table.Tr>
              <Table.Td>
                <TextInput
                  size="xs"
                  aria-label="Name of the class that takes what is left"
                  value={form.rest.name}
                  onChange={(event) =>
                    onChange({ ...form, rest: { ...form.rest, name: event.currentTarget.value } })
                  }
                />
              </Table.Td>
              <Table.Td colSpan={limitFields.length} c="dimmed" ta="center">
                takes what is left
              </Table.Td>
              <Table.Td ta="right">
                {isPlaced && left !== null && <Figure value={0} unit="percent" />}
              </Table.Td>
              <Table.Td ta="right">
                {isPlaced && left !== null && <Figure value={left} unit="percent" />}
              </Table.Td>
              <Table.Td className={styles.why}>
                {isPlaced && left === 0 && "Nothing is left for it."}
              </Table.Td>
              <Table.Td className="screenOnly" />
            </Table.Tr>
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      <Button mt={4} className="screenOnly" size="compact-sm" variant="default" onClick={add}>
        Add a class above what is left
      </Button>
    </>
  );
}
