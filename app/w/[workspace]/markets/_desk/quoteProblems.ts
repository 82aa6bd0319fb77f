import { type QuoteProblem, readQuotes } from "@/lib/markets/quotesText";
import type { FieldsProps } from "./fields";

const cellOf: Record<string, number> = {
  maturity: 0,
  years: 0,
  attachment: 1,
  detachment: 2,
  running: 3,
  upfront: 4,
};

/** Everything wrong with a quoted pool's quotes at their cells: what does not read, and what the server refused by path. */
export function quoteProblems(
  text: string,
  isEven: boolean,
  told: FieldsProps["problems"],
  at: string,
): readonly QuoteProblem[] {
  const { problems, lines } = readQuotes(text, isEven);
  const below = `${at}.maturities.`;
  const refused = Object.entries(told).flatMap(([path, message]): QuoteProblem[] => {
    if (!path.startsWith(below)) return [];
    const parts = path.slice(below.length).split(".");
    const quotes = lines[Number(parts[0])] ?? [];
    const isQuote = parts[1] === "quotes" && parts[2] !== undefined;
    const line = (isQuote ? quotes[Number(parts[2])] : quotes[0]) ?? 0;
    return [{ line, cell: cellOf[parts.at(-1) ?? ""] ?? 0, message: `Line ${line + 1}: ${message}` }];
  });
  const isBegun = text.trim() !== "" || `${at}.maturities` in told;
  return isBegun ? [...problems, ...refused] : refused;
}
