import { toCsv } from "../../platform/csv";
import type { ImportReading } from "./read";

/** The rows that were not taken, as they stood in the file, with the reasons in a last column. */
export function rejectedCsv({ columns, rows }: Pick<ImportReading, "columns" | "rows">): string {
  const rejected = rows.filter((row) => row.problems.length > 0);
  const width = Math.max(columns.length, ...rejected.map((row) => row.cells.length));
  const headers = Array.from({ length: width }, (_, i) => columns[i]?.header ?? "");
  return toCsv(
    [...headers, "Reason"],
    rejected.map(({ cells, problems }) => [
      ...headers.map((_, i) => cells[i] ?? ""),
      problems.map(({ column, reason }) => `${column} ${reason}`).join("; "),
    ]),
  );
}
