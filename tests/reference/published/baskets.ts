import type { PricingRequest } from "@/lib/pricing/request";
import { defaultProbability, flatHazard } from "@/lib/quant/market/survivalCurve";
import { gaussHermite, printedFactor } from "../support/gaussRule";
import { independentCounts } from "../support/independentCounts";
import { type Check, input, type Published } from "./check";
import { breakEven, evenTimes, type PrintedLegs, printedLegs } from "./legs";
import { conditional, reportOf } from "./tranches";

interface Basket {
  readonly hazard: number;
  readonly rho: number;
  readonly perYear: number;
  readonly credit?: PricingRequest["pool"][number]["credit"];
}

/** Ten alike names over some years. */
function basketRequest(
  { hazard, rho, perYear, credit }: Basket,
  years: number,
  contracts: number[],
): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years, perYear },
    discount: { kind: "flat", rate: 0.05 },
    pool: Array.from({ length: 10 }, (_, i) => ({
      id: `N${i}`,
      notional: 1,
      recovery: 0.4,
      credit: credit ?? { kind: "hazard" as const, rate: hazard },
    })),
    correlation: { kind: "flat", rho },
    tranches: [],
    nthToDefault: contracts,
  };
}

const hullBasket: Basket = { hazard: 0.02, rho: 0.3, perYear: 1 };
const YEARS = [1, 2, 3, 4, 5];
/** The factor of Hull's worked row. */
const WORKED_FACTOR = printedFactor(60, -1.0104);

function conditionalYears(factor: number): number[] {
  return YEARS.map((t) => conditional(defaultProbability(flatHazard(0.02), t), 0.3, factor));
}

/** P(at least three defaults by each year | factor): the report of independent names. */
function thirdGiven(factor: number): number[] {
  const nodes = conditionalYears(factor).map((probability, i) => ({ years: i + 1, probability }));
  const basket: Basket = { ...hullBasket, rho: 0, credit: { kind: "cumulative", nodes } };
  return YEARS.map((years) => reportOf(basketRequest(basket, years, [3])).nthToDefault[0]!.probability);
}

function thirdLegs(reached: readonly number[]): PrintedLegs {
  const all = [0, ...reached];
  return printedLegs(
    evenTimes(5, 1, 0.05),
    all.map((probability) => 0.6 * probability),
    all.map((probability) => 1 - probability),
  );
}

/** The unconditional chance with the source's 60-point rule over the factor. */
function thirdByHermite(points: number): number[] {
  const { nodes, weights } = gaussHermite(points);
  const reached = YEARS.map(() => 0);
  for (const [i, node] of nodes.entries()) {
    for (const [year, probability] of conditionalYears(Math.SQRT2 * node).entries()) {
      const beyond = independentCounts(10, probability)
        .slice(3)
        .reduce((sum, mass) => sum + mass, 0);
      reached[year]! += (weights[i]! / Math.sqrt(Math.PI)) * beyond;
    }
  }
  return reached;
}

function figures({ payments, accrual, payoff }: PrintedLegs): number[] {
  return [payoff, payments, accrual];
}

function nthSpreads(entry: Published): number[] {
  const basket: Basket = { hazard: input(entry, "hazard"), rho: input(entry, "rho"), perYear: 4 };
  const contracts = Array.from({ length: 10 }, (_, i) => i + 1);
  return reportOf(basketRequest(basket, 5, contracts)).nthToDefault.map(({ parSpread }) => 1e4 * parSpread!);
}

/** Baskets: the n-th of ten alike names. */
export const basketChecks: readonly Check[] = [
  { of: /^HW-ntd-/, compute: nthSpreads, agreement: 1e-8 },
  {
    of: /^HULL-3TD-Q$/,
    compute: (entry) => YEARS.map((t) => defaultProbability(flatHazard(input(entry, "hazard")), t)),
  },
  { of: /^HULL-3TD-cPD$/, compute: (entry) => conditionalYears(printedFactor(60, input(entry, "F"))) },
  { of: /^HULL-3TD-P3$/, compute: () => thirdGiven(WORKED_FACTOR) },
  { of: /^HULL-3TD-cPV$/, compute: () => figures(thirdLegs(thirdGiven(WORKED_FACTOR))) },
  { of: /^HULL-3TD-PV$/, compute: (entry) => figures(thirdLegs(thirdByHermite(input(entry, "M")))) },
  { of: /^HULL-3TD-s$/, compute: () => [1e4 * breakEven(thirdLegs(thirdByHermite(60)))] },
];
