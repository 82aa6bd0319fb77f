import type { Valuation } from "./valuation";

/** Error of E[min(L, K)] that rounding leaves on an exact lattice. */
const ROUNDING = 1e-13;
/** Error that laying amounts on a shared grid leaves, as a multiple of unit² (three landing points). */
const SHARED_GRID = 0.05;

/**
 * A bound on the error of E[min(L, K)], in fractions of the pool's notional: the quadrature's own estimate at maturity,
 * plus what a shared grid may add; halving the grid shows the second one honest.
 */
export function numericalError({ laws, portfolio, dependence }: Valuation): number {
  const last = portfolio.times.length - 1;
  const quadrature =
    dependence.kind === "common" ? laws.whole("loss", last, dependence.dependence).error : 1e-12;
  const grid = laws.isExact || laws.unit === null ? 0 : SHARED_GRID * laws.unit * laws.unit;
  return ROUNDING + 10 * quadrature + grid;
}
