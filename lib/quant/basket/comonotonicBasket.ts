import { normalCdf } from "../maths/normal";
import type { PeriodOutcome } from "./nthToDefault";

/**
 * One period of the n-th-to-default contracts at correlation one: names default in the order of their thresholds, so
 * the n-th defaults when the factor falls below the n-th highest of them. Names with the same threshold default
 * together and share the payoff evenly.
 */
export function comonotonicPeriod(
  before: Float64Array | null,
  after: Float64Array,
  payoffs: readonly number[],
  most: number,
): PeriodOutcome {
  const order = Array.from(after.keys()).sort((one, other) => after[other]! - after[one]! || one - other);
  const earlier = before ? [...before].sort((one, other) => other - one) : null;
  const reached = new Float64Array(most);
  const paid = new Float64Array(most);
  for (let n = 0; n < most; n++) {
    const threshold = after[order[n]!]!;
    reached[n] = normalCdf(threshold);
    const rise = Math.max(0, reached[n]! - (earlier ? normalCdf(earlier[n]!) : 0));
    paid[n] = rise * meanPayoff(order, after, payoffs, threshold);
  }
  return { reached, paid };
}

function meanPayoff(
  order: readonly number[],
  after: Float64Array,
  payoffs: readonly number[],
  threshold: number,
): number {
  const together = order.filter((i) => after[i] === threshold);
  return together.reduce((sum, i) => sum + payoffs[i]!, 0) / together.length;
}
