import type { Dependence } from "../quant/portfolio/distribution";
import type { BaseNode } from "../quant/tranche/baseCurve";
import type { LegTimes } from "../quant/tranche/legs";
import { type LossCache, lossCache } from "../quant/tranche/lossCache";
import { checkRequest } from "./refusals";
import type { BaseCorrelationInput, PricingRequest } from "./request";
import { averageNameLoss } from "./trancheSection";
import { type Valuation, valuationOf } from "./valuation";

/** What a request's pool, curves and dates come to, ready for other boundaries, coupons and correlations. Plain data. */
export interface QuickCache {
  readonly losses: LossCache;
  readonly times: LegTimes;
  readonly notional: number;
  readonly realisedLoss: number;
  readonly realisedRecovery: number;
  /** Largest recovery of the live names, and its mean at dates 0..M. */
  readonly largestRecovery: number;
  readonly recoveryMeans: Float64Array;
  readonly poolLoss: number;
  readonly averageLoss: number;
  readonly base: QuickBase | null;
}

/** How a base curve is read: nodes as solved from quotes (null: they come with the request), up to where, scaled by what. */
export interface QuickBase {
  readonly nodes: readonly BaseNode[] | null;
  readonly usableUpTo: number;
  /** Index strike per strike of the pool. */
  readonly strikeRatio: number;
}

/** Boundaries may be moved this far beyond the highest one that the cache was made for. */
const REACH = 1.4;
const LEAST_REACH = 0.2;

/** The cache of a request; null where none can be made and every figure is priced afresh. Refused requests have none. */
export function quickCache(raw: unknown): QuickCache | null {
  const checked = checkRequest(raw);
  if (!checked.ok) return null;
  const { request } = checked;
  const { correlation } = request;
  if (correlation.kind === "base" && correlation.mapping !== "none" && correlation.mapping !== "moneyness")
    return null;
  const valuation = valuationOf(request, []);
  if (!valuation) return null;
  const { portfolio } = valuation;
  const highest = reachOf(request) - portfolio.realisedLoss;
  const losses = lossCache(valuation.laws, fixedDependence(valuation), highest);
  if (!losses) return null;
  const { live, times, realisedLoss, realisedRecovery, expectedLoss, surviving } = portfolio;
  return {
    losses,
    times: valuation.times,
    notional: portfolio.notional,
    realisedLoss,
    realisedRecovery,
    largestRecovery: live.reduce((sum, name) => sum + name.recovered, 0),
    recoveryMeans: Float64Array.from(
      times,
      (_, j) => 1 - surviving[j]! - expectedLoss[j]! - realisedRecovery,
    ),
    poolLoss: expectedLoss[times.length - 1]!,
    averageLoss: averageNameLoss(valuation),
    base: correlation.kind === "base" ? quickBase(valuation, correlation) : null,
  };
}

function reachOf({ tranches }: PricingRequest): number {
  const inside = tranches.flatMap(({ attachment, detachment }) => [attachment, detachment]);
  return Math.max(LEAST_REACH, REACH * Math.max(0, ...inside.filter((strike) => strike < 1)));
}

function fixedDependence({ dependence }: Valuation): Exclude<Dependence, { kind: "flat" }> | null {
  if (dependence.kind === "byStrike" || dependence.dependence.kind === "flat") return null;
  return dependence.dependence;
}

function quickBase({ base, laws }: Valuation, correlation: BaseCorrelationInput): QuickBase {
  const nodes = "quotes" in correlation ? base!.nodes : null;
  const lossOf = ({ portfolio }: typeof laws) => portfolio.expectedLoss[portfolio.expectedLoss.length - 1]!;
  return {
    nodes,
    usableUpTo: base!.ladder?.stopped ? (base!.nodes.at(-1)?.strike ?? 0) : Number.POSITIVE_INFINITY,
    strikeRatio: correlation.mapping === "moneyness" ? lossOf(base!.indexLaws) / lossOf(laws) : 1,
  };
}
