import type { Dependence, Distribution } from "../quant/portfolio/distribution";
import type { Valuation } from "./valuation";

/** Error of E[min(L, K)] that rounding leaves on an exact lattice. */
const ROUNDING = 1e-13;
/** The quadrature's estimate compares rules of different order; a bound is some times an estimate. */
const QUADRATURE = 10;
/**
 * The move from a grid to half its unit is most of the grid's error; a bound is some times that. A sector model's law costs too
 * much on the finer grid: the move from twice the unit, which is larger, stands for it.
 */
const HALVING = 2;
/**
 * Where a strike is a loss the pool can reach exactly, the kink of min(L, K) falls between landing points and two grids may
 * err alike: interpolation errs there by up to a quarter of a step, with the probability of landing around the strike.
 */
const KINK = 0.25;
/** How far from its amount a name may land, in steps. */
const LANDING = 2;
/** A strike this close to the largest sum is the largest sum. */
const SAME = 1e-11;

/**
 * A bound on the error of E[min(L, K)] at maturity and the request's worst strike, in fractions of the pool's notional: the
 * quadrature's own estimate, and on a shared grid the move to half its unit plus what a kink between landing points can add.
 */
export function numericalError(valuation: Valuation): number {
  const { dependence, laws, portfolio, base } = valuation;
  const last = portfolio.times.length - 1;
  const strikes = strikesInside(valuation);
  if (dependence.kind === "common") {
    const own = dependence.dependence;
    const law = () => laws.whole("loss", last, own, laws.isExact);
    const quadrature = laws.whole("loss", last, own).error;
    return ROUNDING + QUADRATURE * quadrature + gridError(valuation, own, strikes, law);
  }
  const errors = strikes.map((strike) => {
    if (!base?.curve || !base.isUsable(strike + portfolio.realisedLoss)) return 0;
    const own: Dependence = { kind: "flat", rho: dependence.rhoAt(strike + portfolio.realisedLoss) };
    const law = laws.atStrike("loss", last, own, strike, laws.isExact);
    return QUADRATURE * law.error + gridError(valuation, own, [strike], () => law);
  });
  return ROUNDING + Math.max(0, ...errors);
}

/** Strikes of the live sum at which the request's tranches do not know their expected loss in closed form. */
function strikesInside({ request, portfolio }: Valuation): number[] {
  const largest = portfolio.live.reduce((sum, name) => sum + name.loss, 0);
  const strikes = request.tranches
    .flatMap(({ attachment, detachment }) => [attachment, detachment])
    .map((strike) => strike - portfolio.realisedLoss)
    .filter((strike) => strike > 0 && strike < largest - SAME);
  return [...new Set(strikes)].sort((one, other) => one - other);
}

/** What a shared grid may err by at the worst of strikes in rising order; 0 where none is used. `law` has no negative mass. */
function gridError(
  { laws, portfolio }: Valuation,
  dependence: Dependence,
  strikes: readonly number[],
  law: () => Distribution,
): number {
  const unit = laws.sharedUnit(dependence);
  if (unit === null || strikes.length === 0) return 0;
  const { above, isContinuous } = law();
  if (isContinuous) return 0;
  const { live, times } = portfolio;
  const last = times.length - 1;
  const mean = live.reduce((sum, name) => sum + name.loss, 0) / live.length;
  const other = dependence.kind === "sector" ? 2 * unit : unit / 2;
  const others = laws.onUnit(other).expectedMinimaOnce(last, dependence, strikes);
  const errors = strikes.map((strike, i) => {
    const around = LANDING * unit * (1 + Math.sqrt(Math.min(live.length, strike / mean)));
    const landing = Math.min(1, above(strike - around) - above(strike + around));
    const moved = Math.abs(laws.expectedMinimum("loss", last, dependence, strike) - others[i]!);
    return HALVING * moved + KINK * unit * landing;
  });
  return Math.max(...errors);
}
