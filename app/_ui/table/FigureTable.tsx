"use client";

import { Table } from "@mantine/core";
import {
  createColumnHelper,
  createSortedRowModel,
  rowSortingFeature,
  sortFns,
  tableFeatures,
  useTable,
} from "@tanstack/react-table";
import { type ReactNode, useMemo } from "react";
import { Figure } from "../Figure";
import { useKept } from "../useKept";
import { type FigureColumn, headerOf } from "./figureColumns";
import styles from "./figureTable.module.css";
import { TableTools } from "./TableTools";

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel(), sortFns });

/**
 * A table of figures: sorted by its headers, its columns chosen and remembered in this browser under `name`, and taken
 * away with all digits. `hiddenAtFirst` are the keys of columns that a reader has to ask for.
 */
export function FigureTable<Row>({
  name,
  columns,
  rows,
  keyOf,
  hiddenAtFirst = [],
  cellOf,
  actions,
  minWidth = 640,
  tools,
}: {
  name: string;
  columns: readonly FigureColumn<Row>[];
  rows: readonly Row[];
  keyOf(row: Row): string;
  hiddenAtFirst?: readonly string[];
  /** A cell of the screen's own for some column, in place of the figure. */
  cellOf?(column: FigureColumn<Row>, row: Row): ReactNode | undefined;
  /** What can be done with a row, in a last column. */
  actions?: ((row: Row) => ReactNode) | undefined;
  minWidth?: number;
  tools?: ReactNode;
}) {
  const [kept, setKept] = useKept<readonly string[]>(`columns ${name}`);
  const hidden = kept ?? hiddenAtFirst;
  const shown = useMemo(
    () => columns.filter(({ key }, i) => i === 0 || !hidden.includes(key)),
    [columns, hidden],
  );
  const defined = useMemo(() => {
    const helper = createColumnHelper<typeof features, Row & object>();
    return helper.columns(
      shown.map((column) =>
        helper.accessor((row) => column.value(row) ?? undefined, {
          id: column.key,
          header: headerOf(column),
          sortUndefined: "last",
        }),
      ),
    );
  }, [shown]);
  const data = useMemo(() => [...rows] as (Row & object)[], [rows]);
  const table = useTable({ features, columns: defined, data, getRowId: (row) => keyOf(row) });
  const ordered = table.getRowModel().rows.map(({ original }) => original as Row);
  return (
    <div>
      <div className={styles.tools}>
        <TableTools
          name={name}
          table={{ columns: shown, rows: ordered }}
          choosable={columns.slice(1)}
          hidden={hidden}
          onHidden={setKept}
        />
        {tools}
      </div>
      <Table.ScrollContainer minWidth={minWidth}>
        <Table verticalSpacing={2} horizontalSpacing={6} highlightOnHover className={styles.table}>
          <Table.Thead>
            <Table.Tr>
              {table.getFlatHeaders().map((header, i) => {
                const sorted = header.column.getIsSorted();
                return (
                  <Table.Th
                    key={header.id}
                    ta={shown[i]?.unit === "text" ? "left" : "right"}
                    aria-sort={sorted === "asc" ? "ascending" : sorted === "desc" ? "descending" : "none"}
                  >
                    <button
                      type="button"
                      className={styles.header}
                      onClick={header.column.getToggleSortingHandler()}
                    >
                      {shown[i]?.header}
                      {shown[i]?.unitWords && <small>{shown[i]?.unitWords}</small>}
                      <span aria-hidden>{sorted === "asc" ? "▲" : sorted === "desc" ? "▼" : ""}</span>
                    </button>
                  </Table.Th>
                );
              })}
              {actions && <Table.Th aria-label="What can be done" className="screenOnly" />}
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {ordered.map((row) => (
              <Table.Tr key={keyOf(row)}>
                {shown.map((column) => (
                  <Table.Td key={column.key} ta={column.unit === "text" ? "left" : "right"}>
                    {cellOf?.(column, row) ?? <Cell column={column} row={row} />}
                  </Table.Td>
                ))}
                {actions && <Table.Td className="screenOnly">{actions(row)}</Table.Td>}
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
    </div>
  );
}

function Cell<Row>({ column, row }: { column: FigureColumn<Row>; row: Row }) {
  const value = column.value(row);
  if (column.unit === "text" || typeof value === "string") return <>{value}</>;
  return <Figure value={value} unit={column.unit} />;
}
