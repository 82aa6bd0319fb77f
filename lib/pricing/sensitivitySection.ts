import { formatDay, parseDay } from "../quant/market/calendar";
import { shiftZeroRates } from "../quant/market/discountCurve";
import { defaultedName } from "../quant/market/survivalCurve";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import { bumpedName, type NameBump } from "./bumps";
import type { PricingProblem } from "./problem";
import type { SensitivityReport } from "./report";
import type { TrancheInput } from "./request";
import { sellerValue, valuedTranche } from "./trancheSection";
import { type Replacements, type Valuation, valuationOf } from "./valuation";

const BASIS_POINT = 1e-4;
const ONE_PERCENT = 0.01;

/**
 * Sensitivities of every tranche's value to the protection seller, in currency, by definite bumps and full revaluation.
 * A tranche without a running coupon is valued at its own par spread, held fixed.
 */
export function sensitivityReports(valuation: Valuation): SensitivityReport[] {
  const priced = withCoupons(valuation);
  const today = values(priced);
  const difference = (moved: Valuation | null, sign = 1): (number | null)[] => {
    const then = moved ? values(moved) : null;
    return today.map((value, i) => {
      const next = then?.[i];
      return value === null || next === null || next === undefined ? null : sign * (next - value);
    });
  };
  const spread01 = difference(revalued(priced, { names: allBumped(priced, { shift: BASIS_POINT }) }));
  const recovery01 = recoveryDifference(priced, difference);
  const correlation01 = correlationDifference(priced, difference);
  const rate01 = difference(rateShifted(priced));
  const carry = difference(nextDay(priced));
  const byName = namesDifferences(priced, difference, today);
  return today.map((_, i) => ({
    spread01: spread01[i]!,
    recovery01: recovery01[i]!,
    correlation01: correlation01[i]!,
    rate01: rate01[i]!,
    carry1d: carry[i]!,
    byName: byName.map((name) => ({
      id: name.id,
      spread01: name.spread01[i]!,
      jumpToDefault: name.jumpToDefault[i]!,
    })),
  }));
}

type Difference = (moved: Valuation | null, sign?: number) => (number | null)[];

/** The valuation with a coupon for every tranche. */
function withCoupons(valuation: Valuation): Valuation {
  const tranches = valuation.request.tranches.map((tranche): TrancheInput => {
    if (tranche.running !== undefined) return tranche;
    const valued = valuedTranche(valuation, tranche);
    const par = valued && valued.legs.annuity !== 0 ? valued.legs.protection / valued.legs.annuity : 0;
    return { ...tranche, running: par };
  });
  return { ...valuation, request: { ...valuation.request, tranches } };
}

function values(valuation: Valuation): (number | null)[] {
  return valuation.request.tranches.map((tranche) => {
    const valued = valuedTranche(valuation, tranche);
    return (
      valued && sellerValue(valued, (tranche.detachment - tranche.attachment) * valuation.portfolio.notional)
    );
  });
}

/** The request valued again with parts replaced; the base curve stays as first solved. Null when a curve cannot be built. */
function revalued(valuation: Valuation, replacements: Replacements | null): Valuation | null {
  if (!replacements || (replacements.names && replacements.names.length < valuation.names.length))
    return null;
  const problems: PricingProblem[] = [];
  const kept = valuation.base ? { baseNodes: valuation.base.nodes } : {};
  return valuationOf(valuation.request, problems, { market: valuation.market, ...kept, ...replacements });
}

function allBumped({ request, names, market }: Valuation, bump: NameBump): PortfolioName[] {
  return names.flatMap((name, i) => bumpedName(request.pool[i]!, name, market, bump) ?? []);
}

/** +1 % recovery, spreads kept; where a recovery would reach one the bump goes inward and the sign is kept. */
function recoveryDifference(valuation: Valuation, difference: Difference): (number | null)[] {
  const isInward = valuation.names.some((name) => name.recovery + ONE_PERCENT >= 1);
  const recovery = isInward ? -ONE_PERCENT : ONE_PERCENT;
  return difference(revalued(valuation, { names: allBumped(valuation, { recovery }) }), isInward ? -1 : 1);
}

