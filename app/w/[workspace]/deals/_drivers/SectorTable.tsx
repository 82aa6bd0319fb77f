"use client";

import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { BarCell } from "./BarCell";
import type { NamedClass } from "./NameTable";
import { type NameMeasure, nameMeasures, type SectorRow } from "./rows";

/** Sector by sector: summed spread 01s, or the default in the sector that moves a class most. */
export function SectorTable({
  rows,
  classes,
  measure,
  currency,
}: {
  rows: readonly SectorRow[];
  classes: readonly NamedClass[];
  measure: NameMeasure;
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
          unitWords:
            measure === "jump"
              ? `${currency}, furthest of one default`
              : (nameMeasures(currency).find((row) => row.value === measure)?.words ?? currency),
          value: (row) => row.figures[measure][i] ?? null,
        }),
      ),
    ],
    [classes, measure, currency],
  );
  const most = (column: FigureColumn<SectorRow>) =>
    Math.max(...rows.map((row) => Math.abs(Number(column.value(row) ?? 0))));
  return (
    <FigureTable
      name={`${nameMeasures(currency).find(({ value }) => value === measure)?.label} by sector`}
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
