"use client";

import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { BarCell } from "./BarCell";
import type { NamedClass } from "./NameTable";
import type { SectorRow } from "./rows";

/** Sector by sector: summed spread 01s, or the default in the sector that moves a class most. */
export function SectorTable({
  rows,
  classes,
  isJump,
  currency,
}: {
  rows: readonly SectorRow[];
  classes: readonly NamedClass[];
  isJump: boolean;
  currency: string;
}) {
  const columns = useMemo<FigureColumn<SectorRow>[]>(
    () => [
      { key: "sector", header: "Sector", unit: "text", value: ({ sector }) => sector },
      { key: "names", header: "Names", unit: "plain", value: ({ names }) => names },
      {
        key: "notional",
        header: "Notional",
        unit: "money",
        unitWords: currency,
        value: ({ notional }) => notional,
      },
      ...classes.map(
        ({ id, name }, i): FigureColumn<SectorRow> => ({
          key: `class ${id}`,
          header: name,
          unit: "money",
          unitWords: isJump ? `${currency}, furthest of one default` : `${currency} for +1 bp`,
          value: (row) => (isJump ? row.jump : row.spread01)[i] ?? null,
        }),
      ),
    ],
    [classes, isJump, currency],
  );
  const most = (column: FigureColumn<SectorRow>) =>
    Math.max(...rows.map((row) => Math.abs(Number(column.value(row) ?? 0))));
  return (
    <FigureTable
      name={isJump ? "jump to default by sector" : "spread 01 by sector"}
      columns={columns}
      rows={rows}
      keyOf={({ sector }) => sector}
      minWidth={560 + 120 * classes.length}
      cellOf={(column, row) =>
        column.key.startsWith("class ") ? (
          <BarCell value={column.value(row) as number | null} most={most(column)} />
        ) : undefined
      }
    />
  );
}
