import type { MarketContent } from "../markets/schema";
import type { Extra, NameInput, PricingRequest } from "../pricing/request";
import type { DealContent } from "./schema";

/** The parts of a deal that its request is made of. */
export interface DealParts {
  readonly content: DealContent;
  readonly currency: string;
  readonly names: readonly NameInput[];
  readonly pricingDate: string;
  readonly market: MarketContent;
}

const INCLUDED: Extra[] = ["lossLaw", "timeline"];

/** The pricing request of a deal; what does not fit together is for the request's own checks to say. */
export function toRequest({ content, currency, names, pricingDate, market }: DealParts): PricingRequest {
  const schedule =
    market.schedule.kind === "even"
      ? { kind: "even" as const, years: content.years ?? 0, perYear: market.schedule.perYear }
      : { kind: "standard" as const, maturity: content.maturity ?? "", holidays: market.schedule.holidays };
  return {
    format: 1,
    currency,
    pricingDate,
    schedule,
    discount: market.discount,
    pool: [...names],
    correlation: content.correlation,
    law: { kind: content.law },
    tranches: content.classes.map(({ name: _name, ...tranche }) => tranche),
    ...(content.nthToDefault.length > 0 ? { nthToDefault: content.nthToDefault } : {}),
    include: INCLUDED,
  };
}
