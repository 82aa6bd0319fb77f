"use client";

import { type KeyboardEvent, memo, useState } from "react";
import { fourDigits } from "@/app/_ui/figures";
import type { DraftRow, TypedCell } from "@/lib/pools/draft";
import { cellText, type GridColumn, valueIn } from "@/lib/pools/grid";
import { textFields } from "@/lib/pools/import/columns";
import styles from "./grid.module.css";

/** What a grid tells when cells are typed in or rows taken away; absent where the reader may not edit. */
export interface GridEdits {
  type(cells: readonly TypedCell[]): void;
  remove(row: DraftRow): void;
}

/** One name of the grid. Cells show four digits, all of them on hover and while typing. */
export const GridRow = memo(function GridRow({
  row,
  index,
  columns,
  edits,
  onPaste,
}: {
  row: DraftRow;
  index: number;
  columns: readonly GridColumn[];
  edits: GridEdits | null;
  onPaste: (index: number, position: number, text: string) => boolean;
}) {
  const reasons = new Map(row.problems.map(({ position, reason }) => [position, reason]));
  return (
    <tr aria-rowindex={index + 2}>
      {columns.map((column, position) => (
        <GridCell
          key={column.key}
          row={row}
          column={column}
          place={`${index}:${position}`}
          reason={reasons.get(position) ?? null}
          edits={edits}
          onPaste={(text) => onPaste(index, position, text)}
        />
      ))}
      {edits && (
        <td>
          <button
            type="button"
            className={styles.remove}
            aria-label={`Remove ${row.saved?.id ?? "the added row"}`}
            onClick={() => edits.remove(row)}
          >
            ×
          </button>
        </td>
      )}
    </tr>
  );
});

function GridCell({
  row,
  column,
  place,
  reason,
  edits,
  onPaste,
}: {
  row: DraftRow;
  column: GridColumn;
  place: string;
  reason: string | null;
  edits: GridEdits | null;
  onPaste: (text: string) => boolean;
}) {
  const [isTyping, setTyping] = useState(false);
  const isText = textFields.includes(column.field);
  const source = row.name ?? row.saved;
  const typed = row.typed[column.key];
  const value = source ? valueIn(source, column) : null;
  const full =
    reason === null && row.name ? cellText(value, column.unit) : (typed ?? cellText(value, column.unit));
  const isPlainNumber = typeof value === "number" && (typed === undefined || row.name !== null);
  const short = isPlainNumber ? shortText(value, column) : full;
  const label = `${column.header}, ${row.saved?.id ?? "added row"}`;
  if (!edits) {
    return (
      <td data-number={!isText || undefined} title={full}>
        {short}
      </td>
    );
  }
  return (
    <td
      data-number={!isText || undefined}
      data-changed={typed !== undefined || undefined}
      data-wrong={reason !== null || undefined}
      title={reason ? `${full || "Empty"}: ${reason}` : full}
    >
      <input
        aria-label={label}
        aria-invalid={reason !== null}
        data-place={place}
        inputMode={isText ? "text" : "decimal"}
        value={isTyping ? (typed ?? full) : short}
        onFocus={() => setTyping(true)}
        onBlur={() => setTyping(false)}
        onChange={(event) => edits.type([{ row, column, text: event.currentTarget.value }])}
        onKeyDown={moveByKey}
        onPaste={(event) => {
          if (onPaste(event.clipboardData.getData("text/plain"))) event.preventDefault();
        }}
      />
    </td>
  );
}

function shortText(value: number, { unit, field }: GridColumn): string {
  return fourDigits(
    value,
    field === "notional" ? "money" : unit === "percent" || unit === "basisPoints" ? unit : "plain",
  );
}

/** Up, down and Enter go to the same column of the row above or below. */
function moveByKey(event: KeyboardEvent<HTMLInputElement>): void {
  const step = { ArrowUp: -1, ArrowDown: 1, Enter: 1 }[event.key];
  if (step === undefined) return;
  event.preventDefault();
  const [row, column] = (event.currentTarget.dataset.place ?? "").split(":");
  const grid = event.currentTarget.closest("table");
  grid?.querySelector<HTMLInputElement>(`input[data-place="${Number(row) + step}:${column}"]`)?.focus();
}
