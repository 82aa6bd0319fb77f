import { addDays, addMonths, differenceInCalendarDays, format, isWeekend } from "date-fns";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { dayOf, followingBusinessDay, formatDay, isBusinessDay, parseDay } from "@/lib/quant/market/calendar";
import { standardMaturity, standardSchedule } from "@/lib/quant/market/schedule";

const origin = new Date(1970, 0, 1);

function iso(date: Date): string {
  return format(date, "yyyy-MM-dd");
}

function dateOf(day: number): Date {
  return addDays(origin, day);
}

const days = fc.integer({ min: -25_000, max: 83_000 });

describe("SCHEDULE: the calendar against date-fns", () => {
  it("names every day from 1901 to 2197 alike, counts alike, and knows the same weekends", () => {
    fc.assert(
      fc.property(days, days, (one, other) => {
        expect(formatDay(one)).toBe(iso(dateOf(one)));
        expect(parseDay(iso(dateOf(one)))).toBe(one);
        expect(differenceInCalendarDays(dateOf(one), dateOf(other))).toBe(one - other);
        expect(isBusinessDay(one, new Set())).toBe(!isWeekend(dateOf(one)));
      }),
      { numRuns: 1_000 },
    );
  });

  it("moves a day to the next that is neither weekend nor holiday", () => {
    const holidays = fc.array(fc.integer({ min: 0, max: 12 }), { maxLength: 10 });
    fc.assert(
      fc.property(days, holidays, (day, offsets) => {
        const closed = new Set(offsets.map((offset) => day + offset));
        let expected = dateOf(day);
        while (isWeekend(expected) || closed.has(differenceInCalendarDays(expected, origin)))
          expected = addDays(expected, 1);
        expect(formatDay(followingBusinessDay(day, closed))).toBe(iso(expected));
      }),
      { numRuns: 1_000 },
    );
  });

  it("puts tenors on 20 June and 20 December, whole months from the roll", () => {
    const pricing = fc.integer({ min: dayOf(2010, 1, 1), max: dayOf(2060, 12, 31) });
    fc.assert(
      fc.property(pricing, fc.integer({ min: 1, max: 20 }), (day, halves) => {
        const date = dateOf(day);
        const spring = new Date(date.getFullYear(), 2, 20);
        const autumn = new Date(date.getFullYear(), 8, 20);
        const from =
          date >= autumn
            ? new Date(date.getFullYear(), 11, 20)
            : date >= spring
              ? new Date(date.getFullYear(), 5, 20)
              : new Date(date.getFullYear() - 1, 11, 20);
        expect(formatDay(standardMaturity(day, halves / 2))).toBe(iso(addMonths(from, 6 * halves)));
      }),
      { numRuns: 500 },
    );
  });

  it("lays periods end to end: accruals are the days between, over 360, and the last counts one more", () => {
    const pricing = fc.integer({ min: dayOf(2010, 1, 1), max: dayOf(2060, 12, 31) });
    fc.assert(
      fc.property(pricing, fc.integer({ min: 1, max: 20 }), (day, halves) => {
        const maturity = standardMaturity(day, halves / 2);
        fc.pre(maturity > day);
        const { periods, accruedAtStart } = standardSchedule(day, maturity, new Set());
        const start = day - Math.round(accruedAtStart * 360);
        expect(isWeekend(dateOf(start))).toBe(false);
        const total = periods.reduce((sum, period) => sum + Math.round(period.accrual * 360), 0);
        expect(total).toBe(differenceInCalendarDays(dateOf(maturity), dateOf(start)) + 1);
        expect(start).toBeLessThanOrEqual(day);
        for (const [j, period] of periods.entries()) {
          expect(isWeekend(dateOf(day + Math.round(period.payment * 365)))).toBe(false);
          if (j > 0) expect(period.start).toBe(periods[j - 1]!.end);
        }
      }),
      { numRuns: 500 },
    );
  });
});
