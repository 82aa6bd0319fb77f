import { plainCell } from "../../platform/csv";
import type { ColumnField, ColumnReading } from "./columns";
import { inUnit, isBlank, readNumber } from "./numbers";
import type { TableRow } from "./table";

/** One thing wrong in a table, by its place in the file. */
export interface ImportProblem {
  readonly line: number;
  /** Position of the column from 0, and its header. */
  readonly position: number;
  readonly column: string;
  readonly value: string;
  readonly reason: string;
}

/** A row's cells by field, with a place for complaints. */
export class RowCells {
  readonly problems: ImportProblem[] = [];
  readonly row: TableRow;
  readonly columns: readonly ColumnReading[];

  constructor(row: TableRow, columns: readonly ColumnReading[]) {
    this.row = row;
    this.columns = columns;
  }

  /** Positions of the columns read as a field. */
  positions(field: ColumnField): number[] {
    return this.columns.flatMap((column, i) => (column.field === field ? [i] : []));
  }

  /** The text of a field's first column, empty where there is none. */
  text(field: ColumnField): string {
    const [i] = this.positions(field);
    return i === undefined ? "" : plainCell(this.row.cells[i] ?? "");
  }

  /** A cell's number in decimals; null where it is blank, or no number (which is complained about). */
  number(position: number): number | null {
    const cell = this.row.cells[position] ?? "";
    const column = this.columns[position]!;
    if (isBlank(cell)) return null;
    const found = readNumber(cell, column.mark);
    if (found) return inUnit(found.value, found.unit ?? column.unit);
    this.complain(position, `is not a number with a decimal ${column.mark === "," ? "comma" : "point"}`);
    return null;
  }

  /** The number of a field that every row needs, complained about unless it is there and fits. */
  required(field: ColumnField, fits: (value: number) => boolean, otherwise: string): number | null {
    const [i] = this.positions(field);
    if (i === undefined) return null;
    if (isBlank(this.row.cells[i] ?? "")) {
      this.complain(i, "is empty");
      return null;
    }
    const value = this.number(i);
    if (value === null || fits(value)) return value;
    this.complain(i, otherwise);
    return null;
  }

  complain(position: number, reason: string): void {
    const { line, cells } = this.row;
    const column = this.columns[position]?.header || `column ${position + 1}`;
    this.problems.push({ line, position, column, value: cells[position] ?? "", reason });
  }
}