/** +1 % on the flat correlation or the whole base curve; near one the bump goes inward and the sign is kept. */
function correlationDifference(valuation: Valuation, difference: Difference): (number | null)[] {
  const { correlation } = valuation.request;
  if (valuation.base) {
    const isInward = valuation.base.nodes.some((node) => node.rho + ONE_PERCENT > 1);
    const shift = isInward ? -ONE_PERCENT : ONE_PERCENT;
    const baseNodes = valuation.base.nodes.map((node) => ({ ...node, rho: Math.max(0, node.rho + shift) }));
    return difference(revalued(valuation, { names: valuation.names, baseNodes }), isInward ? -1 : 1);
  }
  if (correlation.kind !== "flat") return difference(null);
  const isInward = correlation.rho + ONE_PERCENT > 1;
  const rho = correlation.rho + (isInward ? -ONE_PERCENT : ONE_PERCENT);
  return difference(revalued(valuation, { names: valuation.names, rho }), isInward ? -1 : 1);
}

/** Zero curve +1 bp, spreads kept. */
function rateShifted(valuation: Valuation): Valuation | null {
  const market = { ...valuation.market, discount: shiftZeroRates(valuation.market.discount, BASIS_POINT) };
  return revalued(valuation, { market, names: allBumped(valuation, { market }) });
}

/** The next calendar day, inputs kept; standard schedule only. */
function nextDay({ request }: Valuation): Valuation | null {
  if (request.schedule.kind !== "standard") return null;
  const tomorrow = parseDay(request.pricingDate!)! + 1;
  if (tomorrow >= parseDay(request.schedule.maturity)!) return null;
  return valuationOf({ ...request, pricingDate: formatDay(tomorrow) }, []);
}

interface NameDifference {
  readonly id: string;
  readonly spread01: (number | null)[];
  readonly jumpToDefault: (number | null)[];
}

/** Name by name; names alike in everything but their id are valued once. Names already in default have none. */
function namesDifferences(
  valuation: Valuation,
  difference: Difference,
  today: (number | null)[],
): NameDifference[] {
  const { request, names, market } = valuation;
  const known = new Map<string, Omit<NameDifference, "id">>();
  return request.pool.map((input, i) => {
    const name = names[i]!;
    if (name.curve.defaulted)
      return { id: name.id, spread01: today.map(() => null), jumpToDefault: today.map(() => null) };
    const key = JSON.stringify([input.notional, input.recovery, input.loading, input.sector, input.credit]);
    let found = known.get(key);
    if (!found) {
      const bumped = bumpedName(input, name, market, { shift: BASIS_POINT });
      found = {
        spread01: difference(bumped && revalued(valuation, { names: replaced(names, i, bumped) })),
        jumpToDefault: jumpToDefault(valuation, i, today),
      };
      known.set(key, found);
    }
    return { id: name.id, ...found };
  });
}

function replaced(names: readonly PortfolioName[], i: number, name: PortfolioName): PortfolioName[] {
  return names.map((other, k) => (k === i ? name : other));
}

/** Value change when name i defaults today at its recovery, the protection then paid included. */
function jumpToDefault(valuation: Valuation, i: number, today: (number | null)[]): (number | null)[] {
  const name = { ...valuation.names[i]!, curve: defaultedName() };
  const moved = revalued(valuation, { names: replaced(valuation.names, i, name) });
  const then = moved && values(moved);
  return today.map((value, k) => {
    const tranche = valuation.request.tranches[k]!;
    const next = then?.[k];
    if (value === null || next === null || next === undefined) return null;
    const clamp = (loss: number) =>
      Math.min(Math.max(loss - tranche.attachment, 0), tranche.detachment - tranche.attachment);
    const paid = clamp(moved!.portfolio.realisedLoss) - clamp(valuation.portfolio.realisedLoss);
    return next - value - paid * valuation.portfolio.notional;
  });
}
