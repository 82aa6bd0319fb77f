import { price } from "@/lib/pricing/price";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";
import { discountFactor } from "@/lib/quant/market/discountCurve";
import { defaultProbability, flatHazard } from "@/lib/quant/market/survivalCurve";
import { normalCdf, normalQuantile } from "@/lib/quant/maths/normal";
import { brentRoot } from "@/lib/quant/maths/roots";
import { gaussHermite, printedFactor } from "../support/gaussRule";
import { independentCounts } from "../support/independentCounts";
import { type Check, input, type Published } from "./check";
import { textbookHazard } from "./defaultSwaps";
import { breakEven, evenTimes, flatCurve, type PrintedLegs, printedLegs } from "./legs";

/** A pool of alike names with quarterly payments over five years. */
export interface AlikePool {
  readonly names: number;
  readonly recovery: number;
  readonly hazard: number;
  readonly rate: number;
}

type Strikes = readonly [attachment: number, detachment: number];

const QUARTERS = 20;

/** P(default by t | factor) in the one-factor Gaussian copula. */
export function conditional(probability: number, rho: number, factor: number): number {
  return normalCdf((normalQuantile(probability) - Math.sqrt(rho) * factor) / Math.sqrt(1 - rho));
}

/** Prices a request that is known to be sound. */
export function reportOf(request: PricingRequest): PricingReport {
  const outcome = price(request);
  if (!outcome.ok) throw new Error(outcome.problems.map(({ message }) => message).join(" "));
  return outcome.report;
}

/** The alike pool as a request. */
export function alikeRequest(pool: AlikePool, rho: number, tranches: readonly Strikes[]): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years: 5, perYear: 4 },
    discount: { kind: "flat", rate: pool.rate },
    pool: Array.from({ length: pool.names }, (_, i) => ({
      id: `N${i}`,
      notional: 1,
      recovery: pool.recovery,
      credit: { kind: "hazard" as const, rate: pool.hazard },
    })),
    correlation: { kind: "flat", rho },
    tranches: tranches.map(([attachment, detachment], i) => ({ id: `T${i}`, attachment, detachment })),
    include: ["timeline"],
  };
}

/** Expected outstanding principal at the payment dates given the factor: the report of independent names. */
function conditionalOutstanding(pool: AlikePool, rho: number, strikes: Strikes, factor: number): number[] {
  const request = alikeRequest(pool, 0, [strikes]);
  const nodes = Array.from({ length: QUARTERS }, (_, j) => ({
    years: (j + 1) / 4,
    probability: conditional(defaultProbability(flatHazard(pool.hazard), (j + 1) / 4), rho, factor),
  }));
  const names = request.pool.map((name) => ({ ...name, credit: { kind: "cumulative" as const, nodes } }));
  const { timeline } = reportOf({ ...request, pool: names });
  return [1, ...timeline!.map(({ trancheExpectedLoss }) => 1 - trancheExpectedLoss[0]!)];
}

/** The same with the source's own Gauss–Hermite rule over the factor. */
function hermiteOutstanding(pool: AlikePool, rho: number, strikes: Strikes, points: number): number[] {
  const { nodes, weights } = gaussHermite(points);
  const [attachment, detachment] = strikes;
  const loss = (1 - pool.recovery) / pool.names;
  const shares = Array.from({ length: pool.names + 1 }, (_, k) =>
    Math.min(Math.max((k * loss - attachment) / (detachment - attachment), 0), 1),
  );
  return Array.from({ length: QUARTERS + 1 }, (_, j) => {
    const probability = defaultProbability(flatHazard(pool.hazard), j / 4);
    let expected = 0;
    for (const [i, node] of nodes.entries()) {
      const given = j === 0 ? 0 : conditional(probability, rho, Math.SQRT2 * node);
      const law = independentCounts(pool.names, given);
      const mean = shares.reduce((sum, share, k) => sum + share * law[k]!, 0);
      expected += (weights[i]! / Math.sqrt(Math.PI)) * mean;
    }
    return 1 - expected;
  });
}

function legsFrom(pool: AlikePool, outstanding: readonly number[]): PrintedLegs {
  return printedLegs(
    evenTimes(5, 4, pool.rate),
    outstanding.map((left) => 1 - left),
    outstanding,
  );
}

function hullPool(entry: Published): AlikePool {
  const [rate, recovery] = [input(entry, "r"), input(entry, "R")];
  return {
    names: 125,
    recovery,
    rate,
    hazard: textbookHazard(input(entry, "index"), { recovery, rate, perYear: 4 }),
  };
}

function hullLegs(entry: Published): PrintedLegs {
  const strikes: Strikes = [input(entry, "a"), input(entry, "d")];
  const pool = hullPool(entry);
  return legsFrom(pool, hermiteOutstanding(pool, input(entry, "rho"), strikes, input(entry, "M")));
}

