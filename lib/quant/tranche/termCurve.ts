import { type BaseNode, type BaseReading, baseCurve } from "./baseCurve";

/** A base curve quoted at a maturity, in years. */
export interface TermNodes {
  readonly years: number;
  readonly nodes: readonly BaseNode[];
}

/**
 * The base curve at a maturity between quoted ones: linear in ρ at equal K, each quoted curve read by its own interpolation; before
 * the first and after the last maturity the nearest curve. Nodes stand at every quoted strike of the curves used. `curves` rise in
 * years and have nodes.
 */
export function curveAt(curves: readonly TermNodes[], years: number, reading: BaseReading): BaseNode[] {
  const later = curves.find((curve) => curve.years >= years) ?? curves.at(-1)!;
  const earlier = curves.findLast((curve) => curve.years <= years) ?? curves[0]!;
  if (later.years === earlier.years) return [...later.nodes];
  const share = (years - earlier.years) / (later.years - earlier.years);
  const [from, to] = [baseCurve(earlier.nodes, reading), baseCurve(later.nodes, reading)];
  const strikes = [...new Set([...earlier.nodes, ...later.nodes].map(({ strike }) => strike))];
  return strikes
    .sort((one, other) => one - other)
    .map((strike) => ({ strike, rho: from(strike) + share * (to(strike) - from(strike)) }));
}
