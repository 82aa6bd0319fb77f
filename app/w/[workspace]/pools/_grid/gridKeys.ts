import type { TypedCell } from "@/lib/pools/draft";

/** A cell of the grid by its row and column on screen. */
export interface Place {
  readonly row: number;
  readonly column: number;
}

/** A block of cells, corners included. */
export interface Block {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

/** How far a page of rows goes. */
const PAGE = 20;

/** Where a key leads from a cell, kept inside the grid; null for a key that leads nowhere. */
export function placeAfter(
  { row, column }: Place,
  key: string,
  isWide: boolean,
  size: { readonly rows: number; readonly columns: number },
): Place | null {
  const last = { row: size.rows - 1, column: size.columns - 1 };
  const steps: Record<string, Place> = {
    ArrowUp: { row: isWide ? 0 : row - 1, column },
    ArrowDown: { row: isWide ? last.row : row + 1, column },
    ArrowLeft: { row, column: isWide ? 0 : column - 1 },
    ArrowRight: { row, column: isWide ? last.column : column + 1 },
    Home: { row: isWide ? 0 : row, column: 0 },
    End: { row: isWide ? last.row : row, column: last.column },
    PageUp: { row: row - PAGE, column },
    PageDown: { row: row + PAGE, column },
  };
  const wished = steps[key];
  if (!wished) return null;
  const inside = (value: number, most: number) => Math.min(Math.max(value, 0), most);
  return { row: inside(wished.row, last.row), column: inside(wished.column, last.column) };
}

export function blockOf(one: Place, other: Place): Block {
  return {
    top: Math.min(one.row, other.row),
    bottom: Math.max(one.row, other.row),
    left: Math.min(one.column, other.column),
    right: Math.max(one.column, other.column),
  };
}

type CellAt = (place: Place) => TypedCell | null;

/** The block's texts as a spreadsheet takes them. `cellAt` gives a cell with the text that it shows. */
export function blockText(block: Block, cellAt: CellAt): string {
  return placesOf(block)
    .map((line) => line.map((place) => cellAt(place)?.text ?? "").join("\t"))
    .join("\n");
}

/** The block's top row laid over the rows below it; the cell above, where the block is one row. */
export function filledDown(block: Block, cellAt: CellAt): TypedCell[] {
  const source = block.top === block.bottom ? block.top - 1 : block.top;
  if (source < 0) return [];
  return placesOf({ ...block, top: source + 1 }).flatMap((line) =>
    line.flatMap((place) => {
      const from = cellAt({ row: source, column: place.column });
      const to = cellAt(place);
      return from && to ? [{ ...to, text: from.text }] : [];
    }),
  );
}

/** The block emptied. */
export function cleared(block: Block, cellAt: CellAt): TypedCell[] {
  return placesOf(block).flatMap((line) =>
    line.flatMap((place) => {
      const cell = cellAt(place);
      return cell ? [{ ...cell, text: "" }] : [];
    }),
  );
}

function placesOf({ top, bottom, left, right }: Block): Place[][] {
  return Array.from({ length: Math.max(0, bottom - top + 1) }, (_, i) =>
    Array.from({ length: right - left + 1 }, (_cell, k) => ({ row: top + i, column: left + k })),
  );
}
