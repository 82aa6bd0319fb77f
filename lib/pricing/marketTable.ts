import { formatDay, parseDay } from "../quant/market/calendar";
import { discountFactor, zeroRate } from "../quant/market/discountCurve";
import { marketSide } from "./curves";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import type { DiscountInput, ScheduleInput } from "./request";

/** What a market says about one time: years, discount factor, continuously compounded zero rate (decimal). */
export interface DiscountPoint {
  readonly years: number;
  readonly discountFactor: number;
  readonly zeroRate: number;
}

/** A payment of a schedule: its date where the schedule has a calendar, accrual fraction of a year, discount factor. */
export interface PaymentPoint {
  readonly years: number;
  readonly date: string | null;
  readonly accrual: number;
  readonly discountFactor: number;
}

/** The market side of a request. */
export interface MarketInput {
  readonly pricingDate: string;
  readonly schedule: ScheduleInput;
  readonly discount: DiscountInput;
}

export type MarketTable =
  | {
      readonly ok: true;
      readonly points: readonly DiscountPoint[];
      readonly payments: readonly PaymentPoint[];
    }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

const DAYS = 365;

/** Reads a market at the given years and at its payments, or all its problems by the rules of the request. */
export function marketTable(market: MarketInput, years: readonly number[]): MarketTable {
  const checked = checkRequest({
    format: 1,
    ...market,
    pool: [{ id: "probe", notional: 1, recovery: 0, credit: { kind: "hazard", rate: 0 } }],
    correlation: { kind: "flat", rho: 0 },
    tranches: [],
  });
  if (!checked.ok) return checked;
  const problems: PricingProblem[] = [];
  const side = marketSide(checked.request, problems);
  if (!side) return { ok: false, problems };
  const day = market.schedule.kind === "standard" ? parseDay(market.pricingDate) : null;
  return {
    ok: true,
    points: years.map((t) => ({
      years: t,
      discountFactor: discountFactor(side.discount, t),
      zeroRate: zeroRate(side.discount, t),
    })),
    payments: side.schedule.periods.map(({ payment, accrual }) => ({
      years: payment,
      date: day === null ? null : formatDay(day + Math.round(payment * DAYS)),
      accrual,
      discountFactor: discountFactor(side.discount, payment),
    })),
  };
}
