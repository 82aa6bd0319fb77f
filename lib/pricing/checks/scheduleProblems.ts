import { parseDay } from "../../quant/market/calendar";
import type { PricingProblem } from "../problem";
import { LIMITS } from "../request";
import { asArray, asObject, isNumber, type Loose } from "./loose";
import { problem } from "./wording";

/** Dates that do not exist, schedules that do not come out whole, a maturity that is none. */
export function dateProblems(request: Loose, raw: unknown): PricingProblem[] {
  const problems: PricingProblem[] = [];
  const schedule = asObject(request.schedule);
  const pricing = typeof request.pricingDate === "string" ? parseDay(request.pricingDate) : null;
  if (request.pricingDate !== undefined && pricing === null) {
    problems.push(
      problem("date", ["pricingDate"], raw, "is not a date that exists (YYYY-MM-DD, 1900 to 2199)"),
    );
  }
  if (schedule.kind === "even") {
    const { years, perYear } = schedule;
    if (isNumber(years) && isNumber(perYear)) {
      const payments = years * perYear;
      if (Math.abs(payments - Math.round(payments)) > 1e-9 || Math.round(payments) < 1) {
        problems.push(
          problem(
            "schedule",
            ["schedule", "years"],
            raw,
            "times the payments a year must be a whole number of payments",
          ),
        );
      } else if (payments > LIMITS.payments) {
        problems.push(
          problem("limit", ["schedule", "years"], raw, `makes more than ${LIMITS.payments} payments`),
        );
      }
    }
  }
  if (schedule.kind === "standard") {
    if (request.pricingDate === undefined) {
      problems.push(problem("missing", ["pricingDate"], raw, "is missing: a standard schedule needs it"));
    }
    problems.push(...maturityProblems(schedule, pricing, raw));
    for (const [i, holiday] of asArray(schedule.holidays).entries()) {
      if (typeof holiday === "string" && parseDay(holiday) === null) {
        problems.push(
          problem("date", ["schedule", "holidays", String(i)], raw, "is not a date that exists (YYYY-MM-DD)"),
        );
      }
    }
  }
  return problems;
}

function maturityProblems(schedule: Loose, pricing: number | null, raw: unknown): PricingProblem[] {
  if (typeof schedule.maturity !== "string") return [];
  const path = ["schedule", "maturity"];
  const maturity = parseDay(schedule.maturity);
  if (maturity === null)
    return [problem("date", path, raw, "is not a date that exists (YYYY-MM-DD, 1900 to 2199)")];
  const problems: PricingProblem[] = [];
  if (!/-(06|12)-20$/.test(schedule.maturity))
    problems.push(problem("date", path, raw, "must be a 20 June or a 20 December"));
  if (pricing !== null && maturity <= pricing)
    problems.push(problem("date", path, raw, "must be after the pricing date"));
  if (pricing !== null && maturity - pricing > LIMITS.years * 366) {
    problems.push(problem("limit", path, raw, `must be within ${LIMITS.years} years of the pricing date`));
  }
  return problems;
}
