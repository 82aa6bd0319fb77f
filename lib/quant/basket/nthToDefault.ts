import { type ConditionalFamily, mixOverFactor, withoutFactor } from "../maths/adaptiveMixture";
import { gaussLegendre } from "../maths/quadrature";
import { ConditionalProbabilities, type FactorNames } from "../portfolio/factorNames";
import { panelBoundaries } from "../portfolio/factorPanels";
import { LOWEST_FACTOR, MIXTURE_ACCURACY } from "../portfolio/oneFactorLaw";

/** Names of a basket at the start and the end of a period, in a one-factor copula with loadings in (−1, 1). */
export interface BasketPeriod {
  readonly before: FactorNames | null;
  readonly after: FactorNames;
}

/** What a period adds to the n-th-to-default contracts, n = 1..most. */
export interface PeriodOutcome {
  /** P(at least n defaults by the end). */
  readonly reached: Float64Array;
  /** Expected payment in the period: Σ payoff_i P(name i is the n-th, in this period). */
  readonly paid: Float64Array;
}

/**
 * One period of the n-th-to-default contracts. Given the factor, default probabilities rise together within the period
 * (linearly in a common clock), so that the chances of being the n-th sum exactly to the rise of P_n.
 */
export function nthPeriod(period: BasketPeriod, payoffs: readonly number[], most: number): PeriodOutcome {
  const family = new NthFamily(period, payoffs, most);
  const isFlat = period.after.loadings.every((loading) => loading === 0);
  if (isFlat) {
    withoutFactor(family);
  } else {
    const sizes = payoffs.map(() => 1);
    const boundaries = panelBoundaries(sizes, period.after, LOWEST_FACTOR, -LOWEST_FACTOR);
    const likely = new Float64Array(family.probes).fill(1e-3);
    mixOverFactor(family, boundaries, MIXTURE_ACCURACY, likely);
  }
  return { reached: family.total.slice(0, most), paid: family.total.slice(most) };
}

class NthFamily implements ConditionalFamily {
  readonly probes: number;
  readonly total: Float64Array;
  private readonly panel: Float64Array;
  private readonly values: Float64Array;
  private readonly before: ConditionalProbabilities | null;
  private readonly after: ConditionalProbabilities;
  private readonly prefix: Float64Array[];
  private readonly suffix: Float64Array[];
  private readonly clock: { time: number; weight: number }[];

  constructor(
    period: BasketPeriod,
    private readonly payoffs: readonly number[],
    private readonly most: number,
  ) {
    this.probes = 2 * most;
    this.total = new Float64Array(this.probes);
    this.panel = new Float64Array(this.probes);
    this.values = new Float64Array(this.probes);
    this.before = period.before && new ConditionalProbabilities(period.before);
    this.after = new ConditionalProbabilities(period.after);
    const rows = payoffs.length + 1;
    this.prefix = Array.from({ length: rows }, () => new Float64Array(most));
    this.suffix = Array.from({ length: rows }, () => new Float64Array(most));
    const { nodes, weights } = gaussLegendre(8);
    this.clock = Array.from(nodes, (node, k) => ({ time: 0.5 * (1 + node), weight: 0.5 * weights[k]! }));
  }

  evaluate(factor: number, probes: Float64Array): void {
    const after = this.after.at(factor);
    const before = this.before ? this.before.at(factor) : new Float64Array(after.length);
    const { most, values, payoffs } = this;
    values.fill(0);
    this.countLaw(this.prefix, after, false);
    const counts = this.prefix[payoffs.length]!;
    let below = 0;
    for (let n = 0; n < most; n++) {
      below += counts[n]!;
      values[n] = Math.max(0, 1 - below);
    }
    const now = new Float64Array(after.length);
    for (const { time, weight } of this.clock) {
      for (let i = 0; i < now.length; i++) now[i] = before[i]! + time * (after[i]! - before[i]!);
      this.countLaw(this.prefix, now, false);
      this.countLaw(this.suffix, now, true);
      for (let i = 0; i < payoffs.length; i++) {
        const rise = weight * payoffs[i]! * (after[i]! - before[i]!);
        if (rise === 0) continue;
        const left = this.prefix[i]!;
        const right = this.suffix[i + 1]!;
        for (let n = 0; n < most; n++) {
          let others = 0;
          for (let k = 0; k <= n; k++) others += left[k]! * right[n - k]!;
          values[most + n]! += rise * others;
        }
      }
    }
    probes.set(values);
  }

  /** rows[i]: law of the count among names before i (or from i on), for counts below `most`. */
  private countLaw(rows: readonly Float64Array[], probabilities: Float64Array, fromEnd: boolean): void {
    const count = probabilities.length;
    const first = rows[fromEnd ? count : 0]!;
    first.fill(0);
    first[0] = 1;
    for (let step = 0; step < count; step++) {
      const i = fromEnd ? count - 1 - step : step;
      const known = rows[fromEnd ? i + 1 : i]!;
      const next = rows[fromEnd ? i : i + 1]!;
      const probability = probabilities[i]!;
      for (let n = this.most - 1; n >= 0; n--) {
        next[n] = (1 - probability) * known[n]! + (n > 0 ? probability * known[n - 1]! : 0);
      }
    }
  }

  accumulate(weight: number): void {
    for (let i = 0; i < this.probes; i++) this.panel[i]! += weight * this.values[i]!;
  }

  clearPanel(): void {
    this.panel.fill(0);
  }

  acceptPanel(): void {
    for (let i = 0; i < this.probes; i++) this.total[i]! += this.panel[i]!;
  }
}
