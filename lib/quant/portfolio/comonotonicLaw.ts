import { normalCdf } from "../maths/normal";
import type { AmountLaw } from "./lossLaw";

/**
 * The law when every name follows the factor alone (correlation one): the name with the highest threshold defaults
 * first, so the sum takes at most one value a name. Exact, whatever the amounts.
 */
export function comonotonicLaw(amounts: readonly number[], thresholds: Float64Array): AmountLaw {
  const order = amounts
    .map((_, i) => i)
    .sort((one, other) => thresholds[other]! - thresholds[one]! || one - other);
  const sums = new Float64Array(amounts.length + 1);
  const masses = new Float64Array(amounts.length + 1);
  let above = Number.POSITIVE_INFINITY;
  for (const [k, i] of order.entries()) {
    masses[k] = intervalMass(thresholds[i]!, above);
    sums[k + 1] = sums[k]! + amounts[i]!;
    above = thresholds[i]!;
  }
  masses[amounts.length] = normalCdf(above);
  return { amounts: sums, masses, overflow: 0, error: 0 };
}

/** P(low < M ≤ high) from the tail in which both are small. */
function intervalMass(low: number, high: number): number {
  return low > 0 ? normalCdf(-low) - normalCdf(-high) : normalCdf(high) - normalCdf(low);
}
