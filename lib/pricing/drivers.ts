import { parSpread, swapLegs } from "../quant/market/defaultSwap";
import { bumpedName } from "./bumps";
import type { NameDifference } from "./namesAtOnce";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import type { PricingRequest } from "./request";
import { values, withCoupons } from "./revaluation";
import {
  marketDifferences,
  namesDifferences,
  scaledDifference,
  spreadDifference,
} from "./sensitivitySection";
import { type Valuation, valuationOf } from "./valuation";

const BASIS_POINT = 1e-4;

/** The common factors on every spread that convexity is shown at. */
export const SPREAD_SCALES = [0.5, 0.9, 1.1, 1.5] as const;

/** What moves of the market do to one class's value to the protection seller, in currency; null where it has none. */
export interface MarketDriver {
  readonly id: string;
  readonly notional: number;
  readonly spread01: number | null;
  readonly recovery01: number | null;
  readonly correlation01: number | null;
  readonly rate01: number | null;
  readonly carry1d: number | null;
  /** At the factors of SPREAD_SCALES, in their order. */
  readonly scaled: readonly (number | null)[];
  /**
   * Notional of the pool contract (protection on the whole pool's loss, premium on undefaulted notional, at par) whose
   * spread 01 is the class's, per unit notional of the class.
   */
  readonly hedgeRatio: number | null;
}

export type MarketDriversAnswer =
  | { readonly ok: true; readonly classes: readonly MarketDriver[] }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/** What one name does to every class, and the notional of its own contract that would offset its spread 01. */
export interface NameDriver extends NameDifference {
  /**
   * Notional of protection on the name alone to the deal's maturity, at par, whose spread 01 is the class's own to this name;
   * in currency.
   */
  readonly hedge: readonly (number | null)[];
}

export type NameDriversAnswer =
  | { readonly ok: true; readonly names: readonly NameDriver[] }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/** What drives every class besides single names: spreads, recovery, correlation, rates, time, and the pool as its hedge. */
export function marketDrivers(raw: unknown): MarketDriversAnswer {
  const read = readyValuation(raw);
  if (!read.ok) return read;
  const { priced, today } = read;
  const market = marketDifferences(priced, today);
  const scaled = SPREAD_SCALES.map((scale) => scaledDifference(priced, today, scale));
  const pool = poolSpread01(priced.request);
  const { notional } = priced.portfolio;
  const classes = priced.request.tranches.map(({ id, attachment, detachment }, i) => {
    const own = (detachment - attachment) * notional;
    const spread01 = market.spread01[i]!;
    const ratio =
      spread01 === null || pool === null || pool === 0 ? null : spread01 / own / (pool / notional);
    return {
      id,
      notional: own,
      spread01,
      recovery01: market.recovery01[i]!,
      correlation01: market.correlation01[i]!,
      rate01: market.rate01[i]!,
      carry1d: market.carry1d[i]!,
      scaled: scaled.map((row) => row[i]!),
      hedgeRatio: ratio,
    };
  });
  return { ok: true, classes };
}

/** What the names at these places of the pool do to every class: spread 01, jump to default, and hedges in the names. */
export function nameDrivers(raw: unknown, places: readonly number[]): NameDriversAnswer {
  const read = readyValuation(raw);
  if (!read.ok) return read;
  const names = namesDifferences(read.priced, read.today, places).map((found, k) => {
    const own = contractSpread01(read.priced, places[k]!);
    const hedge = found.spread01.map((value) => (value === null || !own ? null : value / own));
    return { ...found, hedge };
  });
  return { ok: true, names };
}

/** Spread 01 of protection sold on one name to the deal's maturity, struck at par, per unit notional. */
function contractSpread01({ request, names, market }: Valuation, place: number): number | null {
  const name = names[place]!;
  const { schedule, discount } = market;
  const bumped = bumpedName(request.pool[place]!, name, market, { shift: BASIS_POINT });
  const par = name.curve.defaulted ? null : parSpread(schedule, discount, name.curve, name.recovery);
  if (par === null || !bumped) return null;
  const { protection, annuity } = swapLegs(schedule, discount, bumped.curve);
  return par * annuity - (1 - name.recovery) * protection;
}

function readyValuation(
  raw: unknown,
):
  | { ok: true; priced: Valuation; today: (number | null)[] }
  | { ok: false; problems: readonly PricingProblem[] } {
  const checked = checkRequest(raw);
  if (!checked.ok) return checked;
  const problems: PricingProblem[] = [];
  const valuation = valuationOf(checked.request, problems);
  if (!valuation || problems.length > 0) return { ok: false, problems };
  const priced = withCoupons(valuation);
  return { ok: true, priced, today: values(priced) };
}

/** The pool contract's spread 01 in currency. What the whole pool loses does not depend on correlation. */
function poolSpread01(request: PricingRequest): number | null {
  const tranche = { id: "pool", attachment: 0, detachment: 1, recoveryPaydown: true };
  const read = readyValuation({
    ...request,
    correlation: { kind: "flat", rho: 0 },
    tranches: [tranche],
    nthToDefault: [],
    include: [],
  });
  return read.ok ? (spreadDifference(read.priced, read.today)[0] ?? null) : null;
}
