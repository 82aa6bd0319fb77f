import { type MarketTable, marketTable } from "../pricing/marketTable";
import type { MarketContent } from "./schema";

/** Years at which a market is shown. */
export const SHOWN_YEARS = [0.25, 0.5, 1, 2, 3, 4, 5, 7, 10] as const;
/** Maturity of the contract whose payments show the schedule rule, years. */
export const SHOWN_MATURITY = 5;

/** A market read by the pricing core: discount factors and the payments of a five-year contract, or every problem. */
export function readMarket(pricingDate: string, { discount, schedule }: MarketContent): MarketTable {
  const year = Number(pricingDate.slice(0, 4)) + SHOWN_MATURITY;
  return marketTable(
    {
      pricingDate,
      discount,
      schedule:
        schedule.kind === "even"
          ? { kind: "even", years: SHOWN_MATURITY, perYear: schedule.perYear }
          : { kind: "standard", maturity: `${year}-12-20`, holidays: schedule.holidays },
    },
    SHOWN_YEARS,
  );
}

/** Everything wrong with a market; paths are its own fields'. */
export function marketProblems(pricingDate: string, content: MarketContent) {
  const read = readMarket(pricingDate, content);
  if (read.ok) return [];
  return read.problems.map((problem) => ({
    ...problem,
    path: problem.path === "pricingDate" ? problem.path : `content.${problem.path}`,
  }));
}
