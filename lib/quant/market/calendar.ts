/** Days since 1970-01-01 in the civil calendar. */
export type Day = number;

const MILLISECONDS = 86_400_000;
const FRIDAY = 5;

/** The day of a civil date; months count from 1. */
export function dayOf(year: number, month: number, day: number): Day {
  return Date.UTC(year, month - 1, day) / MILLISECONDS;
}

/** Year, month (from 1) and day of the month. */
export function civilDate(day: Day): { year: number; month: number; day: number } {
  const date = new Date(day * MILLISECONDS);
  return { year: date.getUTCFullYear(), month: date.getUTCMonth() + 1, day: date.getUTCDate() };
}

/** The day of an ISO date "YYYY-MM-DD" between 1900 and 2199, or null when there is no such day. */
export function parseDay(text: string): Day | null {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(text);
  if (!match) return null;
  const [year, month, date] = [Number(match[1]), Number(match[2]), Number(match[3])];
  if (year < 1900 || year > 2199) return null;
  const day = dayOf(year, month, date);
  return formatDay(day) === text ? day : null;
}

/** The ISO date "YYYY-MM-DD" of a day. */
export function formatDay(day: Day): string {
  return new Date(day * MILLISECONDS).toISOString().slice(0, 10);
}

/** Monday to Friday, less the deal's own holidays. */
export function isBusinessDay(day: Day, holidays: ReadonlySet<Day>): boolean {
  const weekday = (((day + 4) % 7) + 7) % 7;
  return weekday >= 1 && weekday <= FRIDAY && !holidays.has(day);
}

/** The day itself when it is a business day, else the next one. */
export function followingBusinessDay(day: Day, holidays: ReadonlySet<Day>): Day {
  let candidate = day;
  while (!isBusinessDay(candidate, holidays)) candidate++;
  return candidate;
}
