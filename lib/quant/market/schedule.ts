import { failure, type Outcome, success } from "../outcome";
import { civilDate, type Day, dayOf, followingBusinessDay } from "./calendar";

/** One premium period; times in years from the pricing date. */
export interface PaymentPeriod {
  /** Where accrual starts; before zero for a standard period that is under way. */
  readonly start: number;
  /** t_j: survival and loss are read here. */
  readonly end: number;
  /** Middle of (t_{j−1}, t_j), with t_0 = 0: where a default in the period is taken. */
  readonly middle: number;
  /** When the premium is paid: its discount factor is read here. */
  readonly payment: number;
  /** Accrual as a fraction of a year. */
  readonly accrual: number;
}

/** The payment periods of a contract and the premium already accrued at the pricing date (a₀, years). */
export interface PaymentSchedule {
  readonly periods: readonly PaymentPeriod[];
  readonly accruedAtStart: number;
  /** t_M, years. */
  readonly maturity: number;
}

/** How contracts of any tenor get their schedule. */
export type ScheduleRule =
  | { readonly kind: "even"; readonly perYear: number }
  | { readonly kind: "standard"; readonly pricingDay: Day; readonly holidays: ReadonlySet<Day> };

/** Even schedule: t_j = j/f, accrual 1/f, no calendar; `periods` = years · perYear. */
export function evenSchedule(periodCount: number, perYear: number): PaymentSchedule {
  const periods = Array.from({ length: periodCount }, (_, j) => ({
    start: j / perYear,
    end: (j + 1) / perYear,
    middle: (j + 0.5) / perYear,
    payment: (j + 1) / perYear,
    accrual: 1 / perYear,
  }));
  return { periods, accruedAtStart: 0, maturity: periodCount / perYear };
}

/**
 * Standard schedule (trade practice since 2009): quarterly on the 20th of March, June, September and December, moved
 * to the following business day except the last accrual end; ACT/360, the last period one day longer; times ACT/365.
 */
export function standardSchedule(
  pricingDay: Day,
  maturityDay: Day,
  holidays: ReadonlySet<Day>,
): PaymentSchedule {
  const adjusted = quarterDays(pricingDay, maturityDay).map((day) => followingBusinessDay(day, holidays));
  let first = 0;
  while (first + 1 < adjusted.length && adjusted[first + 1]! <= pricingDay) first++;
  const boundaries = adjusted.slice(first);
  const last = boundaries.length - 1;
  if (last === 0) boundaries.push(followingBusinessDay(maturityDay, holidays));
  const count = boundaries.length - 1;
  const time = (day: Day) => (day - pricingDay) / 365;
  const periods = Array.from({ length: count }, (_, j) => {
    const isLast = j === count - 1;
    const startDay = boundaries[j]!;
    const endDay = isLast ? maturityDay : boundaries[j + 1]!;
    const before = j === 0 ? 0 : time(startDay);
    return {
      start: time(startDay),
      end: time(endDay),
      middle: (before + time(endDay)) / 2,
      payment: time(boundaries[j + 1]!),
      accrual: (endDay - startDay + (isLast ? 1 : 0)) / 360,
    };
  });
  return { periods, accruedAtStart: (pricingDay - boundaries[0]!) / 360, maturity: time(maturityDay) };
}

/** Unadjusted 20ths from well before the pricing day up to and with the maturity. */
function quarterDays(pricingDay: Day, maturityDay: Day): Day[] {
  const { year } = civilDate(pricingDay);
  const end = civilDate(maturityDay).year;
  const days: Day[] = [];
  for (let y = year - 1; y <= end; y++) {
    for (const month of [3, 6, 9, 12]) {
      const day = dayOf(y, month, 20);
      if (day <= maturityDay) days.push(day);
    }
  }
  return days;
}

/**
 * Maturity day of a quoted tenor on the standard schedule: n years (a multiple of one half) from 20 June when the
 * latest 20 March or 20 September on or before the pricing date is a 20 March, else from the 20 December after it.
 */
export function standardMaturity(pricingDay: Day, years: number): Day {
  const { year } = civilDate(pricingDay);
  let base: { year: number; month: number };
  if (pricingDay >= dayOf(year, 9, 20)) base = { year, month: 12 };
  else if (pricingDay >= dayOf(year, 3, 20)) base = { year, month: 6 };
  else base = { year: year - 1, month: 12 };
  const months = base.year * 12 + (base.month - 1) + Math.round(years * 12);
  return dayOf(Math.floor(months / 12), (months % 12) + 1, 20);
}

/** The schedule of a contract with a quoted tenor; a tenor that the rule does not know is a problem. */
export function tenorSchedule(rule: ScheduleRule, years: number): Outcome<PaymentSchedule> {
  if (rule.kind === "even") {
    const periods = Math.round(years * rule.perYear);
    if (periods < 1 || Math.abs(periods - years * rule.perYear) > 1e-9) {
      return failure(
        "tenor",
        "years",
        `the tenor must be a whole number of the schedule's periods (${rule.perYear} a year)`,
        years,
      );
    }
    return success(evenSchedule(periods, rule.perYear));
  }
  if (!(years > 0) || Math.abs(years * 2 - Math.round(years * 2)) > 1e-9) {
    return failure(
      "tenor",
      "years",
      "the tenor must be a multiple of half a year on the standard schedule",
      years,
    );
  }
  return success(standardSchedule(rule.pricingDay, standardMaturity(rule.pricingDay, years), rule.holidays));
}
