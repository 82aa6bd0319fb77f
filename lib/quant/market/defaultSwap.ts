import { exp, expm1 } from "../maths/elementary";
import { brentRoot } from "../maths/roots";
import { failure, type Outcome, success } from "../outcome";
import { type DiscountCurve, negativeLogDiscount } from "./discountCurve";
import type { PaymentSchedule } from "./schedule";
import { cumulativeHazard, type SurvivalCurve } from "./survivalCurve";

/**
 * Both legs of a single-name default swap per unit notional: protection before the factor 1 − R, and the clean
 * premium annuity with accrued on default. Closed-form integrals on the pieces where hazard and forward rate are
 * constant (O'Kane & Turnbull 2003; the open-standard integrals).
 */
export interface SwapLegs {
  readonly protection: number;
  readonly annuity: number;
}

interface Piece {
  /** Start and length, years. */
  readonly from: number;
  readonly length: number;
  readonly period: number;
}

/** The pieces of a contract's life on which neither curve nor period changes; made once a tenor. */
function piecesOf(
  schedule: PaymentSchedule,
  discount: DiscountCurve,
  hazardTimes: readonly number[],
): Piece[] {
  const pieces: Piece[] = [];
  for (const [period, { end }] of schedule.periods.entries()) {
    const from = period === 0 ? 0 : schedule.periods[period - 1]!.end;
    const cuts = [...discount.times, ...hazardTimes]
      .filter((time) => time > from && time < end)
      .sort((a, b) => a - b);
    let start = from;
    for (const cut of [...cuts, end]) {
      if (cut > start) pieces.push({ from: start, length: cut - start, period });
      start = cut;
    }
  }
  return pieces;
}

/** (1 − e^−x)/x. */
function meanDecay(x: number): number {
  return Math.abs(x) < 1e-8 ? 1 - x / 2 : -expm1(-x) / x;
}

/** (1 − e^−x(1 + x))/x², by its series where the closed form cancels. */
function firstMoment(x: number): number {
  if (Math.abs(x) < 0.2) {
    let term = 0.5;
    let sum = 0.5;
    for (let k = 1; k <= 14; k++) {
      term *= (-x * (k + 1)) / (k * (k + 2));
      sum += term;
    }
    return sum;
  }
  return (-expm1(-x) - x * exp(-x)) / (x * x);
}

/** Legs of a contract on a survival curve. */
export function swapLegs(
  schedule: PaymentSchedule,
  discount: DiscountCurve,
  survival: SurvivalCurve,
): SwapLegs {
  const pieces = piecesOf(schedule, discount, survival.times);
  const logDiscount = discountsOf(schedule, discount, pieces);
  return legsOf(schedule, pieces, logDiscount, (t) => cumulativeHazard(survival, t));
}

interface LogDiscounts {
  /** −ln DF at the start and the end of each piece. */
  readonly starts: readonly number[];
  readonly ends: readonly number[];
  readonly payments: readonly number[];
}

function discountsOf(
  schedule: PaymentSchedule,
  discount: DiscountCurve,
  pieces: readonly Piece[],
): LogDiscounts {
  return {
    starts: pieces.map((piece) => negativeLogDiscount(discount, piece.from)),
    ends: pieces.map((piece) => negativeLogDiscount(discount, piece.from + piece.length)),
    payments: schedule.periods.map((period) => negativeLogDiscount(discount, period.payment)),
  };
}

function legsOf(
  schedule: PaymentSchedule,
  pieces: readonly Piece[],
  logDiscount: LogDiscounts,
  hazardTo: (t: number) => number,
): SwapLegs {
  let protection = 0;
  let annuity = -schedule.accruedAtStart;
  for (const [j, period] of schedule.periods.entries()) {
    annuity += period.accrual * exp(-logDiscount.payments[j]! - hazardTo(period.end));
  }
  let before = 0;
  for (const [i, piece] of pieces.entries()) {
    const after = hazardTo(piece.from + piece.length);
    const hazard = after - before;
    if (hazard > 0 && before < Number.POSITIVE_INFINITY) {
      const start = exp(-before - logDiscount.starts[i]!);
      const x = hazard + (logDiscount.ends[i]! - logDiscount.starts[i]!);
      const period = schedule.periods[piece.period]!;
      const isCertain = hazard === Number.POSITIVE_INFINITY;
      const mass = isCertain ? start : start * hazard * meanDecay(x);
      const moment = isCertain ? 0 : start * hazard * piece.length * firstMoment(x);
      protection += mass;
      annuity +=
        (period.accrual * (mass * (piece.from - period.start) + moment)) / (period.end - period.start);
    }
    before = after;
  }
  return { protection, annuity };
}

/** Par spread of a single name; null where the annuity is zero. */
export function parSpread(
  schedule: PaymentSchedule,
  discount: DiscountCurve,
  survival: SurvivalCurve,
  recovery: number,
): number | null {
  const { protection, annuity } = swapLegs(schedule, discount, survival);
  return annuity === 0 ? null : ((1 - recovery) * protection) / annuity;
}

/** One quoted contract: its schedule, its running coupon and what is paid upfront (fractions of notional). */
export interface SwapQuote {
  readonly schedule: PaymentSchedule;
  readonly coupon: number;
  readonly upfront: number;
  /** For messages: the tenor as quoted, years, and the path of the quote. */
  readonly years: number;
  readonly path: string;
}

/**
 * Hazards, in order of tenor, at which every quoted contract is worth zero: protection = coupon · annuity + upfront.
 * Problems: a quote for which no non-negative hazard exists, naming its tenor.
 */
export function bootstrapSurvival(
  quotes: readonly SwapQuote[],
  discount: DiscountCurve,
  recovery: number,
): Outcome<SurvivalCurve> {
  const times: number[] = [];
  const cumulative: number[] = [];
  for (const quote of quotes) {
    const { schedule } = quote;
    const from = times[times.length - 1] ?? 0;
    const base = cumulative[cumulative.length - 1] ?? 0;
    const known: SurvivalCurve = { times: [...times], cumulative: [...cumulative], defaulted: false };
    const pieces = piecesOf(schedule, discount, times);
    const logDiscount = discountsOf(schedule, discount, pieces);
    const miss = (hazard: number) => {
      const legs = legsOf(schedule, pieces, logDiscount, (t) =>
        t <= from ? cumulativeHazard(known, t) : base + hazard * (t - from),
      );
      return (1 - recovery) * legs.protection - quote.coupon * legs.annuity - quote.upfront;
    };
    const hazard = solveHazard(miss, quote);
    if (hazard === null) {
      const what =
        quotes.length > 1
          ? ` from ${from > 0 ? "the tenor before" : "today"} to ${quote.years} years`
          : ` at ${quote.years} years`;
      return failure("noHazard", quote.path, `no non-negative hazard meets the quote${what}`, quote.coupon);
    }
    times.push(schedule.maturity);
    cumulative.push(base + hazard * (schedule.maturity - from));
  }
  return success({ times, cumulative, defaulted: false });
}

function solveHazard(miss: (hazard: number) => number, quote: SwapQuote): number | null {
  const atZero = miss(0);
  if (Math.abs(atZero) <= 1e-16) return 0;
  if (atZero > 0) return null;
  let high = Math.max(4 * Math.abs(quote.coupon), 0.01);
  while (miss(high) < 0) {
    high *= 4;
    if (high > 1e6) return null;
  }
  return brentRoot(miss, 0, high);
}
