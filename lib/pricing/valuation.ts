import type { PaymentSchedule } from "../quant/market/schedule";
import { type Dependence, PoolLaws } from "../quant/portfolio/distribution";
import { type Portfolio, type PortfolioName, portfolioOf } from "../quant/portfolio/portfolio";
import { type BaseLadder, baseLadder, type TrancheQuote } from "../quant/tranche/baseCorrelation";
import { type BaseNode, baseCurve } from "../quant/tranche/baseCurve";
import { type StrikeDependence, type TrancheStrikes, trancheProfile } from "../quant/tranche/expectedLoss";
import { contractLegs, type LegTimes, legTimes, upfrontAt } from "../quant/tranche/legs";
import { mappedStrike } from "../quant/tranche/mapping";
import { type MarketSide, marketSide, poolNames } from "./curves";
import type { PricingProblem } from "./problem";
import type { ReportWarning } from "./report";
import type { BaseCorrelationInput, PricingRequest, TrancheInput } from "./request";

/** Everything a report is read from: curves built, pool laid on its dates, dependence solved. */
export interface Valuation {
  readonly request: PricingRequest;
  readonly market: MarketSide;
  readonly names: readonly PortfolioName[];
  readonly portfolio: Portfolio;
  readonly times: LegTimes;
  readonly laws: PoolLaws;
  readonly dependence: StrikeDependence;
  readonly base: BaseSide | null;
}

/** The base curve of a request, solved from quotes or given. */
export interface BaseSide {
  readonly nodes: readonly BaseNode[];
  readonly ladder: BaseLadder | null;
  readonly curve: ((strike: number) => number) | null;
  readonly indexLaws: PoolLaws;
  /** The index strike that a strike of the pool is read at; null where there is none. */
  mapped(strike: number): number | null;
  /** Whether a strike can be read at all: solved, and mapped. */
  isUsable(strike: number): boolean;
  readonly warnings: readonly ReportWarning[];
}

/** What a valuation can be asked to take instead of the request's own parts (for bumps). */
export interface Replacements {
  readonly market?: MarketSide;
  readonly names?: readonly PortfolioName[];
  readonly indexNames?: readonly PortfolioName[];
  /** Nodes of the base curve as first solved, moved; quotes are then not solved again. */
  readonly baseNodes?: readonly BaseNode[];
  readonly rho?: number;
}

/** Builds the valuation of a checked request, or collects what prevents it (curves without a hazard …). */
export function valuationOf(
  request: PricingRequest,
  problems: PricingProblem[],
  replacements: Replacements = {},
): Valuation | null {
  const market = replacements.market ?? marketSide(request, problems);
  if (!market) return null;
  const names = replacements.names ?? poolNames(request.pool, market, "pool", problems);
  const index = request.correlation.kind === "base" ? request.correlation.index : undefined;
  const indexNames =
    replacements.indexNames ??
    (index ? poolNames(index.pool, market, "correlation.index.pool", problems) : names);
  if (problems.length > 0) return null;
  const portfolio = portfolioOf(names, datesOf(market.schedule));
  const times = legTimes(market.schedule, market.discount);
  const laws = new PoolLaws(
    portfolio,
    request.law ?? { kind: "finite" },
    strikesOf(request.tranches, portfolio),
  );
  if (request.correlation.kind === "base") {
    const indexLaws = index ? indexLawsOf(request, request.correlation, market, indexNames) : laws;
    const base = baseSide(request.correlation, times, laws, indexLaws, replacements.baseNodes);
    const rhoAt = (strike: number) => base.curve!(strike <= 0 ? 0 : base.mapped(strike)!);
    return { request, market, names, portfolio, times, laws, base, dependence: { kind: "byStrike", rhoAt } };
  }
  const dependence = commonDependence(request, replacements.rho);
  return {
    request,
    market,
    names,
    portfolio,
    times,
    laws,
    base: null,
    dependence: { kind: "common", dependence },
  };
}

function datesOf(schedule: PaymentSchedule): number[] {
  return schedule.periods.map((period) => period.end);
}

