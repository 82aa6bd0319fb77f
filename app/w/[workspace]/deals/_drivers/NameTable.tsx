"use client";

import { Group } from "@mantine/core";
import { useVirtualizer } from "@tanstack/react-virtual";
import { useMemo, useRef } from "react";
import { Figure } from "@/app/_ui/Figure";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { TableTools } from "@/app/_ui/table/TableTools";
import { useAddress } from "@/app/_ui/useAddress";
import { useKept } from "@/app/_ui/useKept";
import { PinMark } from "../_talk/Pins";
import { BarCell } from "./BarCell";
import styles from "./drivers.module.css";
import { type NameMeasure, type NameRow, nameMeasures } from "./rows";

export interface NamedClass {
  readonly id: string;
  readonly name: string;
}

const ROW = 27;
const FOLLOWS = "Not worked out yet.";

/** Name by name, however many: sorted by its headers, with a bar of each figure's size. */
export function NameTable({
  rows,
  classes,
  measure,
  currency,
}: {
  rows: readonly NameRow[];
  classes: readonly NamedClass[];
  measure: NameMeasure;
  currency: string;
}) {
  const [sorting, setSorting] = useAddress("sort", "");
  const [kept, setHidden] = useKept<readonly string[]>("columns name drivers");
  const hidden = kept ?? [];
  const columns = useMemo(() => columnsOf(classes, measure, currency), [classes, measure, currency]);
  const shown = columns.filter(({ key }, i) => i === 0 || !hidden.includes(key));
  const [sortKey = "", direction = "down"] = sorting === "" ? [columns[3]?.key, "size"] : sorting.split("|");
  const ordered = useMemo(
    () => sorted(rows, columns, sortKey, direction),
    [rows, columns, sortKey, direction],
  );
  const most = useMemo(
    () => new Map(columns.map((column) => [column.key, largest(rows, column)])),
    [rows, columns],
  );
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: ordered.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW,
    overscan: 12,
    initialRect: { width: 1000, height: 500 },
  });
  const items = virtual.getVirtualItems();
  const before = items[0]?.start ?? 0;
  const after = virtual.getTotalSize() - (items.at(-1)?.end ?? 0);
  const nextSort = ({ key, unit }: Column) => {
    const ways = unit === "text" ? ["up", "down"] : ["size", "down", "up"];
    const place = sortKey === key ? ways.indexOf(direction) + 1 : 0;
    setSorting(`${key}|${ways[place % ways.length]}`);
  };
  return (
    <div>
      <Group justify="end" my={4}>
        <TableTools
          name={`${nameMeasures(currency).find(({ value }) => value === measure)?.label} by name`}
          table={{ columns: shown, rows: ordered }}
          choosable={columns.slice(1)}
          hidden={hidden}
          onHidden={setHidden}
        />
      </Group>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reached by keyboard */}
      <section className={styles.scroller} ref={scroller} tabIndex={0} aria-label="Names">
        <table className={styles.names} aria-rowcount={ordered.length + 1}>
          <thead>
            <tr>
              {shown.map((column) => (
                <th
                  key={column.key}
                  scope="col"
                  data-text={column.unit === "text" || undefined}
                  aria-sort={
                    sortKey !== column.key ? "none" : direction === "up" ? "ascending" : "descending"
                  }
                >
                  <button type="button" className={styles.header} onClick={() => nextSort(column)}>
                    {column.header}{" "}
                    <span aria-hidden>
                      {sortKey === column.key && { size: "◆", down: "▼", up: "▲" }[direction]}
                    </span>
                    {column.unitWords && <small>{column.unitWords}</small>}
                  </button>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {before > 0 && (
              <tr aria-hidden>
                <td colSpan={shown.length} style={{ height: before, padding: 0 }} />
              </tr>
            )}
            {items.map(({ index }) => {
              const row = ordered[index]!;
              return (
                <tr key={row.id} aria-rowindex={index + 2}>
                  {shown.map((column) => (
                    <td key={column.key} data-text={column.unit === "text" || undefined}>
                      {cellOf(column, row, most.get(column.key) ?? 0)}
                      {column.key === "name" && (
                        <PinMark pin={{ kind: "name", id: row.id, label: row.name || row.id }} />
                      )}
                    </td>
                  ))}
                </tr>
              );
            })}
            {after > 0 && (
              <tr aria-hidden>
                <td colSpan={shown.length} style={{ height: after, padding: 0 }} />
              </tr>
            )}
          </tbody>
        </table>
      </section>
    </div>
  );
}

type Column = FigureColumn<NameRow>;

function columnsOf(classes: readonly NamedClass[], measure: NameMeasure, currency: string): Column[] {
  return [
    { key: "name", header: "Name", unit: "text", value: ({ id, name }) => (name ? `${id} · ${name}` : id) },
    { key: "sector", header: "Sector", unit: "text", value: ({ sector }) => sector },
    {
      key: "notional",
      header: "Notional",
      unit: "money",
      unitWords: currency,
      value: ({ notional }) => notional,
    },
    ...classes.map(
      ({ id, name }, i): Column => ({
        key: `class ${id}`,
        header: name,
        unit: "money",
        unitWords: nameMeasures(currency).find((row) => row.value === measure)?.words ?? currency,
        value: (row) => row.figures?.[measure][i] ?? null,
      }),
    ),
  ];
}

function cellOf(column: Column, row: NameRow, most: number) {
  const value = column.value(row);
  if (column.unit === "text") return value;
  if (!column.key.startsWith("class ")) return <Figure value={value as number | null} unit="money" />;
  const otherwise = row.isDefaulted ? "This name is in default already." : FOLLOWS;
  return <BarCell value={value as number | null} most={most} otherwise={otherwise} />;
}

function largest(rows: readonly NameRow[], column: Column): number {
  if (!column.key.startsWith("class ")) return 0;
  return rows.reduce((most, row) => Math.max(most, Math.abs(Number(column.value(row) ?? 0))), 0);
}

/** By text or number, down or up, or by size whatever the sign; what is not there comes last. */
function sorted(
  rows: readonly NameRow[],
  columns: readonly Column[],
  key: string,
  direction: string,
): NameRow[] {
  const column = columns.find((one) => one.key === key);
  if (!column) return [...rows];
  const sign = direction === "up" ? 1 : -1;
  const weight = (value: number) => (direction === "size" ? Math.abs(value) : value);
  return rows
    .map((row) => ({ row, value: column.value(row) }))
    .sort((one, other) => {
      if (one.value === null || other.value === null)
        return Number(one.value === null) - Number(other.value === null);
      if (typeof one.value === "number" && typeof other.value === "number")
        return sign * (weight(one.value) - weight(other.value));
      return sign * String(one.value).localeCompare(String(other.value));
    })
    .map(({ row }) => row);
}