/** Index quotes of 31 January 2007, Hull's table 25.6: upfront and 500 bp at the bottom, running spreads above. */
export const quotes2007: readonly { strikes: Strikes; running: number; upfront: number }[] = [
  { strikes: [0, 0.03], running: 0.05, upfront: 0.1034 },
  { strikes: [0.03, 0.06], running: 0.004159, upfront: 0 },
  { strikes: [0.06, 0.09], running: 0.001195, upfront: 0 },
  { strikes: [0.09, 0.12], running: 0.00056, upfront: 0 },
  { strikes: [0.12, 0.22], running: 0.0002, upfront: 0 },
];

/** The pool behind those quotes: 125 names at the hazard of the index spread. */
export const pool2007: AlikePool = {
  names: 125,
  recovery: 0.4,
  rate: 0.03,
  hazard: textbookHazard(0.0023, { recovery: 0.4, rate: 0.03, perYear: 4 }),
};

function compoundCorrelations(points: number): number[] {
  return quotes2007.map(({ strikes, running, upfront }) =>
    brentRoot(
      (rho) => {
        const { payments, accrual, payoff } = legsFrom(
          pool2007,
          hermiteOutstanding(pool2007, rho, strikes, points),
        );
        return payoff - running * (payments + accrual) - upfront;
      },
      0.005,
      0.6,
      1e-9,
    ),
  );
}

/** Hull's base correlations match the value of the expected loss below each strike, not the spread. */
function lossMatchedBase(compound: readonly number[], points: number): number[] {
  const lossBelow = (strike: number, rho: number) =>
    strike * legsFrom(pool2007, hermiteOutstanding(pool2007, rho, [0, strike], points)).payoff;
  let below = 0;
  return quotes2007.map(({ strikes: [attachment, detachment] }, i) => {
    const own = legsFrom(
      pool2007,
      hermiteOutstanding(pool2007, compound[i]!, [attachment, detachment], points),
    );
    below += (detachment - attachment) * own.payoff;
    return brentRoot((rho) => lossBelow(detachment, rho) - below, 0.01, 0.95, 1e-9);
  });
}

/** Gibson's legs: losses and premiums at the ends of periods, nothing accrued. */
function endOfPeriodSpread(entry: Published): number {
  const pool = {
    names: input(entry, "names"),
    recovery: input(entry, "R"),
    rate: input(entry, "r"),
    hazard: input(entry, "hazard"),
  };
  const { timeline } = reportOf(alikeRequest(pool, input(entry, "rho"), [[0, 0.03]]));
  const discount = flatCurve(pool.rate);
  let before = 0;
  const legs = { losses: 0, premiums: 0 };
  for (const { time, trancheExpectedLoss } of timeline!) {
    const loss = trancheExpectedLoss[0]!;
    legs.losses += discountFactor(discount, time) * (loss - before);
    legs.premiums += 0.25 * discountFactor(discount, time) * (1 - loss);
    before = loss;
  }
  return legs.losses / legs.premiums;
}

/** Tranches of alike pools in textbooks and papers. */
export const trancheChecks: readonly Check[] = [
  {
    of: /^HULL-CDO-ABC$/,
    compute: (entry) => {
      const { payments, accrual, payoff } = hullLegs(entry);
      return [payments, accrual, payoff];
    },
  },
  { of: /^HULL-CDO-s$/, compute: (entry) => [1e4 * breakEven(hullLegs(entry))] },
  {
    of: /^HULL-T257-/,
    compute: (entry) => {
      const pool = hullPool(entry);
      const strikes: Strikes = [input(entry, "a"), input(entry, "d")];
      const factor = printedFactor(input(entry, "M"), input(entry, "F"));
      const left = conditionalOutstanding(pool, input(entry, "rho"), strikes, factor);
      const { payments, accrual, payoff } = legsFrom(pool, left);
      const paid = [19, 20].map((j) => 0.25 * left[j]! * discountFactor(flatCurve(pool.rate), j / 4));
      return [left[19]!, left[20]!, ...paid, payments, accrual, payoff];
    },
  },
  {
    of: /^HULL-IC-comp07$/,
    compute: (entry) => compoundCorrelations(input(entry, "M")).map((rho) => 100 * rho),
    agreement: 1e-7,
  },
  {
    of: /^HULL-IC-base07$/,
    compute: (entry) =>
      lossMatchedBase(compoundCorrelations(input(entry, "M")), input(entry, "M")).map((rho) => 100 * rho),
    agreement: 1e-7,
  },
  { of: /^GIBSON-eq$/, compute: (entry) => [1e4 * endOfPeriodSpread(entry)] },
];
