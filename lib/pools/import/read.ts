import { LIMITS, type NameInput } from "../../pricing/request";
import type { ImportProblem } from "./cells";
import type { ColumnField, ColumnReading } from "./columns";
import { recogniseColumns } from "./recognise";
import { type ImportedRow, readRow } from "./row";
import { type ImportTable, readTable } from "./table";
import { type SetAside, withoutClosingLines } from "./totals";

/** A whole table as read: `names` holds those rows that fit, `rows` all of them with their problems. */
export interface ImportReading {
  readonly columns: readonly ColumnReading[];
  readonly rows: readonly ImportedRow[];
  readonly names: readonly NameInput[];
  readonly problems: readonly ImportProblem[];
  /** Totals and footnotes at the bottom. */
  readonly setAside: readonly SetAside[];
  /** Wrong with the table as a whole. */
  readonly tableProblems: readonly string[];
}

export const NO_TABLE =
  "No header line was found: one line should name the columns (id, name, notional, recovery, spread …).";

/** Reads every row of a table with the columns as recognised, or as the reader changed them. All problems at once. */
export function readNames(
  table: ImportTable,
  columns: readonly ColumnReading[] = recogniseColumns(table),
): ImportReading {
  const { body, setAside } = withoutClosingLines(table.rows, columns);
  const seen = new Map<string, number>();
  const rows = body.map((row) => readRow(row, columns, seen));
  return {
    columns,
    rows,
    names: rows.flatMap(({ name }) => (name ? [name] : [])),
    problems: rows.flatMap((row) => row.problems),
    setAside,
    tableProblems: [...table.problems, ...columnProblems(columns), ...sizeProblems(rows.length)],
  };
}

/** Reads a text in one go. */
export function readPool(text: string): ImportReading {
  const table = readTable(text);
  if (table) return readNames(table);
  return { columns: [], rows: [], names: [], problems: [], setAside: [], tableProblems: [NO_TABLE] };
}

function columnProblems(columns: readonly ColumnReading[]): string[] {
  const has = (...fields: ColumnField[]) => columns.some((column) => fields.includes(column.field));
  const problems: string[] = [];
  if (!has("id", "name")) problems.push("No column is read as id or name.");
  if (!has("notional")) problems.push("No column is read as notional.");
  if (!has("recovery", "lossGivenDefault")) problems.push("No column is read as recovery.");
  if (!has("spread", "yearly", "cumulative", "hazard", "upfront", "status")) {
    problems.push(
      "No column is read as a credit input: spread, default probability, hazard, or upfront with coupon.",
    );
  }
  return problems;
}

function sizeProblems(rows: number): string[] {
  if (rows === 0) return ["There is no row below the header."];
  return rows > LIMITS.names ? [`A pool holds at most ${LIMITS.names} names; these are ${rows}.`] : [];
}
