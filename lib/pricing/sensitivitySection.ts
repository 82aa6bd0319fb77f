import { formatDay, parseDay } from "../quant/market/calendar";
import { shiftZeroRates } from "../quant/market/discountCurve";
import { defaultedName } from "../quant/market/survivalCurve";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import { lossInside } from "../quant/tranche/lossInside";
import { bumpedName, type NameBump } from "./bumps";
import { type NameDifference, namesAtOnce } from "./namesAtOnce";
import type { SensitivityReport } from "./report";
import { type Difference, differenceFrom, revalued, values, withCoupons } from "./revaluation";
import { type Valuation, valuationOf } from "./valuation";

const BASIS_POINT = 1e-4;
const ONE_PERCENT = 0.01;

/**
 * Sensitivities of every tranche's value to the protection seller, in currency, by definite bumps and full revaluation.
 * A tranche without a running coupon is valued at its own par spread, held fixed.
 */
export function sensitivityReports(valuation: Valuation): SensitivityReport[] {
  const priced = withCoupons(valuation);
  const today = values(priced);
  const market = marketDifferences(priced, today);
  const byName = namesDifferences(priced, today);
  return today.map((_, i) => ({
    spread01: market.spread01[i]!,
    recovery01: market.recovery01[i]!,
    correlation01: market.correlation01[i]!,
    rate01: market.rate01[i]!,
    carry1d: market.carry1d[i]!,
    byName: byName.map((name) => ({
      id: name.id,
      spread01: name.spread01[i]!,
      jumpToDefault: name.jumpToDefault[i]!,
    })),
  }));
}

/** What moves of the market as a whole do to every tranche of a valuation with coupons. */
export function marketDifferences(priced: Valuation, today: readonly (number | null)[]) {
  const difference = differenceFrom(today);
  return {
    spread01: spreadDifference(priced, today),
    recovery01: recoveryDifference(priced, difference),
    correlation01: correlationDifference(priced, difference),
    rate01: difference(rateShifted(priced)),
    carry1d: difference(nextDay(priced)),
  };
}

/** Every spread +1 bp at every node. */
export function spreadDifference(priced: Valuation, today: readonly (number | null)[]): (number | null)[] {
  return differenceFrom(today)(revalued(priced, { names: allBumped(priced, { shift: BASIS_POINT }) }));
}

/** What a common factor on every spread does to every tranche: 1.1 is a tenth wider. */
export function scaledDifference(
  priced: Valuation,
  today: readonly (number | null)[],
  scale: number,
): (number | null)[] {
  return differenceFrom(today)(revalued(priced, { names: allBumped(priced, { scale }) }));
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

/**
 * Name by name, of all names or of those at the places given: all at once where that is exact, else one by one. Names already in
 * default have none.
 */
export function namesDifferences(
  valuation: Valuation,
  today: readonly (number | null)[],
  places: readonly number[] = valuation.names.map((_, i) => i),
): NameDifference[] {
  return namesAtOnce(valuation, today, places) ?? namesOneByOne(valuation, today, places);
}

/** The same by full valuations, two a name; names alike in everything but their id are valued once. */
export function namesOneByOne(
  valuation: Valuation,
  today: readonly (number | null)[],
  places: readonly number[],
): NameDifference[] {
  const { request, names, market } = valuation;
  const difference = differenceFrom(today);
  const known = new Map<string, Omit<NameDifference, "id">>();
  return places.map((i) => {
    const input = request.pool[i]!;
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
function jumpToDefault(
  valuation: Valuation,
  i: number,
  today: readonly (number | null)[],
): (number | null)[] {
  const name = { ...valuation.names[i]!, curve: defaultedName() };
  const moved = revalued(valuation, { names: replaced(valuation.names, i, name) });
  const then = moved && values(moved);
  return today.map((value, k) => {
    const tranche = valuation.request.tranches[k]!;
    const next = then?.[k];
    if (value === null || next === null || next === undefined) return null;
    const paid =
      lossInside(moved!.portfolio.realisedLoss, tranche) -
      lossInside(valuation.portfolio.realisedLoss, tranche);
    return next - value - paid * valuation.portfolio.notional;
  });
}
