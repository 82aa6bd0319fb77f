import type { CreditInput, NameInput } from "../../pricing/request";
import { type ColumnField, type ColumnReading, type ColumnUnit, readHeader, textFields } from "./columns";
import { asDecimal, type DecimalMark, decimalMark, readNumber } from "./numbers";
import { type ImportTable, readTable } from "./table";

/** One thing wrong in a table, by its place in the file. */
export interface ImportProblem {
  readonly line: number;
  readonly column: string;
  readonly value: string;
  readonly reason: string;
}

/** A row as read: the name where everything fits, else its problems. */
export interface ImportedRow {
  readonly line: number;
  readonly cells: readonly string[];
  readonly name: NameInput | null;
  readonly problems: readonly ImportProblem[];
}

/** A whole table as read. */
export interface ImportReading {
  readonly columns: readonly ColumnReading[];
  readonly rows: readonly ImportedRow[];
  readonly titleLines: number;
  /** The totals line at the bottom, set aside. */
  readonly totals: {
    readonly line: number;
    readonly cells: readonly string[];
    readonly remark: string | null;
  } | null;
  /** Wrong with the table as a whole. */
  readonly problems: readonly string[];
}

/** Reads a table with the columns as recognised, or as the reader changed them. */
export function readPool(text: string, columns?: readonly ColumnReading[]): ImportReading {
  const table = readTable(text);
  if (!table) {
    const reason =
      "No header line was found: the first line should name the columns (id, name, notional, recovery, spread …).";
    return { columns: [], rows: [], titleLines: 0, totals: null, problems: [reason] };
  }
  return readRows(table, columns ?? recognised(table));
}

/** The columns of a table: headers first, then units from the cells and from the size of the numbers. */
function recognised(table: ImportTable): ColumnReading[] {
  const used = new Set<string>();
  return table.headers.map((header, i) => {
    const reading = readHeader(header);
    const key = `${reading.field} ${reading.years}`;
    if (reading.field !== "ignore" && used.has(key)) return { ...reading, field: "ignore", years: null };
    used.add(key);
    if (textFields.includes(reading.field) || reading.unit !== "plain") return reading;
    return {
      ...reading,
      unit: unitFromCells(
        reading.field,
        table.rows.map(({ cells }) => cells[i] ?? ""),
      ),
    };
  });
}

function unitFromCells(field: ColumnField, cells: readonly string[]): ColumnUnit {
  const mark = decimalMark(cells);
  const numbers = cells.map((cell) => readNumber(cell, mark)).filter((number) => number !== null);
  const written = numbers.find((number) => number.unit)?.unit;
  if (written) return written;
  const largest = numbers.reduce((most, number) => Math.max(most, Math.abs(number.value)), 0);
  if (field === "spread" || field === "coupon") return largest > 1 ? "basisPoints" : "plain";
  if (["recovery", "lossGivenDefault", "yearly", "cumulative", "upfront"].includes(field))
    return largest > 1 ? "percent" : "plain";
  return "plain";
}

function readRows(table: ImportTable, columns: readonly ColumnReading[]): ImportReading {
  const marks = columns.map((column, i) =>
    textFields.includes(column.field) ? "." : decimalMark(table.rows.map(({ cells }) => cells[i] ?? "")),
  );
  const { body, totals } = withoutTotals(table, columns, marks);
  const seen = new Map<string, number>();
  const rows = body.map(({ line, cells }) => readRow(line, cells, columns, marks, seen));
  return { columns, rows, titleLines: table.titleLines, totals, problems: missingColumns(columns) };
}

function missingColumns(columns: readonly ColumnReading[]): string[] {
  const has = (...fields: ColumnField[]) => columns.some((column) => fields.includes(column.field));
  const problems: string[] = [];
  if (!has("id", "name")) problems.push("No column is read as id or name.");
  if (!has("notional")) problems.push("No column is read as notional.");
  if (!has("recovery", "lossGivenDefault")) problems.push("No column is read as recovery.");
  if (!has("spread", "yearly", "cumulative", "hazard", "upfront")) {
    problems.push(
      "No column is read as a credit input: spread, default probability, hazard, or upfront with coupon.",
    );
  }
  return problems;
}

