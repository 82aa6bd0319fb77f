"use client";

import { Button, Group, Select } from "@mantine/core";
import { useState } from "react";
import type { TypedCell } from "@/lib/pools/draft";
import { type CreditColumn, gridColumns } from "@/lib/pools/grid";
import type { PoolAtHand } from "../../pools/_desk/usePoolDraft";

const status: CreditColumn = { field: "status", years: null };

/** What is often tried with one name: it defaults at its recovery, or goes out and a new one comes in. */
export function Substitution({
  pool,
  onType,
}: {
  pool: PoolAtHand;
  onType(cells: readonly TypedCell[]): void;
}) {
  const [chosen, setChosen] = useState<string | null>(null);
  const row = pool.rows.find(({ key }) => key === chosen) ?? null;
  const label = (key: string) => {
    const name = pool.rows.find((one) => one.key === key);
    const shown = name?.name ?? name?.saved;
    return shown ? `${shown.id}${shown.name ? `, ${shown.name}` : ""}` : "an added row";
  };
  const markDefault = () => {
    if (!row) return;
    const { names, currency } = pool.base;
    const column = gridColumns(names, currency, [status]).find(({ field }) => field === "status");
    if (column) onType([{ row, column, text: "defaulted" }]);
  };
  const replace = () => {
    if (!row) return;
    pool.edits.remove(row);
    setChosen(null);
  };
  return (
    <Group align="end" gap="xs">
      <Select
        size="xs"
        label="One name"
        placeholder="Choose a name"
        searchable
        clearable
        limit={50}
        value={chosen}
        onChange={setChosen}
        data={pool.rows.map(({ key }) => ({ value: key, label: label(key) }))}
      />
      <Button size="xs" variant="default" disabled={!row} onClick={markDefault}>
        Let it default
      </Button>
      <Button size="xs" variant="default" disabled={!row} onClick={replace}>
        Take it out
      </Button>
    </Group>
  );
}
