import { brentRoot } from "../maths/roots";
import type { PoolLaws } from "../portfolio/distribution";
import type { BaseNode } from "./baseCurve";
import { contractLegs, type LegTimes, upfrontAt } from "./legs";

/** A quoted tranche of the index pool; recoveries pay the top one down. */
export interface TrancheQuote {
  readonly attachment: number;
  readonly detachment: number;
  readonly running: number;
  readonly upfront: number;
}

/** What the quotes determine, from the bottom up. */
export interface BaseLadder {
  readonly nodes: readonly BaseNode[];
  /** Where the ladder stopped: the quote's detachment, why, and the upfronts that some ρ(D) attains. */
  readonly stopped: {
    readonly strike: number;
    readonly reason: string;
    readonly attainable: [number, number];
  } | null;
}

const SCAN = 24;

/**
 * Base correlations at the detachments of contiguous quotes (McGinty, Beinstein, Ahluwalia & Watts 2004): each quoted
 * tranche, valued as [0, D] at ρ(D) less [0, A] at ρ(A), meets its upfront at its running coupon.
 * A quote up to D = 1 cannot determine ρ(1) and ends the ladder.
 */
export function baseLadder(laws: PoolLaws, times: LegTimes, quotes: readonly TrancheQuote[]): BaseLadder {
  const nodes: BaseNode[] = [];
  for (const quote of quotes) {
    if (quote.detachment >= 1) break;
    const below = baseLosses(laws, quote.attachment, nodes[nodes.length - 1]?.rho ?? 0);
    const miss = (rho: number) => quotedUpfront(laws, times, quote, below, rho) - quote.upfront;
    const solved = solve(miss);
    if (solved.rho === null) {
      const attainable: [number, number] = [solved.low + quote.upfront, solved.high + quote.upfront];
      return { nodes, stopped: { strike: quote.detachment, reason: "noCorrelation", attainable } };
    }
    nodes.push({ strike: quote.detachment, rho: solved.rho });
  }
  return { nodes, stopped: null };
}

/** E[min(L, K)] at each date, realised losses included, from the uncached law of the live names. */
export function baseLosses(laws: PoolLaws, strike: number, rho: number): Float64Array {
  const { portfolio } = laws;
  const rest = strike - portfolio.realisedLoss;
  return Float64Array.from(portfolio.times, (_, j) => {
    const certain = Math.min(portfolio.realisedLoss, strike);
    if (j === 0 || rest <= 0) return certain;
    return certain + laws.expectedMinimumOnce(j, rho, rest);
  });
}

function quotedUpfront(
  laws: PoolLaws,
  times: LegTimes,
  quote: TrancheQuote,
  below: Float64Array,
  rho: number,
): number {
  const above = baseLosses(laws, quote.detachment, rho);
  const width = quote.detachment - quote.attachment;
  const loss = above.map((value, j) => (value - below[j]!) / width);
  const outstanding = loss.map((value) => 1 - value);
  return upfrontAt(contractLegs(times, loss, outstanding), quote.running);
}

/** The root of a function of correlation on [0, 1], and its range where there is none. */
function solve(miss: (rho: number) => number): { rho: number | null; low: number; high: number } {
  const ends = [miss(0), miss(1)] as const;
  if (ends[0] === 0) return { rho: 0, low: ends[0], high: ends[0] };
  if (ends[0] > 0 !== ends[1] > 0 && ends[1] !== 0)
    return { rho: brentRoot(miss, 0, 1, 1e-14), low: 0, high: 0 };
  let before = { rho: 0, value: ends[0] };
  let low = Math.min(...ends);
  let high = Math.max(...ends);
  for (let i = 1; i < SCAN; i++) {
    const rho = i / SCAN;
    const value = miss(rho);
    if (value > 0 !== before.value > 0) return { rho: brentRoot(miss, before.rho, rho, 1e-14), low, high };
    low = Math.min(low, value);
    high = Math.max(high, value);
    before = { rho, value };
  }
  return { rho: null, low, high };
}
