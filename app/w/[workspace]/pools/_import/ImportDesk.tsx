"use client";

import { Alert, Button, Group, Stack, TextInput, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useDeferredValue, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { saveFile } from "@/app/_ui/saveFile";
import type { Problem } from "@/lib/platform/errors";
import type { ColumnReading } from "@/lib/pools/import/columns";
import { type ImportReading, NO_TABLE, readNames } from "@/lib/pools/import/read";
import { currencyOf, recogniseColumns } from "@/lib/pools/import/recognise";
import { rejectedCsv } from "@/lib/pools/import/rejected";
import { type ImportTable, readTable, withCell } from "@/lib/pools/import/table";
import { ColumnChoices } from "./ColumnChoices";
import { ImportPreview } from "./ImportPreview";
import { ImportSource } from "./ImportSource";
import { TakeButtons } from "./TakeButtons";

interface Target {
  readonly id: string;
  readonly name: string;
  readonly currency: string;
  readonly version: number;
}

interface Opened {
  readonly table: ImportTable;
  readonly columns: readonly ColumnReading[];
}

/** From a file or pasted text to a pool: choose, look, mend, take. Nothing is stored before everything fits. */
export function ImportDesk({
  workspaceId,
  into,
  mayEdit,
}: {
  workspaceId: string;
  into: Target | null;
  mayEdit: boolean;
}) {
  const router = useRouter();
  const [name, setName] = useState(into?.name ?? "");
  const [source, setSource] = useState("");
  const [currency, setCurrency] = useState(into?.currency ?? "EUR");
  const [opened, setOpened] = useState<Opened | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const [version, setVersion] = useState(into?.version ?? 0);
  const settled = useDeferredValue(opened);
  const reading = useMemo(() => settled && readNames(settled.table, settled.columns), [settled]);

  if (!mayEdit) {
    return <Alert color="gray">As a reader of this workspace you cannot import: ask a structurer.</Alert>;
  }

  const open = (text: string, file: string | null) => {
    const table = readTable(text);
    setRefused([]);
    setTrouble(table ? null : NO_TABLE);
    const columns = table ? recogniseColumns(table) : [];
    setOpened(table && { table, columns });
    if (!into) setCurrency(currencyOf(columns) ?? currency);
    if (!table || file === null || (name !== "" && name !== source)) return;
    const stem = file.replace(/\.[a-z]+$/i, "");
    setSource(stem);
    setName(stem);
  };

  const take = async (taken: ImportReading) => {
    setBusy(true);
    const names = [...taken.names];
    const answer = into
      ? await call("pools.save", {
          workspaceId,
          poolId: into.id,
          version,
          name,
          currency,
          names,
        })
      : await call("pools.create", { workspaceId, name, currency, names });
    setBusy(false);
    if (!answer.ok) {
      if (answer.current) setVersion((answer.current as { version: number }).version);
      return setRefused(answer.problems);
    }
    const poolId = into ? into.id : (answer.output as { poolId: string }).poolId;
    router.push(`/w/${workspaceId}/pools/${poolId}`);
    router.refresh();
  };

  return (
    <Stack gap="md">
      <Group justify="space-between">
        <Title order={1}>{into ? `Import names into ${into.name}` : "Import a pool"}</Title>
        <Button
          component={Link}
          variant="default"
          href={`/w/${workspaceId}/pools${into ? `/${into.id}` : ""}`}
        >
          Cancel
        </Button>
      </Group>
      <ImportSource onText={open} />
      {trouble && (
        <Alert color="red" role="alert">
          {trouble}
        </Alert>
      )}
      {opened && reading && (
        <>
          <ColumnChoices
            table={opened.table}
            columns={opened.columns}
            onChange={(columns) => setOpened({ ...opened, columns })}
          />
          <ImportPreview
            reading={reading}
            titleLines={opened.table.titleLines}
            onCell={(line, column, text) =>
              setOpened({ ...opened, table: withCell(opened.table, line, column, text) })
            }
          />
          <Group align="end">
            <TextInput
              label="Name of the pool"
              value={name}
              onChange={(event) => setName(event.currentTarget.value)}
              error={problemAt(refused, "name")}
            />
            <TextInput
              label="Currency"
              w={90}
              value={currency}
              onChange={(event) => setCurrency(event.currentTarget.value.toUpperCase())}
              error={problemAt(refused, "currency")}
            />
            <TakeButtons
              reading={reading}
              isBusy={isBusy}
              replaces={into !== null}
              onTake={() => take(reading)}
              onRejected={() => saveFile(`${name || "pool"} rejected rows.csv`, rejectedCsv(reading))}
            />
          </Group>
          <Problems
            title={
              refused.some(({ code }) => code === "staleVersion")
                ? "The pool was not stored: pressing again replaces the newer version"
                : "The pool was not stored"
            }
            problems={refused.filter(({ path }) => path !== "name" && path !== "currency")}
          />
        </>
      )}
    </Stack>
  );
}

function problemAt(problems: readonly Problem[], path: string): string | null {
  return problems.find((problem) => problem.path === path)?.message ?? null;
}
