"use client";

import {
  columnFilteringFeature,
  createColumnHelper,
  createFilteredRowModel,
  createSortedRowModel,
  filterFn_includesString,
  globalFilteringFeature,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_basic,
  tableFeatures,
  useTable,
} from "@tanstack/react-table";
import { useVirtualizer } from "@tanstack/react-virtual";
import { useMemo, useRef } from "react";
import type { DraftRow } from "@/lib/pools/draft";
import { type GridColumn, valueIn } from "@/lib/pools/grid";
import { textFields } from "@/lib/pools/import/columns";
import { type GridEdits, GridRow } from "./GridRow";
import styles from "./grid.module.css";
import { useGridKeys } from "./useGridKeys";

const features = tableFeatures({
  columnFilteringFeature,
  globalFilteringFeature,
  rowSortingFeature,
  filteredRowModel: createFilteredRowModel(),
  sortedRowModel: createSortedRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric, basic: sortFn_basic },
  filterFns: { includesString: filterFn_includesString },
});
const helper = createColumnHelper<typeof features, DraftRow>();
const ROW_HEIGHT = 30;

/** The names of a pool: sorted by what is saved, so that rows stay put while one types; only rows in view are drawn. */
export function NamesGrid({
  rows,
  columns,
  sought,
  edits,
}: {
  rows: readonly DraftRow[];
  columns: readonly GridColumn[];
  sought: string;
  edits: GridEdits | null;
}) {
  const defined = useMemo(() => helper.columns(columns.map(definitionOf)), [columns]);
  const data = useMemo(() => [...rows], [rows]);
  const table = useTable({
    features,
    columns: defined,
    data,
    getRowId: (row) => row.key,
    state: { globalFilter: sought },
    globalFilterFn: "includesString",
    getColumnCanGlobalFilter: (column) => /^(id|name|sector|status)$/.test(column.id),
  });
  const shown = table.getRowModel().rows;
  const scroller = useRef<HTMLElement>(null);
  const virtual = useVirtualizer({
    count: shown.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW_HEIGHT,
    overscan: 12,
  });
  const items = virtual.getVirtualItems();
  const above = items[0]?.start ?? 0;
  const below = virtual.getTotalSize() - (items.at(-1)?.end ?? 0);

  const scrollTo = (row: number) => virtual.scrollToIndex(row);
  const { block, events } = useGridKeys({
    rows: shown.map(({ original }) => original),
    columns,
    edits,
    scroller,
    scrollTo,
  });

  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by keyboard
    <section className={styles.scroller} ref={scroller} aria-label="Names, scrollable" tabIndex={0}>
      <table className={styles.grid} aria-label="Names" aria-rowcount={shown.length + 1}>
        <thead>
          <tr>
            {table.getFlatHeaders().map((header, i) => (
              <th
                key={header.id}
                aria-sort={ariaSort(header.column.getIsSorted())}
                data-number={!textFields.includes(columns[i]!.field) || undefined}
              >
                <button
                  type="button"
                  className={styles.header}
                  onClick={header.column.getToggleSortingHandler()}
                >
                  {columns[i]!.header}
                  <span aria-hidden>{sortMark(header.column.getIsSorted())}</span>
                </button>
              </th>
            ))}
            {edits && <th aria-label="Remove" />}
          </tr>
        </thead>
        <tbody>
          {above > 0 && <tr aria-hidden style={{ height: above }} />}
          {items.map(({ index }) => {
            const row = shown[index]!.original;
            return (
              <GridRow
                key={row.key}
                row={row}
                index={index}
                columns={columns}
                edits={edits}
                selected={
                  block && index >= block.top && index <= block.bottom ? `${block.left}:${block.right}` : null
                }
                events={events}
              />
            );
          })}
          {below > 0 && <tr aria-hidden style={{ height: below }} />}
        </tbody>
      </table>
    </section>
  );
}

function definitionOf(column: GridColumn) {
  const isText = textFields.includes(column.field);
  return helper.accessor((row) => (row.saved ? (valueIn(row.saved, column) ?? undefined) : undefined), {
    id: column.key,
    header: column.header,
    sortFn: isText ? "alphanumeric" : "basic",
    sortUndefined: "last",
  });
}

function ariaSort(sorted: false | "asc" | "desc"): "none" | "ascending" | "descending" {
  if (!sorted) return "none";
  return sorted === "asc" ? "ascending" : "descending";
}

function sortMark(sorted: false | "asc" | "desc"): string {
  if (!sorted) return "";
  return sorted === "asc" ? " ▲" : " ▼";
}
