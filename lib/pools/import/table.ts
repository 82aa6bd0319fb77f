import Papa from "papaparse";
import { readHeader } from "./columns";

/** One row of a file: its line number from 1, and its cells without outer spaces. */
export interface TableRow {
  readonly line: number;
  readonly cells: readonly string[];
}

/** A pasted or exported table, cut into its parts. */
export interface ImportTable {
  readonly delimiter: string;
  readonly headers: readonly string[];
  readonly rows: readonly TableRow[];
  /** Lines with text above the header that were left out. */
  readonly titleLines: number;
  /** Wrong with the table as a whole. */
  readonly problems: readonly string[];
}

const DELIMITERS = ["\t", ";", ",", "|"] as const;
const MOST_TITLE_LINES = 20;

/**
 * Cuts text into a table: the delimiter is the one with which most headers are recognised, blank lines are left out, the
 * header is the line with the most known columns among the first ones. Null where no line names two columns.
 */
export function readTable(text: string): ImportTable | null {
  const clean = text.replace(/^\ufeff/, "").replace(/^sep=.\r?\n/i, "");
  const skipped = text.replace(/^\ufeff/, "").length === clean.length ? 0 : 1;
  const delimiter = delimiterOf(clean);
  if (delimiter === null) return null;
  const { data, errors } = Papa.parse<string[]>(clean, { delimiter, skipEmptyLines: false });
  const filled = numbered(data, skipped).filter(({ cells }) => cells.some((cell) => cell !== ""));
  const { index } = bestHeader(filled.map(({ cells }) => cells));
  const unclosed = errors.find((error) => error.code === "MissingQuotes");
  return {
    delimiter,
    headers: filled[index]?.cells ?? [],
    rows: filled.slice(index + 1),
    titleLines: index,
    problems: unclosed ? ["A quotation mark is opened and never closed: close it, then try again."] : [],
  };
}

/** The table with one cell changed; the row keeps its line number. */
export function withCell(table: ImportTable, line: number, column: number, text: string): ImportTable {
  const rows = table.rows.map((row) => {
    if (row.line !== line) return row;
    const width = Math.max(row.cells.length, column + 1);
    const cells = Array.from({ length: width }, (_, i) =>
      i === column ? text.trim() : (row.cells[i] ?? ""),
    );
    return { line, cells };
  });
  return { ...table, rows };
}

/** Rows with the line of the file they start on; a quoted cell may hold line breaks. */
function numbered(data: readonly (readonly string[])[], skipped: number): TableRow[] {
  let line = 1 + skipped;
  return data.map((cells) => {
    const row = { line, cells: cells.map((cell) => cell.trim()) };
    line += 1 + cells.reduce((breaks, cell) => breaks + (cell.match(/\r\n|\r|\n/g)?.length ?? 0), 0);
    return row;
  });
}

function delimiterOf(text: string): string | null {
  let best: string | null = null;
  let most = 1;
  for (const delimiter of DELIMITERS) {
    const { data } = Papa.parse<string[]>(text, { delimiter, preview: 2 * MOST_TITLE_LINES });
    const lines = data.filter((cells) => cells.some((cell) => cell.trim() !== ""));
    const { known } = bestHeader(lines);
    if (known > most) {
      most = known;
      best = delimiter;
    }
  }
  return best;
}

/** The line with the most recognised columns among the first ones, and how many those are. */
function bestHeader(lines: readonly (readonly string[])[]): { index: number; known: number } {
  let best = { index: 0, known: 0 };
  for (const [index, cells] of lines.slice(0, MOST_TITLE_LINES).entries()) {
    const readings = cells.filter((cell) => /[a-z]/i.test(cell) && cell.length < 100).map(readHeader);
    const known = new Set(
      readings.filter(({ field }) => field !== "ignore").map(({ field, years }) => `${field} ${years}`),
    ).size;
    if (known > best.known) best = { index, known };
  }
  return best;
}
