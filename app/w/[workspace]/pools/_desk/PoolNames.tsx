"use client";

import { Button, Group, NativeSelect, Stack, Text, TextInput } from "@mantine/core";
import { type ReactNode, useState } from "react";
import { Problems } from "@/app/_ui/Problems";
import { UndoButton } from "@/app/_ui/UndoButton";
import { NamesGrid } from "../_grid/NamesGrid";
import { furtherColumns } from "./furtherColumns";
import { Newer } from "./Newer";
import { type KeptPool, type PoolAtHand, statusWords } from "./usePoolDraft";

/** The names of a pool as a spreadsheet: found, edited, pasted, taken back, saved as a whole over no one else's version. */
export function PoolNames({
  pool,
  mayEdit,
  hasName,
  children,
}: {
  pool: PoolAtHand;
  mayEdit: boolean;
  /** Whether the pool's own name is edited here too. */
  hasName: boolean;
  children?: ReactNode;
}) {
  const [sought, setSought] = useState("");
  const [undone, setUndone] = useState<KeptPool | null>(null);
  const { base, kept, rows, columns, name, refused, wrong, isDirty, isBehind, isBusy } = pool;
  return (
    <Stack gap="md">
      {isBehind && (
        <Newer
          rows={rows}
          columns={columns}
          savedName={base.name}
          name={name}
          onMine={pool.rebase}
          onTheirs={pool.drop}
        />
      )}
      <Group align="end">
        <TextInput
          label="Find a name"
          size="xs"
          value={sought}
          onChange={(event) => setSought(event.currentTarget.value)}
        />
        {mayEdit && (
          <>
            {hasName && (
              <TextInput
                label="Pool's name"
                size="xs"
                value={name}
                onChange={(event) => pool.rename(event.currentTarget.value)}
                error={refused.find(({ path }) => path === "name")?.message}
              />
            )}
            <NativeSelect
              label="Further column"
              size="xs"
              value=""
              data={[
                { value: "", label: "Choose" },
                ...furtherColumns.map(({ label }, i) => ({ value: `${i}`, label })),
              ]}
              onChange={(event) => {
                const chosen = furtherColumns[Number(event.currentTarget.value)];
                if (chosen) pool.showColumn(chosen.column);
              }}
            />
            <Button size="xs" variant="default" onClick={pool.addRow}>
              Add a row
            </Button>
          </>
        )}
        {children}
      </Group>
      <NamesGrid rows={rows} columns={columns} sought={sought} edits={mayEdit ? pool.edits : null} />
      {mayEdit && (
        <Group>
          <Button onClick={pool.save} loading={isBusy} disabled={!isDirty || wrong.length > 0 || isBehind}>
            {hasName ? "Save" : "Save the pool"}
          </Button>
          <Button.Group>
            <Button variant="default" disabled={!pool.canUndo} onClick={pool.edits.undo} title="Ctrl Z">
              Step back
            </Button>
            <Button variant="default" disabled={!pool.canRedo} onClick={pool.edits.redo} title="Ctrl Y">
              Step forward
            </Button>
          </Button.Group>
          <UndoButton kept={kept} undone={undone} onKept={pool.keep} onUndone={setUndone} />
          <Text size="sm" aria-live="polite" c={wrong.length > 0 ? "var(--mantine-color-error)" : "dimmed"}>
            {statusWords(pool)}
          </Text>
        </Group>
      )}
      <Problems title="The pool was not saved" problems={refused.filter(({ path }) => path !== "name")} />
    </Stack>
  );
}
