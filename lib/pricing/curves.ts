import { parseDay } from "../quant/market/calendar";
import { bootstrapSurvival, type SwapQuote } from "../quant/market/defaultSwap";
import { type DiscountCurve, discountCurve } from "../quant/market/discountCurve";
import {
  evenSchedule,
  type PaymentSchedule,
  type ScheduleRule,
  standardSchedule,
  tenorSchedule,
} from "../quant/market/schedule";
import {
  cumulativeDefault,
  defaultedName,
  flatHazard,
  type SurvivalCurve,
  yearlyDefault,
} from "../quant/market/survivalCurve";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import type { PricingProblem } from "./problem";
import type { CreditInput, NameInput, PricingRequest } from "./request";

/** The market side of a request: schedule, tenor rule and discount curve. */
export interface MarketSide {
  readonly schedule: PaymentSchedule;
  readonly rule: ScheduleRule;
  readonly discount: DiscountCurve;
}

/** Builds schedule and discount curve of a checked request; curve problems are collected in `problems`. */
export function marketSide(request: PricingRequest, problems: PricingProblem[]): MarketSide | null {
  const { schedule, rule } = scheduleOf(request);
  const discount = discountCurve(request.discount);
  if (!discount.ok) {
    for (const { code, path, message, value } of discount.problems) {
      problems.push({ code, path: `discount.${path}`, value, message: `Discount curve: ${message}.` });
    }
    return null;
  }
  return { schedule, rule, discount: discount.value };
}

function scheduleOf({ schedule, pricingDate }: PricingRequest): {
  schedule: PaymentSchedule;
  rule: ScheduleRule;
} {
  if (schedule.kind === "even") {
    const { years, perYear } = schedule;
    return { schedule: evenSchedule(Math.round(years * perYear), perYear), rule: { kind: "even", perYear } };
  }
  const pricingDay = parseDay(pricingDate!)!;
  const holidays = new Set(schedule.holidays.map((holiday) => parseDay(holiday)!));
  return {
    schedule: standardSchedule(pricingDay, parseDay(schedule.maturity)!, holidays),
    rule: { kind: "standard", pricingDay, holidays },
  };
}

/** Builds every name's survival curve; names without one are reported under `path`. */
export function poolNames(
  pool: readonly NameInput[],
  market: MarketSide,
  path: string,
  problems: PricingProblem[],
): PortfolioName[] {
  const names: PortfolioName[] = [];
  for (const [i, row] of pool.entries()) {
    const curve = nameCurve(row, market, `${path}.${i}`, problems);
    if (curve) {
      names.push({
        id: row.id,
        notional: row.notional,
        recovery: row.recovery,
        curve,
        loading: row.loading ?? null,
        sector: row.sector ?? null,
      });
    }
  }
  return names;
}

/** One name's survival curve from its credit input, or null with the problem reported. */
export function nameCurve(
  { id, credit, recovery }: Pick<NameInput, "id" | "credit" | "recovery">,
  market: MarketSide,
  path: string,
  problems: PricingProblem[],
): SurvivalCurve | null {
  switch (credit.kind) {
    case "hazard":
      return flatHazard(credit.rate);
    case "yearly":
      return yearlyDefault(credit.probability);
    case "cumulative":
      return cumulativeDefault(credit.nodes);
    case "defaulted":
      return defaultedName();
    default:
      return quotedCurve(id, credit, recovery, market, path, problems);
  }
}

function quotedCurve(
  id: string,
  credit: Extract<CreditInput, { kind: "spread" | "upfront" }>,
  recovery: number,
  market: MarketSide,
  path: string,
  problems: PricingProblem[],
): SurvivalCurve | null {
  const rows =
    credit.kind === "spread"
      ? credit.nodes.map((node, k) => ({
          years: node.years,
          coupon: node.spread,
          upfront: 0,
          path: `credit.nodes.${k}`,
        }))
      : [{ years: credit.years, coupon: credit.coupon, upfront: credit.upfront, path: "credit" }];
  const quotes: SwapQuote[] = [];
  let isWhole = true;
  for (const row of rows) {
    const schedule = tenorSchedule(market.rule, row.years);
    if (schedule.ok) quotes.push({ ...row, schedule: schedule.value });
    else {
      isWhole = false;
      for (const { code, message, value } of schedule.problems) {
        problems.push({
          code,
          path: `${path}.${row.path}.years`,
          value,
          message: `Name ${id}: ${message} (it is ${row.years} years).`,
        });
      }
    }
  }
  if (!isWhole) return null;
  const curve = bootstrapSurvival(quotes, market.discount, recovery);
  if (curve.ok) return curve.value;
  for (const { code, path: at, message, value } of curve.problems) {
    problems.push({
      code,
      path: `${path}.${at}`,
      value,
      message: `Name ${id}, credit: ${message} (it is ${value}).`,
    });
  }
  return null;
}
