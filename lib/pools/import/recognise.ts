import { type ColumnField, type ColumnReading, readHeader, textFields } from "./columns";
import {
  type ColumnUnit,
  type DecimalMark,
  isBlank,
  type MarkEvidence,
  markEvidence,
  readNumber,
} from "./numbers";
import type { ImportTable } from "./table";

/**
 * How each column of a table is read: fields from the headers, units from headers, cells and the size of the numbers, the
 * decimal mark from what the column's own cells prove, else from the other columns. A column that names a field already
 * taken is left out. Doubts are remarks.
 */
export function recogniseColumns(table: ImportTable): ColumnReading[] {
  const used = new Set<string>();
  const fields = table.headers.map((header) => {
    const reading = readHeader(header);
    const key = `${reading.field} ${reading.years}`;
    if (reading.field === "ignore" || !used.has(key)) {
      used.add(key);
      return { header, ...reading, remark: null };
    }
    const remark = "Left out: another column is already read as this.";
    return { header, field: "ignore" as const, unit: null, years: null, remark };
  });
  const cells = table.headers.map((_, i) => table.rows.map((row) => row.cells[i] ?? ""));
  const evidence = fields.map(({ field }, i) =>
    textFields.includes(field) ? null : markEvidence(cells[i]!),
  );
  const shared = sharedMark(evidence.filter((found) => found !== null));
  return fields.map((reading, i) => {
    const found = evidence[i];
    if (!found) return { ...reading, unit: "plain", mark: shared ?? "." };
    const { mark, remark } = markOf(found, shared);
    const unit = unitOf(reading.field, reading.unit, cells[i]!, mark);
    return { ...reading, mark, unit: unit.unit, remark: remark ?? unit.remark };
  });
}

/** The currency that the notional's header names, null where it names none (codes of ISO 4217). */
export function currencyOf(columns: readonly ColumnReading[]): string | null {
  const header = columns.find(({ field }) => field === "notional")?.header ?? "";
  const codes = header.match(/\b[A-Z]{3}\b/g) ?? [];
  return codes.find((code) => Intl.supportedValuesOf("currency").includes(code)) ?? null;
}

/** The mark the table's columns agree on, null where they do not or prove nothing. */
function sharedMark(evidence: readonly MarkEvidence[]): DecimalMark | null {
  const comma = evidence.filter((found) => found.comma > found.point).length;
  const point = evidence.filter((found) => found.point > found.comma).length;
  if (comma === point) return null;
  return comma > point ? "," : ".";
}

function markOf(
  { comma, point, either }: MarkEvidence,
  shared: DecimalMark | null,
): { mark: DecimalMark; remark: string | null } {
  if (comma > 0 && point > 0) {
    const mark = comma > point ? "," : ".";
    const remark = `Cells disagree: ${comma} have a decimal comma, ${point} a decimal point.`;
    return { mark, remark };
  }
  if (comma > 0) return { mark: ",", remark: null };
  if (point > 0) return { mark: ".", remark: null };
  const remark =
    either > 0 && shared === null
      ? "Nothing shows whether 8,000 is eight thousand: it is read so. Change the decimal mark if it is not."
      : null;
  return { mark: shared ?? ".", remark };
}

const shareFields: readonly ColumnField[] = [
  "recovery",
  "lossGivenDefault",
  "yearly",
  "cumulative",
  "upfront",
];

/** The unit named by the header, else by a cell, else the one that the size of the numbers leaves. */
function unitOf(
  field: ColumnField,
  named: ColumnUnit | null,
  cells: readonly string[],
  mark: DecimalMark,
): { unit: ColumnUnit; remark: string | null } {
  const numbers = cells
    .map((cell) => (isBlank(cell) ? null : readNumber(cell, mark)))
    .filter((n) => n !== null);
  const largest = numbers.reduce((most, number) => Math.max(most, Math.abs(number.value)), 0);
  if (named === "percent" && shareFields.slice(0, 2).includes(field) && numbers.length > 0 && largest <= 1) {
    return { unit: "percent", remark: "The header says %, yet no number is above 1: are these decimals?" };
  }
  if (named !== null) return { unit: named, remark: null };
  const written = numbers.find((number) => number.unit)?.unit;
  if (written) return { unit: written, remark: null };
  if (field === "spread" || field === "coupon") return quotedUnit(largest);
  if (!shareFields.includes(field)) return { unit: "plain", remark: null };
  if (largest > 1) return { unit: "percent", remark: "Read as % because numbers are above 1." };
  const isDoubtful = (field === "yearly" || field === "cumulative") && largest > 0.3;
  return { unit: "plain", remark: isDoubtful ? `Read as decimals: ${largest} is ${100 * largest} %.` : null };
}

function quotedUnit(largest: number): { unit: ColumnUnit; remark: string | null } {
  if (largest <= 0.5) return { unit: "plain", remark: null };
  const remark =
    largest < 20
      ? "Read as basis points, yet the largest is below 20: are these %?"
      : "Read as basis points because of the size of the numbers.";
  return { unit: "basisPoints", remark };
}
