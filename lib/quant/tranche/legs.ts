import { type DiscountCurve, discountFactor } from "../market/discountCurve";
import type { PaymentSchedule } from "../market/schedule";

/** Discount factors of a schedule, worked out once. */
export interface LegTimes {
  readonly accruals: readonly number[];
  readonly paymentFactors: readonly number[];
  readonly middleFactors: readonly number[];
  /** a₀: premium accrued at the start, years. */
  readonly accruedAtStart: number;
}

export function legTimes(schedule: PaymentSchedule, discount: DiscountCurve): LegTimes {
  return {
    accruals: schedule.periods.map((period) => period.accrual),
    paymentFactors: schedule.periods.map((period) => discountFactor(discount, period.payment)),
    middleFactors: schedule.periods.map((period) => discountFactor(discount, period.middle)),
    accruedAtStart: schedule.accruedAtStart,
  };
}

/** The two legs of a contract, as fractions of the notional its inputs are fractions of. */
export interface Legs {
  readonly protection: number;
  /** Clean premium annuity (risky annuity), years. */
  readonly annuity: number;
}

/**
 * Legs from expected loss EL(t_j) and outstanding O(t_j), j = 0..M: a default in a period is taken at its middle
 * (Hull & White 2004). Clean: the premium accrued before the start is taken off.
 */
export function contractLegs(times: LegTimes, loss: ArrayLike<number>, outstanding: ArrayLike<number>): Legs {
  let protection = 0;
  let annuity = 0;
  for (let j = 1; j <= times.accruals.length; j++) {
    const accrual = times.accruals[j - 1]!;
    const middle = times.middleFactors[j - 1]!;
    const left = outstanding[j]!;
    protection += middle * (loss[j]! - loss[j - 1]!);
    annuity += accrual * (times.paymentFactors[j - 1]! * left + 0.5 * middle * (outstanding[j - 1]! - left));
  }
  return { protection, annuity: annuity - times.accruedAtStart * outstanding[0]! };
}

/** C / annuity; null where the annuity is zero. */
export function parSpread({ protection, annuity }: Legs): number | null {
  return Math.abs(annuity) < 1e-14 ? null : protection / annuity;
}

/** Upfront at a running coupon: C − s · annuity, a fraction of notional. */
export function upfrontAt({ protection, annuity }: Legs, running: number): number {
  return protection - running * annuity;
}
