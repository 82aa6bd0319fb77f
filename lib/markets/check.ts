import { Refusal } from "../platform/errors";
import { price } from "../pricing/price";
import type { MarketContent } from "./schema";

/**
 * Everything wrong with a market, by the rules of the pricing request: a probe of one riskless name is priced on it.
 * @throws Refusal with all problems at once; paths are those of the market's own fields.
 */
export function checkMarket(pricingDate: string, content: MarketContent): void {
  const { schedule } = content;
  const year = Number(pricingDate.slice(0, 4)) + 5;
  const outcome = price({
    format: 1,
    pricingDate,
    schedule:
      schedule.kind === "even"
        ? { kind: "even", years: 5, perYear: schedule.perYear }
        : { kind: "standard", maturity: `${year}-12-20`, holidays: schedule.holidays },
    discount: content.discount,
    pool: [{ id: "probe", notional: 1, recovery: 0, credit: { kind: "hazard", rate: 0 } }],
    correlation: { kind: "flat", rho: 0 },
    tranches: [],
  });
  if (outcome.ok) return;
  throw new Refusal(
    "invalid",
    outcome.problems.map((problem) => ({
      ...problem,
      path: problem.path === "pricingDate" ? problem.path : `content.${problem.path}`,
    })),
  );
}