/** Takes a totals line off the bottom: it says so, or has a notional but neither id nor name. */
function withoutTotals(table: ImportTable, columns: readonly ColumnReading[], marks: readonly DecimalMark[]) {
  const rows = [...table.rows];
  const last = rows[rows.length - 1];
  const position = (field: ColumnField) => columns.findIndex((column) => column.field === field);
  const [id, name, notional] = [position("id"), position("name"), position("notional")];
  if (!last || rows.length < 2) return { body: rows, totals: null };
  const says = last.cells.some((cell) =>
    /^(grand )?(total|totals|sum|summe|gesamt|totale|somme)\b/i.test(cell),
  );
  const isNameless = !(last.cells[id] || last.cells[name]) && notional >= 0 && Boolean(last.cells[notional]);
  if (!says && !isNameless) return { body: rows, totals: null };
  rows.pop();
  const stated = notional >= 0 ? readNumber(last.cells[notional] ?? "", marks[notional]!)?.value : undefined;
  const sum = rows.reduce(
    (total, { cells }) => total + (readNumber(cells[notional] ?? "", marks[notional] ?? ".")?.value ?? 0),
    0,
  );
  const isOff = stated !== undefined && Math.abs(stated - sum) > 1e-6 * Math.abs(sum);
  return {
    body: rows,
    totals: { ...last, remark: isOff ? `It says ${stated}, the rows sum to ${sum}.` : null },
  };
}

