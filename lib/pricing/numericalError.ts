import type { Valuation } from "./valuation";

/** Error of E[min(L, K)] that rounding leaves on an exact lattice. */
const ROUNDING = 1e-13;
/**
 * Error that a shared grid leaves, as a multiple of its unit, where the strike is a loss the pool can reach exactly:
 * the kink of min(L, K) then falls between landing points, where interpolation errs by up to a
 * quarter of a step. Away from such strikes it is far less.
 */
const SHARED_GRID = 0.25;

/**
 * A bound on the error of E[min(L, K)], in fractions of the pool's notional: the quadrature's own estimate at maturity,
 * plus what a shared grid may add at the worst strike; without a default it adds nothing, hence the expected number.
 */
export function numericalError({ laws, portfolio, dependence }: Valuation): number {
  const last = portfolio.times.length - 1;
  const quadrature =
    dependence.kind === "common" ? laws.whole("loss", last, dependence.dependence).error : 1e-12;
  const defaults = portfolio.expectedDefaults - (portfolio.names.length - portfolio.live.length);
  const grid = laws.isExact || laws.unit === null ? 0 : SHARED_GRID * laws.unit * Math.min(1, defaults);
  return ROUNDING + 10 * quadrature + grid;
}
