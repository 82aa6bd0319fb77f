import type { ColumnUnit } from "./columns";

/** Which mark separates whole and decimal part in a column. */
export type DecimalMark = "." | ",";

/** A cell's number with the unit written in the cell itself, if any. */
export interface CellNumber {
  readonly value: number;
  readonly unit: ColumnUnit | null;
}

/** The decimal mark of a column, from whatever its cells prove; a point where nothing does. */
export function decimalMark(cells: readonly string[]): DecimalMark {
  let comma = 0;
  let point = 0;
  for (const cell of cells) {
    const text = bare(cell);
    const lastComma = text.lastIndexOf(",");
    const lastPoint = text.lastIndexOf(".");
    if (lastComma >= 0 && lastPoint >= 0) lastComma > lastPoint ? comma++ : point++;
    else if (lastComma >= 0) {
      if ((text.match(/,/g)?.length ?? 0) > 1) point++;
      else if (!/^-?\d{1,3},\d{3}$/.test(text)) comma++;
    } else if (lastPoint >= 0) {
      if ((text.match(/\./g)?.length ?? 0) > 1) comma++;
      else if (!/^-?\d{1,3}\.\d{3}$/.test(text)) point++;
    }
  }
  return comma > point ? "," : ".";
}

/** The number in a cell: thousands marks, currency signs, %, bp and parentheses understood; null when it is none. */
export function readNumber(cell: string, mark: DecimalMark): CellNumber | null {
  const unit = /%/.test(cell) ? "percent" : /\bbps?\b\.?/i.test(cell) ? "basisPoints" : null;
  const isNegative = /^\s*\(.*\)\s*$/.test(cell);
  const text = bare(cell);
  if (text === "") return null;
  const thousands = mark === "," ? /[.'’\s]/g : /[,'’\s]/g;
  const number = text.replace(thousands, "").replace(mark, ".");
  if (!/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(number)) return null;
  const value = Number(number);
  return Number.isFinite(value) ? { value: isNegative ? -value : value, unit } : null;
}

/** The cell without spaces around, currency, units and parentheses. */
function bare(cell: string): string {
  return cell
    .replace(/[    \s]/g, " ")
    .replace(/\b(bps?|eur|usd|gbp|chf|mio|mn|m)\b\.?/gi, "")
    .replace(/[%€$£()]/g, "")
    .replace(/−/g, "-")
    .trim()
    .replace(/(\d) (?=\d{3}\b)/g, "$1");
}

/** A number in a unit as a decimal. */
export function asDecimal(value: number, unit: ColumnUnit): number {
  if (unit === "percent") return cleaned(value / 100);
  return unit === "basisPoints" ? cleaned(value / 10_000) : value;
}

/** 0.35 rather than 0.35000000000000003: the decimal that was meant. */
function cleaned(value: number): number {
  return Number(value.toPrecision(15));
}
