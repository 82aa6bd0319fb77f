"use client";

import { NativeSelect } from "@mantine/core";
import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useAddress } from "@/app/_ui/useAddress";
import type { TrancheReport } from "@/lib/pricing/report";
import { trancheColumns } from "../../../_report/trancheColumns";
import type { OpenRun } from "./openRun";

interface Line {
  readonly id: string;
  readonly name: string;
  readonly before: TrancheReport | null;
  readonly after: TrancheReport | null;
}

/** One figure of every class in both runs, and its change. */
export function FigureDifferences({
  earlier,
  later,
  nameOf,
}: {
  earlier: OpenRun;
  later: OpenRun;
  nameOf(id: string): string;
}) {
  const currency = later.request.currency ?? "EUR";
  const choices = useMemo(
    () => [
      strike("attachment", "Attachment"),
      strike("detachment", "Detachment"),
      ...trancheColumns(currency, "class"),
    ],
    [currency],
  );
  const [key, setKey] = useAddress("figure", "sellerValue");
  const chosen = choices.find((column) => column.key === key) ?? choices[2]!;
  const lines = useMemo(() => linesOf(earlier, later, nameOf), [earlier, later, nameOf]);
  const columns = useMemo<FigureColumn<Line>[]>(() => {
    const { header, unit, unitWords } = chosen;
    const words = unitWords ? { unitWords } : {};
    const of = (row: TrancheReport | null) => (row ? (chosen.value(row) as number | null) : null);
    return [
      { key: "name", header: "Class", unit: "text", value: ({ name }) => name },
      {
        key: "before",
        header: `${header}, run ${earlier.number}`,
        unit,
        ...words,
        value: (line) => of(line.before),
      },
      {
        key: "after",
        header: `${header}, run ${later.number}`,
        unit,
        ...words,
        value: (line) => of(line.after),
      },
      {
        key: "change",
        header: "Change",
        unit,
        ...words,
        value: (line) => {
          const [from, to] = [of(line.before), of(line.after)];
          return from === null || to === null ? null : to - from;
        },
      },
    ];
  }, [chosen, earlier.number, later.number]);
  return (
    <FigureTable
      name="two runs"
      columns={columns}
      rows={lines}
      keyOf={({ id }) => id}
      tools={
        <NativeSelect
          size="xs"
          aria-label="Figure compared"
          value={chosen.key}
          data={choices.map((column) => ({
            value: column.key,
            label: column.unitWords ? `${column.header} (${column.unitWords})` : column.header,
          }))}
          onChange={(event) => setKey(event.currentTarget.value)}
        />
      }
    />
  );
}

function strike(key: "attachment" | "detachment", header: string): FigureColumn<TrancheReport> {
  return { key, header, unit: "percent", unitWords: "%", value: (row) => row[key] };
}

function linesOf(earlier: OpenRun, later: OpenRun, nameOf: (id: string) => string): Line[] {
  const ids = [...later.report.tranches, ...earlier.report.tranches].map(({ id }) => id);
  const find = ({ report }: OpenRun, id: string) =>
    report.tranches.find((tranche) => tranche.id === id) ?? null;
  return [...new Set(ids)].map((id) => ({
    id,
    name: nameOf(id),
    before: find(earlier, id),
    after: find(later, id),
  }));
}
