import { scaled, textOf } from "../platform/typed";
import type { QuotedMaturity } from "./schema";

/** Cells of a quote, in order: maturity, attachment, detachment, coupon, upfront. */
export const QUOTE_CELLS = 5;

/** What does not fit in a line of quotes, at one of its cells. */
export interface QuoteProblem {
  readonly line: number;
  readonly cell: number;
  readonly message: string;
}

export interface QuotesReading {
  readonly maturities: QuotedMaturity[];
  readonly problems: readonly QuoteProblem[];
  /** The line of each quote, in the order of maturities and their quotes. */
  readonly lines: readonly (readonly number[])[];
}

type Placed = { readonly line: number; readonly quote: QuotedMaturity["quotes"][number] };

/** The cells of each line of quotes, as typed or pasted: parted by tabs or semicolons, else by blanks. */
export function quoteCells(text: string): string[][] {
  return text.split(/\r?\n/).map((line) => {
    const cells = /[\t;]/.test(line)
      ? line.split(/[\t;]/).map((cell) => cell.trim())
      : line.trim().split(/\s+/);
    const filled = cells.filter((cell) => cell !== "%");
    return [...filled, ...Array<string>(Math.max(0, QUOTE_CELLS - filled.length)).fill("")];
  });
}

/** Reads quotes as typed or pasted: `maturity attachment% detachment% coupon-bp upfront%` a line; every problem by line and cell. */
export function readQuotes(text: string, isEven: boolean): QuotesReading {
  const problems: QuoteProblem[] = [];
  const byMaturity = new Map<string, Placed[]>();
  for (const [line, cells] of quoteCells(text).entries()) {
    if (cells.every((cell) => cell === "")) continue;
    if (cells.length > QUOTE_CELLS)
      problems.push({
        line,
        cell: QUOTE_CELLS - 1,
        message: `Line ${line + 1} has ${cells.length} cells, not the five that a quote has.`,
      });
    const [at = "", ...rest] = cells.slice(0, QUOTE_CELLS);
    if (!(isEven ? decimal(at) > 0 : /^\d{4}-\d{2}-\d{2}$/.test(at))) {
      const wanted = isEven ? "a number of years" : "a date YYYY-MM-DD";
      problems.push({ line, cell: 0, message: `Line ${line + 1}: the maturity "${at}" is not ${wanted}.` });
    }
    const numbers = rest.map(decimal);
    for (const [k, value] of numbers.entries())
      if (Number.isNaN(value)) {
        const message = `Line ${line + 1}: ${rest[k] === "" ? "a number is missing" : `"${rest[k]}" is not a number`}.`;
        problems.push({ line, cell: k + 1, message });
      }
    const [attachment = 0, detachment = 0, running = 0, upfront = 0] = numbers;
    const key = isEven ? String(decimal(at)) : at;
    const quote = {
      attachment: scaled(attachment, 100),
      detachment: scaled(detachment, 100),
      running: scaled(running, 10_000),
      upfront: scaled(upfront, 100),
    };
    byMaturity.set(key, [...(byMaturity.get(key) ?? []), { line, quote }]);
  }
  const sorted = [...byMaturity].map(
    ([at, placed]) =>
      [at, placed.sort((one, other) => one.quote.attachment - other.quote.attachment)] as const,
  );
  if (sorted.length === 0) problems.push({ line: 0, cell: 0, message: "Give at least one quote." });
  return {
    maturities: sorted.map(([at, placed]) => ({
      maturity: isEven ? null : at,
      years: isEven ? Number(at) : null,
      quotes: placed.map(({ quote }) => quote),
    })),
    lines: sorted.map(([, placed]) => placed.map(({ line }) => line)),
    problems,
  };
}

/** Quotes as a person would paste them. */
export function quotesText(maturities: readonly QuotedMaturity[]): string {
  return maturities
    .flatMap(({ maturity, years, quotes }) =>
      quotes.map(({ attachment, detachment, running, upfront }) =>
        [
          maturity ?? years,
          textOf(attachment, 100),
          textOf(detachment, 100),
          textOf(running, 10_000),
          textOf(upfront, 100),
        ].join("\t"),
      ),
    )
    .join("\n");
}

/** Cells laid over the grid's lines from one cell on, new lines below as needed; cells past the last column are left out. */
export function withCells(
  text: string,
  from: { readonly line: number; readonly cell: number },
  pasted: readonly (readonly string[])[],
): string {
  const lines = text === "" ? [] : quoteCells(text);
  for (const [i, cells] of pasted.entries()) {
    const at = from.line + i;
    while (lines.length <= at) lines.push(Array<string>(QUOTE_CELLS).fill(""));
    const line = lines[at]!;
    for (const [k, cell] of cells.entries())
      if (from.cell + k < QUOTE_CELLS) line[from.cell + k] = cell.replace(/[\t;]/g, " ").trim();
  }
  return lines.map((line) => line.join("\t")).join("\n");
}

function decimal(text: string): number {
  const plain = text
    .replace("\u2212", "-")
    .replace(/\s*(%|bp)$/, "")
    .replace(",", ".");
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : Number.NaN;
}