/** Strikes of the live names' sums at which a law must be accurate. */
function strikesOf(tranches: readonly TrancheInput[], portfolio: Portfolio) {
  const strikes = tranches.flatMap((tranche) => [tranche.attachment, tranche.detachment]);
  const live = (values: readonly number[], realised: number) =>
    [...new Set(values.map((value) => value - realised).filter((value) => value > 0))].sort((a, b) => a - b);
  return {
    loss: orDefault(live(strikes, portfolio.realisedLoss)),
    recovery: orDefault(
      live(
        strikes.map((strike) => 1 - strike),
        portfolio.realisedRecovery,
      ),
    ),
  };
}

function orDefault(strikes: readonly number[]): readonly number[] {
  return strikes.length > 0 ? strikes : [0.03, 0.1, 0.3];
}

function indexLawsOf(
  request: PricingRequest,
  correlation: BaseCorrelationInput,
  market: MarketSide,
  names: readonly PortfolioName[],
): PoolLaws {
  const portfolio = portfolioOf(names, datesOf(market.schedule));
  const quoted =
    "quotes" in correlation
      ? correlation.quotes.map((quote) => quote.detachment)
      : correlation.nodes.map((node) => node.strike);
  const strikes = {
    loss: orDefault(quoted.map((strike) => strike - portfolio.realisedLoss).filter((strike) => strike > 0)),
    recovery: [0.1],
  };
  return new PoolLaws(portfolio, request.law ?? { kind: "finite" }, strikes);
}

function commonDependence(request: PricingRequest, rho: number | undefined): Dependence {
  const { correlation } = request;
  if (correlation.kind === "flat") return { kind: "flat", rho: rho ?? correlation.rho };
  if (correlation.kind === "sector")
    return { kind: "sector", within: correlation.within, between: correlation.between };
  return { kind: "loadings" };
}

function baseSide(
  correlation: BaseCorrelationInput,
  times: LegTimes,
  laws: PoolLaws,
  indexLaws: PoolLaws,
  given: readonly BaseNode[] | undefined,
): BaseSide {
  const ladder = !given && "quotes" in correlation ? baseLadder(indexLaws, times, correlation.quotes) : null;
  const nodes = given ?? ladder?.nodes ?? ("nodes" in correlation ? correlation.nodes : []);
  const curve = nodes.length > 0 ? baseCurve(nodes, correlation) : null;
  const stoppedAbove = ladder?.stopped ? (nodes[nodes.length - 1]?.strike ?? 0) : null;
  const kept = new Map<number, number | null>();
  const mapped = (strike: number): number | null => {
    if (!curve) return null;
    let found = kept.get(strike);
    if (found === undefined) {
      found = mappedStrike(correlation.mapping, { index: indexLaws, pool: laws, rhoAt: curve }, strike);
      kept.set(strike, found);
    }
    return found;
  };
  const isUsable = (strike: number) => {
    if (strike <= 0) return true;
    const at = mapped(strike);
    return at !== null && (stoppedAbove === null || at <= stoppedAbove + 1e-12);
  };
  const warnings =
    "quotes" in correlation && !given
      ? quoteWarnings(correlation.quotes, indexLaws, times, curve, ladder)
      : [];
  return { nodes, ladder, curve, indexLaws, mapped, isUsable, warnings };
}

/** A quote up to D = 1 is not solved: how far its repricing lies from the quote. */
function quoteWarnings(
  quotes: readonly TrancheQuote[],
  laws: PoolLaws,
  times: LegTimes,
  curve: ((strike: number) => number) | null,
  ladder: BaseLadder | null,
): ReportWarning[] {
  const top = quotes[quotes.length - 1];
  if (!top || top.detachment < 1 || !curve || ladder?.stopped) return [];
  const dependence: StrikeDependence = { kind: "byStrike", rhoAt: curve };
  const difference = upfrontAt(quoteLegs(laws, times, dependence, top), top.running) - top.upfront;
  const message = `The quote from ${top.attachment} to 1 cannot determine a correlation at 1; the curve reprices it ${difference} above its upfront.`;
  return [{ code: "unsolvedQuote", message, subject: `${top.attachment}-1` }];
}

function quoteLegs(laws: PoolLaws, times: LegTimes, dependence: StrikeDependence, quote: TrancheQuote) {
  const strikes: TrancheStrikes = { ...quote, recoveryPaydown: quote.detachment >= 1 };
  const profile = trancheProfile(laws, dependence, strikes);
  return contractLegs(times, profile.loss, profile.outstanding);
}