function readRow(
  line: number,
  cells: readonly string[],
  columns: readonly ColumnReading[],
  marks: readonly DecimalMark[],
  seen: Map<string, number>,
): ImportedRow {
  const problems: ImportProblem[] = [];
  const complain = (i: number, reason: string) => {
    problems.push({ line, column: columns[i]?.header ?? "", value: cells[i] ?? "", reason });
  };
  const text = (field: ColumnField) => {
    const i = columns.findIndex((column) => column.field === field);
    return i < 0 ? "" : (cells[i] ?? "");
  };
  const number = (i: number): number | null => {
    const cell = cells[i] ?? "";
    if (cell === "" || /^(-|n\/?a|#n\/a|null)$/i.test(cell)) return null;
    const found = readNumber(cell, marks[i]!);
    if (!found) complain(i, "is not a number");
    return found && asDecimal(found.value, found.unit ?? columns[i]!.unit);
  };
  const of = (field: ColumnField) => columns.flatMap((column, i) => (column.field === field ? [i] : []));
  const required = (field: ColumnField, check: (value: number) => string | null): number | null => {
    const i = of(field)[0];
    if (i === undefined) return null;
    const before = problems.length;
    const value = number(i);
    if (value === null) {
      if (problems.length === before) complain(i, "is empty");
      return null;
    }
    const reason = check(value);
    if (reason) complain(i, reason);
    return reason ? null : value;
  };

  const name = text("name");
  const id = text("id") || name;
  const idColumn = of("id")[0] ?? of("name")[0] ?? 0;
  if (id === "") complain(idColumn, "is empty: a name needs an id or a name");
  else if (seen.has(id)) complain(idColumn, `is already the id of line ${seen.get(id)}`);
  else seen.set(id, line);
  if (id.length > 200) complain(idColumn, "is longer than 200 characters");
  const notional = required("notional", (value) => (value > 0 ? null : "must be above 0"));
  const recovery =
    of("recovery").length > 0
      ? required("recovery", (value) =>
          value >= 0 && value < 1 ? null : "must be at least 0 and below 100 %",
        )
      : complement(
          required("lossGivenDefault", (value) =>
            value > 0 && value <= 1 ? null : "must be above 0 and at most 100 %",
          ),
        );
  const loadingColumn = of("loading")[0];
  const loading = loadingColumn === undefined ? null : number(loadingColumn);
  if (loading !== null && !(loading > -1 && loading < 1))
    complain(loadingColumn!, "must be above -1 and below 1");
  const credit = readCredit(columns, of, number, complain);
  if (problems.length > 0 || notional === null || recovery === null || credit === null) {
    return { line, cells, name: null, problems };
  }
  const sector = text("sector");
  return {
    line,
    cells,
    problems,
    name: {
      id,
      ...(name ? { name } : {}),
      ...(sector ? { sector } : {}),
      notional,
      recovery,
      ...(loading === null ? {} : { loading }),
      credit,
    },
  };
}

function complement(value: number | null): number | null {
  return value === null ? null : Number((1 - value).toPrecision(15));
}

/** The row's credit input: the first kind of column that has a value. */
function readCredit(
  columns: readonly ColumnReading[],
  of: (field: ColumnField) => number[],
  number: (i: number) => number | null,
  complain: (i: number, reason: string) => void,
): CreditInput | null {
  const nodes = (field: "spread" | "cumulative") =>
    of(field)
      .map((i) => ({ i, years: columns[i]!.years ?? 5, value: number(i) }))
      .filter((node): node is { i: number; years: number; value: number } => node.value !== null)
      .sort((one, other) => one.years - other.years);
  const spreads = nodes("spread");
  if (spreads.length > 0) {
    const wrong = spreads.filter((node) => node.value < 0);
    for (const node of wrong) complain(node.i, "must not be negative");
    return wrong.length > 0
      ? null
      : { kind: "spread", nodes: spreads.map(({ years, value }) => ({ years, spread: value })) };
  }
  const cumulative = nodes("cumulative");
  if (cumulative.length > 0) {
    let highest = 0;
    let isFine = true;
    for (const node of cumulative) {
      const reason =
        node.value < 0 || node.value > 1
          ? "must be a probability"
          : node.value < highest
            ? "must not be below that of a shorter time"
            : null;
      if (reason) complain(node.i, reason);
      isFine &&= reason === null;
      highest = Math.max(highest, node.value);
    }
    return isFine
      ? { kind: "cumulative", nodes: cumulative.map(({ years, value }) => ({ years, probability: value })) }
      : null;
  }
  const single = (field: ColumnField) => {
    const i = of(field)[0];
    return i === undefined ? null : { i, value: number(i) };
  };
  const yearly = single("yearly");
  if (yearly?.value != null) {
    if (yearly.value >= 0 && yearly.value <= 1) return { kind: "yearly", probability: yearly.value };
    complain(yearly.i, "must be a probability between 0 and 100 %");
    return null;
  }
  const hazard = single("hazard");
  if (hazard?.value != null) {
    if (hazard.value >= 0) return { kind: "hazard", rate: hazard.value };
    complain(hazard.i, "must not be negative");
    return null;
  }
  return readUpfront(columns, single, of, complain);
}

function readUpfront(
  columns: readonly ColumnReading[],
  single: (field: ColumnField) => { i: number; value: number | null } | null,
  of: (field: ColumnField) => number[],
  complain: (i: number, reason: string) => void,
): CreditInput | null {
  const upfront = single("upfront");
  if (upfront?.value != null) {
    const coupon = single("coupon");
    if (coupon?.value == null) {
      complain(upfront.i, "needs a coupon column beside it");
      return null;
    }
    return {
      kind: "upfront",
      years: columns[upfront.i]!.years ?? 5,
      upfront: upfront.value,
      coupon: coupon.value,
    };
  }
  const first = (["spread", "cumulative", "yearly", "hazard", "upfront"] as const).flatMap((field) =>
    of(field),
  )[0];
  if (first !== undefined) complain(first, "is empty: the name has no credit input");
  return null;
}
