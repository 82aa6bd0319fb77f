import { curveAt, type TermNodes } from "../quant/tranche/termCurve";
import type { BaseCorrelationInput } from "./request";

/** The nodes of a base curve between quoted maturities: linear in ρ at equal K, the nearest curve outside. Curves rise in years. */
export function nodesAt(
  curves: readonly TermNodes[],
  years: number,
  reading: Pick<BaseCorrelationInput, "interpolation" | "beyond">,
): { strike: number; rho: number }[] {
  return curveAt(curves, years, reading).map(({ strike, rho }) => ({ strike, rho }));
}
