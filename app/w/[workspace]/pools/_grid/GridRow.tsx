"use client";

import { type KeyboardEvent, memo, useLayoutEffect, useRef, useState } from "react";
import { fourDigits } from "@/app/_ui/figures";
import type { DraftRow, TypedCell } from "@/lib/pools/draft";
import { cellText, type GridColumn, valueIn } from "@/lib/pools/grid";
import { textFields } from "@/lib/pools/import/columns";
import styles from "./grid.module.css";
import type { Place } from "./gridKeys";

/** What a grid tells when cells are typed in or rows taken away; absent where the reader may not edit. */
export interface GridEdits {
  type(cells: readonly TypedCell[]): void;
  remove(row: DraftRow): void;
  undo(): void;
  redo(): void;
}

/** What a cell tells the grid of keys and clipboard; true when the grid has dealt with it. */
export interface CellEvents {
  focus(place: Place): void;
  key(event: KeyboardEvent<HTMLInputElement>, place: Place, isEditing: boolean): boolean;
  paste(place: Place, text: string): boolean;
  copied(place: Place): string | null;
}

/** One name of the grid. Cells show four digits, all of them on hover and while typing. */
export const GridRow = memo(function GridRow({
  row,
  index,
  columns,
  edits,
  selected,
  events,
}: {
  row: DraftRow;
  index: number;
  columns: readonly GridColumn[];
  edits: GridEdits | null;
  /** Columns of this row in the selected block, first and last; null when it has none. */
  selected: string | null;
  events: CellEvents;
}) {
  const [first, last] = selected?.split(":").map(Number) ?? [];
  const reasons = new Map(row.problems.map(({ position, reason }) => [position, reason]));
  return (
    <tr aria-rowindex={index + 2}>
      {columns.map((column, position) => (
        <GridCell
          key={column.key}
          row={row}
          column={column}
          place={{ row: index, column: position }}
          isSelected={first !== undefined && last !== undefined && position >= first && position <= last}
          reason={reasons.get(position) ?? null}
          edits={edits}
          events={events}
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
  isSelected,
  reason,
  edits,
  events,
}: {
  row: DraftRow;
  column: GridColumn;
  place: Place;
  isSelected: boolean;
  reason: string | null;
  edits: GridEdits | null;
  events: CellEvents;
}) {
  const [isTyping, setTyping] = useState(false);
  const [isEditing, setEditing] = useState(false);
  const before = useRef("");
  const input = useRef<HTMLInputElement>(null);
  // What is focused is chosen as a whole, at once, so that the first key typed replaces it.
  useLayoutEffect(() => {
    if (isTyping) input.current?.select();
  }, [isTyping]);
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
      data-selected={isSelected || undefined}
      title={reason ? `${full || "Empty"}: ${reason}` : full}
    >
      <input
        ref={input}
        aria-label={label}
        aria-invalid={reason !== null}
        data-place={`${place.row}:${place.column}`}
        inputMode={isText ? "text" : "decimal"}
        value={isTyping ? (typed ?? full) : short}
        onFocus={() => {
          setTyping(true);
          before.current = typed ?? full;
          events.focus(place);
        }}
        onBlur={() => {
          setTyping(false);
          setEditing(false);
        }}
        onDoubleClick={() => setEditing(true)}
        onChange={(event) => {
          setEditing(true);
          edits.type([{ row, column, text: event.currentTarget.value }]);
        }}
        onKeyDown={(event) => {
          if (event.key === "F2") {
            const end = event.currentTarget.value.length;
            event.currentTarget.setSelectionRange(end, end);
            setEditing(true);
          } else if (event.key === "Escape" && isEditing) {
            edits.type([{ row, column, text: before.current }]);
            setEditing(false);
            const field = event.currentTarget;
            requestAnimationFrame(() => field.select());
          } else if (!events.key(event, place, isEditing)) return;
          event.preventDefault();
        }}
        onPaste={(event) => {
          if (events.paste(place, event.clipboardData.getData("text/plain"))) event.preventDefault();
        }}
        onCopy={(event) => {
          const text = isEditing ? null : events.copied(place);
          if (text === null) return;
          event.clipboardData.setData("text/plain", text);
          event.preventDefault();
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
