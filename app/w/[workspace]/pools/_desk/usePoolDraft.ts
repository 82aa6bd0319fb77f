"use client";

import { useRouter } from "next/navigation";
import { useCallback, useDeferredValue, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
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

const MOST_STEPS = 200;

export interface KeptPool {
  readonly draft: PoolDraft;
  readonly name: string;
}

/** What of a pool is edited and checked for a newer version. */
export interface PoolBase {
  readonly version: number;
  readonly name: string;
  readonly currency: string;
  readonly names: readonly NameInput[];
}

/** A pool's names with what is typed over them: kept in this browser until saved, with undo and redo step by step. */
export function usePoolDraft(workspaceId: string, pool: PoolBase & { readonly id: string }) {
  const router = useRouter();
  const [base, setBase] = useState<PoolBase>(pool);
  const [kept, setKept] = useKept<KeptPool>(`pool ${pool.id}`);
  const [past, setPast] = useState<readonly (KeptPool | null)[]>([]);
  const [future, setFuture] = useState<readonly (KeptPool | null)[]>([]);
  const [further, setFurther] = useState<readonly CreditColumn[]>([]);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const draft = kept?.draft ?? emptyDraft(base.version);
  const name = kept?.name ?? base.name;

  const columns = useMemo(
    () => gridColumns(base.names, base.currency, [...further, ...typedColumns(draft)]),
    [base, further, draft],
  );
  const rows = useMemo(() => applyDraft(base.names, columns, draft), [base, columns, draft]);
  const names = useMemo(() => rows.flatMap((row) => (row.name ? [row.name] : [])), [rows]);
  const shown = useMemo(() => rows.flatMap((row) => row.name ?? row.saved ?? []), [rows]);
  const wrong = useMemo(() => rows.flatMap((row) => row.problems), [rows]);

  const keep = useCallback(
    (next: KeptPool | null) => {
      setPast((steps) => [...steps, kept].slice(-MOST_STEPS));
      setFuture([]);
      setKept(next);
    },
    [kept, setKept],
  );
  const change = useCallback(
    (next: PoolDraft, nextName = name) =>
      keep(isEmpty(next) && nextName === base.name ? null : { draft: next, name: nextName }),
    [keep, name, base.name],
  );
  const edits = useMemo(
    () => ({
      type: (cells: readonly TypedCell[]) => change(withTypedCells(draft, cells)),
      remove: (row: DraftRow) => change(withRemoved(draft, row.key)),
      undo() {
        if (past.length === 0) return;
        setFuture([kept, ...future]);
        setPast(past.slice(0, -1));
        setKept(past.at(-1) ?? null);
      },
      redo() {
        if (future.length === 0) return;
        setPast([...past, kept]);
        setFuture(future.slice(1));
        setKept(future[0] ?? null);
      },
    }),
    [draft, change, past, future, kept, setKept],
  );
  const save = async () => {
    setBusy(true);
    setRefused([]);
    const { currency } = base;
    const input = { workspaceId, poolId: pool.id, version: draft.version, name, currency, names };
    const answer = await call("pools.save", input);
    setBusy(false);
    if (answer.ok) {
      setPast([]);
      setFuture([]);
      setKept(null);
      router.refresh();
    } else if (answer.current) setBase(answer.current as PoolBase);
    else setRefused(answer.problems);
  };
  return {
    base,
    kept,
    keep,
    draft,
    name,
    columns,
    rows,
    names,
    settledNames: useDeferredValue(shown),
    wrong,
    refused,
    isBusy,
    isDirty: !isEmpty(draft) || name !== base.name,
    isBehind: kept !== null && draft.version !== base.version,
    edits,
    canUndo: past.length > 0,
    canRedo: future.length > 0,
    rename: (next: string) => change(draft, next),
    addRow: () => change(withAdded(draft, `added ${crypto.randomUUID()}`)),
    showColumn: (column: CreditColumn) => setFurther([...further, column]),
    rebase: () => keep({ draft: { ...draft, version: base.version }, name }),
    drop: () => keep(null),
    save,
  };
}

export type PoolAtHand = ReturnType<typeof usePoolDraft>;

/** What stands between the draft and being saved, or that nothing does. */
export function statusWords({ isDirty, wrong }: Pick<PoolAtHand, "isDirty" | "wrong">): string {
  const [first] = wrong;
  if (first) {
    const more = wrong.length > 1 ? `, and ${wrong.length - 1} more` : "";
    return `Row ${first.line}, ${first.column} "${first.value}" ${first.reason}${more}.`;
  }
  return isDirty ? "Not saved yet; kept in this browser until it is." : "Everything is saved.";
}
