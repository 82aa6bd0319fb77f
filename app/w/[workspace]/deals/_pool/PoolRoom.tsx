"use client";

import { Alert, Button, Text } from "@mantine/core";
import Link from "next/link";
import { useEffect } from "react";
import type { TypedCell } from "@/lib/pools/draft";
import { PoolNames } from "../../pools/_desk/PoolNames";
import { usePoolDraft } from "../../pools/_desk/usePoolDraft";
import type { OpenPool } from "../../pools/[pool]/openPool";
import { PoolSummary } from "../../pools/[pool]/PoolSummary";
import { useDeal } from "../_frame/dealContext";
import { ClassMoves } from "./ClassMoves";
import { Substitution } from "./Substitution";

/** The room of the pool: names as a spreadsheet, and what each change would do to the classes before it is saved. */
export function PoolRoom({ pool }: { pool: OpenPool }) {
  const { workspaceId, form, mayEdit, tryNames } = useDeal();
  const draft = usePoolDraft(workspaceId, pool);
  const { isDirty, wrong, names } = draft;
  const tried = isDirty && wrong.length === 0 && names.length > 0 ? names : null;
  useEffect(() => {
    tryNames(tried);
    return () => tryNames(null);
  }, [tried, tryNames]);
  const maySave = pool.may.edit && !pool.isArchived;
  const typeAll = (cells: readonly TypedCell[]) => draft.edits.type(cells);
  return (
    <>
      {form.poolId !== pool.id && (
        <Alert color="yellow">
          The deal as typed takes another pool: save it to work on that one here. This is {pool.name}.
        </Alert>
      )}
      <Text size="sm" c="dimmed">
        <Link href={`/w/${workspaceId}/pools/${pool.id}`}>{pool.name}</Link> is a record of its own
        {pool.deals.length > 1
          ? `, used by ${pool.deals.length} deals: saving it here changes all of them`
          : ""}
        . What is typed here is priced at once and counts for nothing until it is saved.
      </Text>
      <PoolSummary names={draft.settledNames} currency={draft.base.currency} />
      <ClassMoves />
      <PoolNames pool={draft} mayEdit={maySave} hasName={false}>
        {maySave && mayEdit && <Substitution pool={draft} onType={typeAll} />}
        {tried && (
          <Button size="xs" variant="default" onClick={draft.drop}>
            Drop what is tried
          </Button>
        )}
      </PoolNames>
    </>
  );
}
