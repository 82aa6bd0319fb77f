import type { MarketContent, QuotedMaturity } from "../markets/schema";
import type { CorrelationInput, NameInput } from "../pricing/request";
import { nodesAt } from "../pricing/termNodes";
import type { DealContent } from "./schema";

/** What the correlation of a deal is made of. */
export interface CorrelationParts {
  readonly content: DealContent;
  readonly pricingDate: string;
  readonly market: MarketContent;
  readonly quotedNames: Readonly<Record<string, readonly NameInput[]>>;
}

const DAY = 86_400_000;

/**
 * The request's correlation of a deal. A curve of the market is taken by its quotes where the deal's maturity is quoted, else as
 * the nodes between the maturities around it, solved when the market was saved. A choice that the market does not have becomes a base
 * curve without nodes, which the request's own checks refuse.
 */
export function correlationOf({
  content,
  pricingDate,
  market,
  quotedNames,
}: CorrelationParts): CorrelationInput {
  const { correlation } = content;
  if (correlation.kind !== "market") return correlation;
  const { interpolation, beyond, mapping } = correlation;
  const reading = { kind: "base" as const, interpolation, beyond, mapping };
  const quoted = market.quotedPools?.find(({ key }) => key === correlation.quotedPool);
  const names = quoted ? quotedNames[quoted.poolId] : undefined;
  if (!quoted || !names) return { ...reading, nodes: [] };
  const index = { pool: [...names] };
  const isEven = market.schedule.kind === "even";
  const exact = quoted.maturities.find(({ maturity, years }) =>
    isEven ? years === content.years : maturity === content.maturity,
  );
  if (exact) return { ...reading, quotes: exact.quotes, index };
  const yearsOf = ({ maturity, years }: Pick<QuotedMaturity, "maturity" | "years">) =>
    isEven ? (years ?? 0) : (Date.parse(maturity ?? "") - Date.parse(pricingDate)) / DAY / 365;
  const curves = quoted.maturities
    .flatMap((row) => (row.solved?.length ? [{ years: yearsOf(row), nodes: row.solved }] : []))
    .sort((one, other) => one.years - other.years);
  const years = yearsOf(content);
  if (curves.length === 0 || !Number.isFinite(years)) return { ...reading, nodes: [], index };
  return { ...reading, nodes: nodesAt(curves, years, { interpolation, beyond }), index };
}
