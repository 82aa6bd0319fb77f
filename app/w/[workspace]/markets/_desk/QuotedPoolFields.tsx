"use client";

import { Button, Fieldset, Group, NativeSelect, Stack, Text, TextInput } from "@mantine/core";
import type { QuotedPoolText } from "@/lib/markets/form";
import { type FieldsProps, problemAt } from "./fields";
import { QuotesGrid } from "./QuotesGrid";
import { quoteProblems } from "./quoteProblems";

/** Pools whose tranches are quoted: each with its quotes in a grid. */
export function QuotedPoolFields({
  form,
  problems,
  isReadOnly,
  onChange,
  pools,
}: FieldsProps & { pools: readonly { id: string; name: string }[] }) {
  const set = (i: number, part: Partial<QuotedPoolText>) =>
    onChange({ quotedPools: form.quotedPools.map((row, k) => (k === i ? { ...row, ...part } : row)) });
  const add = () => {
    const key = `Q${Date.now().toString(36)}`;
    onChange({
      quotedPools: [...form.quotedPools, { key, name: "", poolId: pools[0]?.id ?? "", quotes: "" }],
    });
  };
  const isEven = form.scheduleKind === "even";
  return (
    <Fieldset legend="Quoted pools">
      <Stack gap="md">
        {form.quotedPools.length === 0 && (
          <Text size="sm" c="dimmed">
            None. Tranche quotes of a pool give a base correlation curve that deals of this market can take.
          </Text>
        )}
        {form.quotedPools.map((row, i) => {
          const at = `content.quotedPools.${i}`;
          return (
            <Stack key={row.key} gap="xs">
              <Group align="end" grow>
                <TextInput
                  label="Name of the quotes"
                  value={row.name}
                  readOnly={isReadOnly}
                  error={problemAt(problems, `${at}.name`)}
                  onChange={(event) => set(i, { name: event.currentTarget.value })}
                />
                <NativeSelect
                  label="Pool quoted"
                  data={pools.map(({ id, name }) => ({ value: id, label: name }))}
                  value={row.poolId}
                  disabled={isReadOnly}
                  error={problemAt(problems, `${at}.poolId`)}
                  onChange={(event) => set(i, { poolId: event.currentTarget.value })}
                />
              </Group>
              <QuotesGrid
                name={row.name}
                text={row.quotes}
                isEven={isEven}
                problems={quoteProblems(row.quotes, isEven, problems, at)}
                isReadOnly={isReadOnly}
                onChange={(quotes) => set(i, { quotes })}
              />
              {!isReadOnly && (
                <Group>
                  <Button
                    size="compact-xs"
                    variant="default"
                    onClick={() => onChange({ quotedPools: form.quotedPools.filter((_, k) => k !== i) })}
                  >
                    Remove these quotes
                  </Button>
                </Group>
              )}
            </Stack>
          );
        })}
        {!isReadOnly && (
          <Group>
            <Button size="compact-sm" variant="default" onClick={add} disabled={pools.length === 0}>
              Add a quoted pool
            </Button>
          </Group>
        )}
      </Stack>
    </Fieldset>
  );
}
