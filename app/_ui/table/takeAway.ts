import Papa from "papaparse";
import { toCsv } from "@/lib/platform/csv";
import { saveFile } from "../saveFile";
import { type FigureColumn, headerOf, takenValue } from "./figureColumns";

/** A table to be taken away: what it shows, with all digits. */
export interface Takeable<Row> {
  readonly columns: readonly FigureColumn<Row>[];
  readonly rows: readonly Row[];
}

function cellsOf<Row>({ columns, rows }: Takeable<Row>) {
  return rows.map((row) => columns.map((column) => takenValue(column, row)));
}

/** The table as a spreadsheet takes it by paste. */
export function tabSeparated<Row>(table: Takeable<Row>): string {
  const cells = [table.columns.map(headerOf), ...cellsOf(table)];
  return Papa.unparse(cells, { delimiter: "\t", newline: "\n" });
}

/** Saves the table as CSV, units in its header. */
export function saveCsv<Row>(name: string, table: Takeable<Row>): void {
  saveFile(`${name}.csv`, toCsv(table.columns.map(headerOf), cellsOf(table)));
}

/** Saves the table as a workbook of one sheet; numbers stay numbers. */
export async function saveWorkbook<Row>(name: string, table: Takeable<Row>): Promise<void> {
  const { default: writeWorkbook } = await import("write-excel-file/browser");
  const header = table.columns.map((column) => ({ value: headerOf(column), fontWeight: "bold" as const }));
  const columns = table.columns.map((column) => ({ width: Math.max(12, headerOf(column).length) }));
  const book = writeWorkbook([header, ...cellsOf(table)], { stickyRowsCount: 1, columns });
  await book.toFile(`${name.replace(/[^\p{L}\p{N}._ -]/gu, "_")}.xlsx`);
}
