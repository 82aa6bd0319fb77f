"use client";

import { Button, Fieldset, Group, NativeSelect, Stack, Text, Textarea, TextInput } from "@mantine/core";
import type { QuotedPoolText } from "@/lib/markets/form";
import { type FieldsProps, problemAt, problemsBelow } from "./fields";

/** Pools whose tranches are quoted: each with its quotes, a line each, as they come from a spreadsheet. */
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
  const first = form.scheduleKind === "even" ? "5" : "2031-12-20";
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
              <Textarea
                label="Quotes, one a line"
                description="Maturity, attachment (%), detachment (%), coupon (bp), upfront (%); may be pasted from a spreadsheet"
                placeholder={`${first}\t0\t3\t500\t41,5`}
                autosize
                minRows={4}
                maxRows={16}
                classNames={{ input: "figure" }}
                value={row.quotes}
                readOnly={isReadOnly}
                error={problemsBelow(problems, `${at}.maturities`)}
                onChange={(event) => set(i, { quotes: event.currentTarget.value })}
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
