import { type DiscountCurve, discountCurve } from "@/lib/quant/market/discountCurve";
import { evenSchedule } from "@/lib/quant/market/schedule";
import { contractLegs, type LegTimes, legTimes } from "@/lib/quant/tranche/legs";

/** A contract's legs as textbooks print them: premiums paid, premiums accrued at defaults, payoffs. */
export interface PrintedLegs {
  readonly payments: number;
  readonly accrual: number;
  readonly payoff: number;
}

/** A discount curve that is known to be sound. */
export function flatCurve(rate: number): DiscountCurve {
  const curve = discountCurve({ kind: "flat", rate });
  if (!curve.ok) throw new Error("a flat curve is refused");
  return curve.value;
}

/** Leg times of an even schedule on a flat rate. */
export function evenTimes(years: number, perYear: number, rate: number): LegTimes {
  return legTimes(evenSchedule(years * perYear, perYear), flatCurve(rate));
}

/** The core's legs, the two parts of the annuity taken apart by switching one set of discount factors off. */
export function printedLegs(
  times: LegTimes,
  loss: readonly number[],
  outstanding: readonly number[],
): PrintedLegs {
  const none = times.accruals.map(() => 0);
  return {
    payments: contractLegs({ ...times, middleFactors: none }, loss, outstanding).annuity,
    accrual: contractLegs({ ...times, paymentFactors: none }, loss, outstanding).annuity,
    payoff: contractLegs(times, loss, outstanding).protection,
  };
}

/** Break-even spread of printed legs. */
export function breakEven({ payments, accrual, payoff }: PrintedLegs): number {
  return payoff / (payments + accrual);
}
