import type { ColumnField, ColumnReading } from "./columns";
import { inUnit, isBlank, readNumber } from "./numbers";
import type { TableRow } from "./table";

/** A line at the bottom that is no name, with what does not fit about it. */
export interface SetAside extends TableRow {
  readonly remark: string | null;
}

const MOST_CLOSING_LINES = 5;
const SAYS_TOTAL =
  /^(grand |sub)?(totals?|sum|summe|gesamt(summe)?|totale|somme|average|mean|durchschnitt|moyenne)\b\W*(\(?\d+( names)?\)?)?\W*$/i;
const credits: readonly ColumnField[] = ["spread", "yearly", "cumulative", "hazard", "upfront"];

/**
 * Takes closing lines off the bottom: totals (which say so, or have an amount but neither id nor name) and footnotes (one
 * filled cell that is no number). A total is checked against the sum of the rows.
 */
export function withoutClosingLines(
  rows: readonly TableRow[],
  columns: readonly ColumnReading[],
): { body: readonly TableRow[]; setAside: readonly SetAside[] } {
  let end = rows.length;
  while (end > 1 && rows.length - end < MOST_CLOSING_LINES && isClosing(rows[end - 1]!, columns)) end--;
  const body = rows.slice(0, end);
  const setAside = rows.slice(end).map((row) => ({ ...row, remark: remarkOf(row, body, columns) }));
  return { body, setAside };
}

function isClosing(row: TableRow, columns: readonly ColumnReading[]): boolean {
  const filled = row.cells.filter((cell) => cell !== "");
  if (filled.some((cell) => SAYS_TOTAL.test(cell))) return true;
  if (filled.length === 1 && columns.length > 2 && !/^[\d.,' ]+$/.test(filled[0]!)) {
    return row.cells[0] === filled[0] && filled[0]!.length > 20;
  }
  const has = (...fields: ColumnField[]) =>
    columns.some((column, i) => fields.includes(column.field) && !isBlank(row.cells[i] ?? ""));
  return !has("id", "name") && has("notional") && !has(...credits);
}

function remarkOf(
  row: TableRow,
  body: readonly TableRow[],
  columns: readonly ColumnReading[],
): string | null {
  const i = columns.findIndex((column) => column.field === "notional");
  const column = columns[i];
  if (!column || row.cells.some((cell) => /^(average|mean|durchschnitt|moyenne)/i.test(cell))) return null;
  const amount = ({ cells }: TableRow) => {
    const found = readNumber(cells[i] ?? "", column.mark);
    return found && inUnit(found.value, found.unit ?? column.unit);
  };
  const stated = amount(row);
  if (stated === null) return null;
  const sum = body.reduce((total, line) => total + (amount(line) ?? 0), 0);
  if (Math.abs(stated - sum) <= 1e-6 * Math.abs(sum)) return null;
  return `It says ${stated}, the rows above sum to ${Number(sum.toPrecision(15))}.`;
}
