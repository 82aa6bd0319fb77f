import type { PricingProblem } from "./problem";
import type { TrancheInput } from "./request";
import { sellerValue, valuedTranche } from "./trancheSection";
import { type Replacements, type Valuation, valuationOf } from "./valuation";

/** How every tranche's value moves from today's to a moved valuation's; null where either has none. */
export type Difference = (moved: Valuation | null, sign?: number) => (number | null)[];

/** Measures differences from the values of today. */
export function differenceFrom(today: readonly (number | null)[]): Difference {
  return (moved, sign = 1) => {
    const then = moved ? values(moved) : null;
    return today.map((value, i) => {
      const next = then?.[i];
      return value === null || next === null || next === undefined ? null : sign * (next - value);
    });
  };
}

/** The valuation with a coupon for every tranche. */
export function withCoupons(valuation: Valuation): Valuation {
  const tranches = valuation.request.tranches.map((tranche): TrancheInput => {
    if (tranche.running !== undefined) return tranche;
    const valued = valuedTranche(valuation, tranche);
    const par = valued && valued.legs.annuity !== 0 ? valued.legs.protection / valued.legs.annuity : 0;
    return { ...tranche, running: par };
  });
  return { ...valuation, request: { ...valuation.request, tranches } };
}

/** Every tranche's value to the seller in currency; null where it has none. */
export function values(valuation: Valuation): (number | null)[] {
  return valuation.request.tranches.map((tranche) => {
    const valued = valuedTranche(valuation, tranche);
    return (
      valued && sellerValue(valued, (tranche.detachment - tranche.attachment) * valuation.portfolio.notional)
    );
  });
}

/** The request valued again with parts replaced; the base curve stays as first solved. Null when a curve cannot be built. */
export function revalued(valuation: Valuation, replacements: Replacements | null): Valuation | null {
  if (!replacements || (replacements.names && replacements.names.length < valuation.names.length))
    return null;
  const problems: PricingProblem[] = [];
  const kept = valuation.base ? { baseNodes: valuation.base.nodes } : {};
  return valuationOf(valuation.request, problems, { market: valuation.market, ...kept, ...replacements });
}
