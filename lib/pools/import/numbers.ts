/** How the numbers of a column are scaled. */
export const columnUnits = ["plain", "percent", "basisPoints", "thousands", "millions"] as const;
export type ColumnUnit = (typeof columnUnits)[number];

/** Which mark separates whole and decimal part in a column. */
export const decimalMarks = [".", ","] as const;
export type DecimalMark = (typeof decimalMarks)[number];

/** A cell's number with the unit written in the cell itself, if any. */
export interface CellNumber {
  readonly value: number;
  readonly unit: ColumnUnit | null;
}

/** How many cells prove each decimal mark, and how many could be read with either. */
export interface MarkEvidence {
  readonly comma: number;
  readonly point: number;
  readonly either: number;
}

/** Counts what cells prove about the decimal mark: 1.234,5 proves a comma, 0.400 a point, 8,000 nothing. */
export function markEvidence(cells: readonly string[]): MarkEvidence {
  const count = { comma: 0, point: 0, either: 0 };
  for (const cell of cells) {
    const found = provenMark(bare(cell));
    if (found) count[found]++;
  }
  return count;
}

function provenMark(text: string): keyof MarkEvidence | null {
  if (!/^[+-]?[\d.,'’ ]+(e[+-]?\d+)?$/i.test(text)) return null;
  const commas = text.split(",").length - 1;
  const points = text.split(".").length - 1;
  if (commas + points === 0) return null;
  if (commas > 0 && points > 0) return text.lastIndexOf(",") > text.lastIndexOf(".") ? "comma" : "point";
  if (commas > 1) return "point";
  if (points > 1) return "comma";
  if (/^[+-]?[1-9]\d{0,2}[.,]\d{3}$/.test(text)) return "either";
  return commas === 1 ? "comma" : "point";
}

/** Cells that stand for nothing. */
export function isBlank(cell: string): boolean {
  return /^(|[-–—.]+|n\/?a|n\.a\.|#n\/a|#value!|#ref!|null|none|nil)$/i.test(cell.trim());
}

const GROUPED = {
  ".": /^[+-]?(?:\d{1,3}(?:,\d{3})+|\d{1,3}(?:['’ ]\d{3})+|\d+|(?=\.\d))(?:\.\d*)?(?:e[+-]?\d+)?$/i,
  ",": /^[+-]?(?:\d{1,3}(?:\.\d{3})+|\d{1,3}(?:['’ ]\d{3})+|\d+|(?=,\d))(?:,\d*)?(?:e[+-]?\d+)?$/i,
} as const;

/**
 * The number in a cell: thousands marks in whole groups of three, currency signs, %, bp, k and m, and negatives in
 * parentheses are understood. Null where the cell is no number with that decimal mark: nothing is guessed.
 */
export function readNumber(cell: string, mark: DecimalMark): CellNumber | null {
  const isNegative = /^\s*\(.*\)\s*$/.test(cell);
  const text = bare(cell);
  if (!GROUPED[mark].test(text)) return null;
  const digits = text.replace(mark === "," ? /[.'’ ]/g : /[,'’ ]/g, "").replace(mark, ".");
  const value = Number(digits);
  return Number.isFinite(value) ? { value: isNegative ? -value : value, unit: unitOfCell(cell) } : null;
}

function unitOfCell(cell: string): ColumnUnit | null {
  if (/%/.test(cell)) return "percent";
  if (/\d\s*(bps?|basis points)\b/i.test(cell)) return "basisPoints";
  if (/\d\s*(m|mn|mm|mio|million)\b/i.test(cell)) return "millions";
  return /\d\s*(k|tsd)\b/i.test(cell) ? "thousands" : null;
}

/** The cell without outer spaces, currency, unit and parentheses; every kind of space and minus made plain. */
function bare(cell: string): string {
  return cell
    .replace(/[\u00a0\u2007\u2009\u202f\s]+/g, " ")
    .replace(/\u2212/g, "-")
    .replace(/\b(eur|usd|gbp|chf|jpy|sek|nok|dkk|cad|aud)\b/gi, "")
    .replace(/(\d)\s*(bps?|basis points|mio|mn|mm|million|m|k|tsd)\b\.?/gi, "$1")
    .replace(/[%€$£¥()]/g, "")
    .trim();
}

const PLACES: Record<ColumnUnit, number> = {
  plain: 0,
  percent: -2,
  basisPoints: -4,
  thousands: 3,
  millions: 6,
};

/** A number in a unit as a decimal or an amount: its decimal digits are shifted, so 35 % is 0.35 to the last bit. */
export function inUnit(value: number, unit: ColumnUnit): number {
  if (unit === "plain") return value;
  const [digits, exponent = "0"] = String(value).split("e");
  return Number(`${digits}e${Number(exponent) + PLACES[unit]}`);
}

/** The plain digits of a decimal or an amount in a unit; `inUnit` of them is the same number again. */
export function digitsIn(value: number, unit: ColumnUnit): string {
  const [mantissa = "", exponent = "0"] = Math.abs(value).toExponential().split("e");
  const digits = mantissa.replace(".", "");
  const point = Number(exponent) - PLACES[unit] + 1;
  const whole = point <= 0 ? "0" : digits.slice(0, point).padEnd(point, "0");
  const rest = point <= 0 ? "0".repeat(-point) + digits : digits.slice(point);
  const fraction = rest.replace(/0+$/, "");
  return `${value < 0 ? "-" : ""}${whole}${fraction ? `.${fraction}` : ""}`;
}
