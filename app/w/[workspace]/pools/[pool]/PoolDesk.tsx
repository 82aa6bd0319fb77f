"use client";

import { Badge, Button, Group, NativeSelect, Stack, Text, TextInput, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useCallback, useDeferredValue, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { UndoButton } from "@/app/_ui/UndoButton";
import { useKept } from "@/app/_ui/useKept";
import type { Problem } from "@/lib/platform/errors";
import {
  applyDraft,
  type DraftRow,
  emptyDraft,
  isEmpty,
  type PoolDraft,
  type TypedCell,
  typedColumns,
  withAdded,
  withRemoved,
  withTypedCells,
} from "@/lib/pools/draft";
import { type CreditColumn, gridColumns } from "@/lib/pools/grid";
import type { NameInput } from "@/lib/pricing/request";
import { NamesGrid } from "../_grid/NamesGrid";
import { furtherColumns } from "./furtherColumns";
import { Newer } from "./Newer";
import type { OpenPool } from "./openPool";
import { PoolActions } from "./PoolActions";
import { PoolSummary } from "./PoolSummary";

interface Kept {
  readonly draft: PoolDraft;
  readonly name: string;
}

/** What of a pool is edited and checked for a newer version. */
interface Base {
  readonly version: number;
  readonly name: string;
  readonly currency: string;
  readonly names: readonly NameInput[];
}

/** One pool: its names to be looked at, sorted, found and edited; saved as a whole, over no one else's version. */
export function PoolDesk({ workspaceId, pool }: { workspaceId: string; pool: OpenPool }) {
  const router = useRouter();
  const [base, setBase] = useState<Base>(pool);
  const [kept, setKept] = useKept<Kept>(`pool ${pool.id}`);
  const [further, setFurther] = useState<readonly CreditColumn[]>([]);
  const [sought, setSought] = useState("");
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const [undone, setUndone] = useState<Kept | null>(null);
  const draft = kept?.draft ?? emptyDraft(base.version);
  const name = kept?.name ?? base.name;
  const mayEdit = pool.may.edit && !pool.isArchived;

  const columns = useMemo(
    () => gridColumns(base.names, base.currency, [...further, ...typedColumns(draft)]),
    [base, further, draft],
  );
  const rows = useMemo(() => applyDraft(base.names, columns, draft), [base, columns, draft]);
  const names = useMemo(() => rows.flatMap((row) => (row.name ? [row.name] : [])), [rows]);
  const shown = useMemo(() => rows.flatMap((row) => row.name ?? row.saved ?? []), [rows]);
  const settledNames = useDeferredValue(shown);
  const wrong = rows.flatMap((row) => row.problems);
  const isDirty = !isEmpty(draft) || name !== base.name;
  const isBehind = kept !== null && draft.version !== base.version;

  const change = useCallback(
    (next: PoolDraft, nextName = name) =>
      setKept(isEmpty(next) && nextName === base.name ? null : { draft: next, name: nextName }),
    [setKept, name, base.name],
  );
  const edits = useMemo(
    () => ({
      type: (cells: readonly TypedCell[]) => change(withTypedCells(draft, cells)),
      remove: (row: DraftRow) => change(withRemoved(draft, row.key)),
    }),
    [draft, change],
  );

  const save = async () => {
    setBusy(true);
    setRefused([]);
    const { currency } = base;
    const input = { workspaceId, poolId: pool.id, version: draft.version, name, currency, names };
    const answer = await call("pools.save", input);
    setBusy(false);
    if (answer.ok) {
      setKept(null);
      router.refresh();
    } else if (answer.current) setBase(answer.current as Base);
    else setRefused(answer.problems);
  };

  return (
    <Stack gap="md">
      <Group justify="space-between" align="end">
        <div>
          <Link href={`/w/${workspaceId}/pools`}>Pools</Link>
          <Title order={1}>
            {base.name} {pool.isArchived && <Badge variant="default">Archived</Badge>}
          </Title>
        </div>
        <PoolActions workspaceId={workspaceId} pool={pool} isDirty={isDirty} />
      </Group>
      {!pool.may.edit && <Text c="dimmed">You can read this pool; a structurer can change it.</Text>}
      <PoolSummary names={settledNames} currency={base.currency} />
      {isBehind && (
        <Newer
          rows={rows}
          columns={columns}
          savedName={base.name}
          name={name}
          onMine={() => setKept({ draft: { ...draft, version: base.version }, name })}
          onTheirs={() => setKept(null)}
        />
      )}
      <Group align="end">
        <TextInput
          label="Find a name"
          value={sought}
          onChange={(event) => setSought(event.currentTarget.value)}
        />
        {mayEdit && (
          <>
            <TextInput
              label="Pool's name"
              value={name}
              onChange={(event) => change(draft, event.currentTarget.value)}
              error={refused.find(({ path }) => path === "name")?.message}
            />
            <NativeSelect
              label="Further column"
              value=""
              data={[
                { value: "", label: "Choose" },
                ...furtherColumns.map(({ label }, i) => ({ value: `${i}`, label })),
              ]}
              onChange={(event) => {
                const chosen = furtherColumns[Number(event.currentTarget.value)];
                if (chosen) setFurther([...further, chosen.column]);
              }}
            />
            <Button
              variant="default"
              onClick={() => change(withAdded(draft, `added ${crypto.randomUUID()}`))}
            >
              Add a row
            </Button>
          </>
        )}
      </Group>
      <NamesGrid rows={rows} columns={columns} sought={sought} edits={mayEdit ? edits : null} />
      {mayEdit && (
        <Group>
          <Button onClick={save} loading={isBusy} disabled={!isDirty || wrong.length > 0 || isBehind}>
            Save
          </Button>
          <UndoButton kept={kept} undone={undone} onKept={setKept} onUndone={setUndone} />
          <Text size="sm" aria-live="polite" c={wrong.length > 0 ? "var(--mantine-color-error)" : "dimmed"}>
            {statusWords(isDirty, wrong)}
          </Text>
        </Group>
      )}
      <Problems title="The pool was not saved" problems={refused.filter(({ path }) => path !== "name")} />
    </Stack>
  );
}

function statusWords(
  isDirty: boolean,
  wrong: readonly { line: number; column: string; value: string; reason: string }[],
): string {
  const [first] = wrong;
  if (first) {
    const more = wrong.length > 1 ? `, and ${wrong.length - 1} more` : "";
    return `Row ${first.line}, ${first.column} "${first.value}" ${first.reason}${more}.`;
  }
  return isDirty ? "Not saved yet; kept in this browser until it is." : "Everything is saved.";
}
