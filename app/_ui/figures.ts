/** How a figure is shown. The number itself is a decimal, an amount or a count of years. */
export type FigureUnit = "plain" | "percent" | "basisPoints" | "money" | "years";

const PLACES: Record<FigureUnit, number> = { plain: 0, percent: 2, basisPoints: 4, money: 0, years: 0 };

/** All digits of a figure in its unit, as copied and exported: the shortest text that is the same number. */
export function allDigits(value: number, unit: FigureUnit = "plain"): string {
  const [digits, exponent = "0"] = String(value).split("e");
  return String(Number(`${digits}e${Number(exponent) + PLACES[unit]}`));
}

/** A figure in its unit with four significant digits, whole digits grouped by thin spaces; amounts keep all whole digits. */
export function fourDigits(value: number, unit: FigureUnit = "plain"): string {
  const scaled = Number(allDigits(value, unit));
  if (scaled === 0) return "0";
  const size = Math.abs(scaled);
  if (size >= 1e4 || (unit === "money" && size >= 1)) {
    const rounded = unit === "money" ? Math.round(scaled) : Number(scaled.toPrecision(4));
    return grouped(String(rounded));
  }
  if (size < 1e-4) return scaled.toExponential(3);
  return String(Number(scaled.toPrecision(4)));
}

function grouped(digits: string): string {
  return digits.replace(/\B(?=(\d{3})+(?!\d))/g, "\u202f");
}
