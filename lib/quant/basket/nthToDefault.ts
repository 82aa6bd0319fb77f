import { mixOverFactor, withoutFactor } from "../maths/adaptiveMixture";
import { ConditionalProbabilities, type FactorNames } from "../portfolio/factorNames";
import { panelBoundaries } from "../portfolio/factorPanels";
import { LOWEST_FACTOR, MIXTURE_ACCURACY } from "../portfolio/oneFactorLaw";
import { type ClockPoint, CountRise, clockPoints } from "./countRise";
import { MixedProbes } from "./mixedProbes";

/** Names of a basket at the start and the end of a period, in a one-factor copula with loadings in (−1, 1). */
export interface BasketPeriod {
  readonly before: FactorNames | null;
  readonly after: FactorNames;
}

/** What a period adds to the n-th-to-default contracts, n = 1..most. */
export interface PeriodOutcome {
  /** P(at least n defaults by the end). */
  readonly reached: Float64Array;
  /** Expected payment in the period: Σ payoff_i P(name i is the n-th, in this period); zero where all payoffs are alike. */
  readonly paid: Float64Array;
}

/**
 * One period of the n-th-to-default contracts. Given the factor, default probabilities rise together within the period
 * (linearly in a common clock), so that the chances of being the n-th sum exactly to the rise of P_n.
 */
export function nthPeriod(period: BasketPeriod, payoffs: readonly number[], most: number): PeriodOutcome {
  const family = new NthFamily(period, payoffs, most);
  if (period.after.loadings.every((loading) => loading === 0)) withoutFactor(family);
  else {
    const sizes = payoffs.map(() => 1);
    const boundaries = panelBoundaries(sizes, period.after, LOWEST_FACTOR, -LOWEST_FACTOR);
    const likely = new Float64Array(family.probes).fill(1e-3);
    mixOverFactor(family, boundaries, MIXTURE_ACCURACY, likely);
  }
  return { reached: family.total.slice(0, most), paid: family.total.slice(most) };
}

class NthFamily extends MixedProbes {
  private readonly before: ConditionalProbabilities | null;
  private readonly after: ConditionalProbabilities;
  private readonly clock: readonly ClockPoint[];
  private readonly rise: CountRise;
  private readonly none: Float64Array;

  constructor(
    period: BasketPeriod,
    payoffs: readonly number[],
    private readonly most: number,
  ) {
    super(2 * most);
    this.before = period.before && new ConditionalProbabilities(period.before);
    this.after = new ConditionalProbabilities(period.after);
    this.clock = clockPoints(payoffs);
    this.rise = new CountRise(payoffs, most, this.clock);
    this.none = new Float64Array(payoffs.length);
  }

  protected fill(factor: number): void {
    const { most, values, rise } = this;
    rise.evaluate(this.before ? this.before.at(factor) : this.none, this.after.at(factor));
    reachedFrom(rise.end, values);
    values.fill(0, most);
    for (const [c, { weight }] of this.clock.entries()) {
      for (let n = 0; n < most; n++) values[most + n]! += weight * rise.costs[c]![n]!;
    }
  }
}

/** P(count ≥ n), n = 1.., from P(count = k), k = 0... */
export function reachedFrom(counts: Float64Array, reached: Float64Array): void {
  let below = 0;
  for (let n = 0; n < counts.length; n++) {
    below += counts[n]!;
    reached[n] = Math.max(0, 1 - below);
  }
}
