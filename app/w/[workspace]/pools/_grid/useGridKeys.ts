"use client";

import { type RefObject, useMemo, useRef, useState } from "react";
import type { DraftRow } from "@/lib/pools/draft";
import { cellText, type GridColumn, valueIn } from "@/lib/pools/grid";
import type { CellEvents, GridEdits } from "./GridRow";
import { type Block, blockOf, blockText, cleared, filledDown, type Place, placeAfter } from "./gridKeys";

interface Grid {
  readonly rows: readonly DraftRow[];
  readonly columns: readonly GridColumn[];
  readonly edits: GridEdits | null;
  readonly scroller: RefObject<HTMLElement | null>;
  scrollTo(row: number): void;
}

/**
 * The keys of a spreadsheet: arrows, Home and End, pages, Enter, F2 and Escape, blocks by Shift, fill down by Ctrl D, Delete,
 * copy and paste of blocks, undo and redo. While a cell's text is edited, keys that move the caret are its own.
 */
export function useGridKeys(grid: Grid): { readonly block: Block | null; readonly events: CellEvents } {
  const latest = useRef(grid);
  latest.current = grid;
  const [corners, setCorners] = useState<{ from: Place; to: Place } | null>(null);
  const held = useRef(corners);
  held.current = corners;
  const isExtending = useRef(false);

  const events = useMemo<CellEvents>(() => {
    const cellAt = (place: Place) => {
      const row = latest.current.rows[place.row];
      const column = latest.current.columns[place.column];
      return row && column ? { row, column, text: textOf(row, column) } : null;
    };
    const blockNow = (place: Place) => blockOf(held.current?.from ?? place, held.current?.to ?? place);
    const go = (to: Place) => {
      const input = () =>
        latest.current.scroller.current?.querySelector<HTMLInputElement>(
          `input[data-place="${to.row}:${to.column}"]`,
        );
      const there = input();
      if (there) return there.focus();
      latest.current.scrollTo(to.row);
      setTimeout(() => input()?.focus(), 60);
    };
    return {
      focus(place) {
        const from = isExtending.current ? (held.current?.from ?? place) : place;
        isExtending.current = false;
        setCorners({ from, to: place });
      },
      key(event, place, isEditing) {
        const { edits, rows, columns } = latest.current;
        const isWide = event.ctrlKey || event.metaKey;
        const key = event.key.toLowerCase();
        if (isWide && (key === "z" || key === "y")) {
          if (key === "y" || event.shiftKey) edits?.redo();
          else edits?.undo();
          return true;
        }
        if (isWide && key === "d") {
          edits?.type(filledDown(blockNow(place), cellAt));
          return true;
        }
        const size = { rows: rows.length, columns: columns.length };
        if (event.key === "Enter") {
          const to = placeAfter(place, event.shiftKey ? "ArrowUp" : "ArrowDown", false, size);
          if (to) go(to);
          return true;
        }
        const isAcross = ["ArrowLeft", "ArrowRight", "Home", "End"].includes(event.key);
        if (isEditing && isAcross) return false;
        if (event.key === "Delete" && !isEditing) {
          edits?.type(cleared(blockNow(place), cellAt));
          return true;
        }
        const to = placeAfter(place, event.key, isWide, size);
        if (!to) return false;
        isExtending.current = event.shiftKey;
        go(to);
        return true;
      },
      paste(place, text) {
        const lines = text.replace(/\r?\n$/, "").split(/\r?\n/);
        const cells = lines.map((line) => line.split("\t"));
        const { edits } = latest.current;
        if (!edits || (cells.length === 1 && cells[0]?.length === 1)) return false;
        edits.type(
          cells.flatMap((line, i) =>
            line.flatMap((cell, k) => {
              const at = cellAt({ row: place.row + i, column: place.column + k });
              return at ? [{ ...at, text: cell.trim() }] : [];
            }),
          ),
        );
        return true;
      },
      copied: (place) => blockText(blockNow(place), cellAt),
    };
  }, []);
  return { block: corners && blockOf(corners.from, corners.to), events };
}

/** What a cell holds, all digits: what is typed, or what is saved. */
function textOf(row: DraftRow, column: GridColumn): string {
  const typed = row.typed[column.key];
  if (typed !== undefined) return typed;
  const source = row.name ?? row.saved;
  return source ? cellText(valueIn(source, column), column.unit) : "";
}
