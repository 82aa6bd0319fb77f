import type { MarketContent } from "../markets/schema";
import type { Extra, NameInput, PricingRequest } from "../pricing/request";
import { correlationOf } from "./correlation";
import type { DealContent } from "./schema";

/** The parts of a deal that its request is made of. */
export interface DealParts {
  readonly content: DealContent;
  readonly currency: string;
  readonly names: readonly NameInput[];
  readonly pricingDate: string;
  readonly market: MarketContent;
  /** Names of the market's quoted pools, by the pool's id. */
  readonly quotedNames: Readonly<Record<string, readonly NameInput[]>>;
}

const INCLUDED: Extra[] = ["lossLaw", "timeline"];

/** The pricing request of a deal; what does not fit together is for the request's own checks to say. */
export function toRequest(parts: DealParts): PricingRequest {
  const { content, currency, names, pricingDate, market } = parts;
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
    correlation: correlationOf(parts),
    law: { kind: content.law },
    tranches: content.classes.map(({ name: _name, ...tranche }) => tranche),
    ...(content.nthToDefault.length > 0 ? { nthToDefault: content.nthToDefault } : {}),
    include: INCLUDED,
  };
}
