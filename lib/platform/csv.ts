import Papa from "papaparse";

/** A cell: text, number, or nothing. */
export type Cell = string | number | null;

/**
 * A text cell that a spreadsheet would take for a formula gets a leading apostrophe (OWASP, CSV Injection), and so does one
 * that looks as if it had got it already; plain numbers never do.
 */
export function safeCell(text: string): string {
  const isNumber = /^[+-]?\d+([.,]\d+)*%?$/.test(text);
  return /^'*[=+\-@\t\r]/.test(text) && !isNumber ? `'${text}` : text;
}

/** The text that `safeCell` was given. */
export function plainCell(text: string): string {
  return text.replace(/^'(?='*[=+\-@\t\r])/, "");
}

/** Rows as CSV with a byte-order mark, text cells made safe, numbers in full. */
export function toCsv(headers: readonly string[], rows: readonly (readonly Cell[])[]): string {
  const safe = (cell: Cell) => (typeof cell === "string" ? safeCell(cell) : cell);
  const data = rows.map((row) => row.map(safe));
  return `\ufeff${Papa.unparse({ fields: headers.map(safeCell), data })}\r\n`;
}
