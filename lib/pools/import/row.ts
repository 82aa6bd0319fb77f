import type { NameInput } from "../../pricing/request";
import { type ImportProblem, RowCells } from "./cells";
import type { ColumnReading } from "./columns";
import { readCredit } from "./credit";
import type { TableRow } from "./table";

/** A row as read: the name where everything fits, else its problems. */
export interface ImportedRow extends TableRow {
  readonly name: NameInput | null;
  readonly problems: readonly ImportProblem[];
}

/** Reads one row; `seen` holds the ids of the rows before it with their lines. */
export function readRow(
  row: TableRow,
  columns: readonly ColumnReading[],
  seen: Map<string, number>,
): ImportedRow {
  const cells = new RowCells(row, columns);
  const beyond = row.cells.findIndex((cell, i) => i >= columns.length && cell !== "");
  if (beyond >= 0)
    cells.complain(beyond, "stands beyond the last header: a separator inside a text needs quotes");
  const id = readId(cells, seen);
  const texts = readTexts(cells);
  const notional = cells.required(
    "notional",
    (value) => value > 0 && value <= 1e15,
    "must be above 0 and at most 1e15",
  );
  const recovery = readRecovery(cells);
  const loading = readLoading(cells);
  const credit = readCredit(cells);
  const isWhole = cells.problems.length === 0 && notional !== null && recovery !== null && credit !== null;
  const name = isWhole
    ? { id, ...texts, notional, recovery, ...(loading === null ? {} : { loading }), credit }
    : null;
  return { ...row, name, problems: cells.problems };
}

/** The id, or the name where no id is given. */
function readId(cells: RowCells, seen: Map<string, number>): string {
  const given = cells.text("id");
  const id = given || cells.text("name");
  const position =
    (given ? cells.positions("id") : cells.positions("name"))[0] ?? cells.positions("id")[0] ?? 0;
  if (id === "") cells.complain(position, "is empty: a row needs an id or a name");
  else if (id.length > 200) cells.complain(position, "must have at most 200 characters");
  else if (seen.has(id)) cells.complain(position, `is already the id of line ${seen.get(id)}`);
  else seen.set(id, cells.row.line);
  return id;
}

function readTexts(cells: RowCells): Pick<NameInput, "name" | "sector"> {
  const [name, sector] = [cells.text("name"), cells.text("sector")];
  for (const [field, text] of [
    ["name", name],
    ["sector", sector],
  ] as const) {
    if (text.length > 500) cells.complain(cells.positions(field)[0]!, "must have at most 500 characters");
  }
  return { ...(name ? { name } : {}), ...(sector ? { sector } : {}) };
}

function readRecovery(cells: RowCells): number | null {
  if (cells.positions("recovery").length > 0) {
    const words = "must be at least 0 % and below 100 %";
    return cells.required("recovery", (value) => value >= 0 && value < 1, words);
  }
  const words = "must be above 0 % and at most 100 %";
  const loss = cells.required("lossGivenDefault", (value) => value > 0 && value <= 1, words);
  return loss === null ? null : Number((1 - loss).toPrecision(15));
}

function readLoading(cells: RowCells): number | null {
  const [i] = cells.positions("loading");
  const loading = i === undefined ? null : cells.number(i);
  if (loading !== null && !(loading > -1 && loading < 1)) cells.complain(i!, "must be above -1 and below 1");
  return loading;
}
