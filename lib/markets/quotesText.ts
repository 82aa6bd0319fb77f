import type { QuotedMaturity } from "./schema";

/** Reads quotes as pasted: `maturity attachment% detachment% coupon-bp upfront%` a line; problems say the line. */
export function readQuotes(
  text: string,
  isEven: boolean,
): { readonly maturities: QuotedMaturity[]; readonly problems: readonly string[] } {
  const problems: string[] = [];
  const byMaturity = new Map<string, QuotedMaturity["quotes"]>();
  for (const [i, line] of text.split(/\r?\n/).entries()) {
    if (line.trim() === "") continue;
    const cells = line
      .trim()
      .split(/[\t;]|\s+/)
      .filter((cell) => cell !== "" && cell !== "%");
    const [at = "", ...rest] = cells;
    const numbers = rest.map(decimal);
    if (cells.length !== 5) {
      problems.push(`Line ${i + 1} has ${cells.length} cells, not the five that a quote has.`);
      continue;
    }
    const isPlace = isEven ? decimal(at) > 0 : /^\d{4}-\d{2}-\d{2}$/.test(at);
    if (!isPlace)
      problems.push(
        `Line ${i + 1}: the maturity "${at}" is not ${isEven ? "a number of years" : "a date YYYY-MM-DD"}.`,
      );
    for (const [k, value] of numbers.entries())
      if (Number.isNaN(value)) problems.push(`Line ${i + 1}: "${rest[k]}" is not a number.`);
    const [attachment = 0, detachment = 0, running = 0, upfront = 0] = numbers;
    const known = byMaturity.get(at) ?? [];
    known.push({
      attachment: scaled(attachment, 100),
      detachment: scaled(detachment, 100),
      running: scaled(running, 10_000),
      upfront: scaled(upfront, 100),
    });
    byMaturity.set(at, known);
  }
  const maturities = [...byMaturity].map(([at, quotes]) => ({
    maturity: isEven ? null : at,
    years: isEven ? decimal(at) : null,
    quotes: quotes.sort((one, other) => one.attachment - other.attachment),
  }));
  if (maturities.length === 0 && problems.length === 0) problems.push("Give at least one quote.");
  return { maturities, problems };
}

/** Quotes as a person would paste them. */
export function quotesText(maturities: readonly QuotedMaturity[]): string {
  return maturities
    .flatMap(({ maturity, years, quotes }) =>
      quotes.map(({ attachment, detachment, running, upfront }) =>
        [
          maturity ?? years,
          shown(attachment, 100),
          shown(detachment, 100),
          shown(running, 10_000),
          shown(upfront, 100),
        ].join("\t"),
      ),
    )
    .join("\n");
}

function decimal(text: string): number {
  const plain = text.replace("\u2212", "-").replace(/%$/, "").replace(",", ".");
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : Number.NaN;
}

function scaled(value: number, by: number): number {
  return Number((value / by).toPrecision(15));
}

function shown(value: number, by: number): string {
  return String(Number((value * by).toPrecision(15)));
}
