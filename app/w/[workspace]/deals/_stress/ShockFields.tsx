"use client";

import {
  ActionIcon,
  Button,
  Group,
  MultiSelect,
  NativeSelect,
  SegmentedControl,
  SimpleGrid,
  Text,
  TextInput,
} from "@mantine/core";
import { useMemo } from "react";
import type { Problem } from "@/lib/platform/errors";
import type { NameInput } from "@/lib/pricing/request";
import type { SectorText, ShockForm } from "@/lib/scenarios/form";

const MOST_LISTED = 100;

/** The common shock: market-wide moves, moves of single sectors, and names that default today. */
export function ShockFields({
  shock,
  problems,
  pool,
  onChange,
}: {
  shock: ShockForm;
  problems: readonly Problem[];
  pool: readonly NameInput[];
  onChange(shock: ShockForm): void;
}) {
  const errorAt = (path: string) => problems.find((problem) => problem.path === path)?.message;
  const sectors = useMemo(
    () => [...new Set(pool.map(({ sector }) => sector ?? ""))].filter((sector) => sector !== "").sort(),
    [pool],
  );
  const field = (key: "wider" | "shift" | "correlation" | "recovery", label: string) => (
    <TextInput
      size="xs"
      label={label}
      placeholder="0"
      value={shock[key]}
      error={errorAt(key)}
      onChange={(event) => onChange({ ...shock, [key]: event.currentTarget.value })}
    />
  );
  const unused = sectors.filter((sector) => !shock.sectors.some((row) => row.sector === sector));
  const setSector = (i: number, part: Partial<SectorText>) =>
    onChange({ ...shock, sectors: shock.sectors.map((row, k) => (k === i ? { ...row, ...part } : row)) });
  const addSector = () => {
    const sector = unused[0]!;
    const row = { key: `${sector} ${shock.sectors.length}`, sector, wider: "", recovery: "" };
    onChange({ ...shock, sectors: [...shock.sectors, row] });
  };
  return (
    <>
      <SimpleGrid cols={{ base: 2, sm: 4 }} spacing="xs">
        {field("wider", "Spreads wider by (%)")}
        {field("shift", "Spreads wider by (bp)")}
        {field("correlation", "Correlation up by (points)")}
        {field("recovery", "Recovery up by (points)")}
      </SimpleGrid>
      {shock.sectors.map((row, i) => (
        <Group key={row.key} gap="xs" align="end" mt="xs">
          <NativeSelect
            size="xs"
            label="Sector"
            data={[row.sector, ...unused]}
            value={row.sector}
            onChange={(event) => setSector(i, { sector: event.currentTarget.value })}
          />
          <TextInput
            size="xs"
            label="Its spreads wider by (%)"
            placeholder="0"
            value={row.wider}
            error={errorAt(`sectors.${i}.wider`)}
            onChange={(event) => setSector(i, { wider: event.currentTarget.value })}
          />
          <TextInput
            size="xs"
            label="Its recovery up by (points)"
            placeholder="0"
            value={row.recovery}
            error={errorAt(`sectors.${i}.recovery`)}
            onChange={(event) => setSector(i, { recovery: event.currentTarget.value })}
          />
          <ActionIcon
            variant="default"
            size={30}
            aria-label={`Leave ${row.sector} alone`}
            onClick={() => onChange({ ...shock, sectors: shock.sectors.filter((_, k) => k !== i) })}
          >
            ×
          </ActionIcon>
        </Group>
      ))}
      <Group gap="sm" mt="xs" align="end">
        <div>
          <Text size="xs" fw={500} mb={2}>
            Defaults today
          </Text>
          <SegmentedControl
            size="xs"
            aria-label="Defaults today"
            value={shock.defaults}
            onChange={(value) => onChange({ ...shock, defaults: value as ShockForm["defaults"] })}
            data={[
              { value: "none", label: "None" },
              { value: "widest", label: "Widest names" },
              { value: "names", label: "Chosen names" },
            ]}
          />
        </div>
        {shock.defaults === "widest" && (
          <TextInput
            size="xs"
            w={110}
            label="How many"
            value={shock.count}
            error={errorAt("count")}
            onChange={(event) => onChange({ ...shock, count: event.currentTarget.value })}
          />
        )}
        {shock.defaults === "names" && (
          <MultiSelect
            size="xs"
            miw={260}
            maw={620}
            label="Names that default"
            placeholder={shock.names.length === 0 ? "Type to find a name" : ""}
            searchable
            limit={MOST_LISTED}
            data={namesFor(pool, shock.names)}
            value={[...shock.names]}
            onChange={(names) => onChange({ ...shock, names })}
          />
        )}
        {unused.length > 0 && (
          <Button size="xs" variant="default" onClick={addSector}>
            Shock a sector
          </Button>
        )}
      </Group>
    </>
  );
}

/** The pool's names for choosing, and those chosen that the pool does not have (any more). */
function namesFor(pool: readonly NameInput[], chosen: readonly string[]) {
  const known = new Set(pool.map(({ id }) => id));
  const missing = chosen.filter((id) => !known.has(id));
  return [
    ...pool.map(({ id, name }) => ({ value: id, label: name ? `${id} · ${name}` : id })),
    ...missing.map((id) => ({ value: id, label: `${id}, not in this pool` })),
  ];
}
