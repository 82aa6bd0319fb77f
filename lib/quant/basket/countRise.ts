import { gaussLegendre } from "../maths/quadrature";

/** A moment of the common clock that runs from 0 to 1 within a period, with its quadrature weight. */
export interface ClockPoint {
  readonly time: number;
  readonly weight: number;
}

const MOST_POINTS = 8;

/**
 * The moments at which a period is looked at: as many as integrate the basket's polynomials in the clock exactly, eight at most.
 * None where all payoffs are alike: then it does not matter which name is the n-th.
 */
export function clockPoints(payoffs: readonly number[]): ClockPoint[] {
  if (payoffs.every((payoff) => payoff === payoffs[0])) return [];
  const { nodes, weights } = gaussLegendre(Math.min(MOST_POINTS, Math.ceil(payoffs.length / 2)));
  return Array.from(nodes, (node, k) => ({ time: 0.5 * (1 + node), weight: 0.5 * weights[k]! }));
}

/**
 * Default counts of independent names over a period in which their probabilities rise together, linearly in a common clock:
 * the law of the count at the end and at each moment, and what each count costs when one more name defaults there.
 */
export class CountRise {
  /** P(count = k) at the end, k below `most`. */
  readonly end: Float64Array;
  /** P(count = k) at each moment. */
  readonly counts: readonly Float64Array[];
  /** Σ_i payoff_i rise_i P(others' count = k) at each moment. */
  readonly costs: readonly Float64Array[];
  private readonly prefix: Float64Array[];
  private readonly suffix: Float64Array[];
  private readonly now: Float64Array;
  private readonly first: Float64Array;
  private readonly last: Float64Array;

  constructor(
    private readonly payoffs: readonly number[],
    private readonly most: number,
    private readonly clock: readonly ClockPoint[],
  ) {
    const law = () => new Float64Array(most);
    this.end = law();
    this.counts = clock.map(law);
    this.costs = clock.map(law);
    this.prefix = Array.from({ length: payoffs.length + 1 }, law);
    this.suffix = Array.from({ length: payoffs.length + 1 }, law);
    this.now = new Float64Array(payoffs.length);
    this.first = new Float64Array(payoffs.length);
    this.last = new Float64Array(payoffs.length);
  }

  /** Fills the laws for names of these probabilities at the period's start and end. */
  evaluate(start: Float64Array, end: Float64Array): void {
    const { payoffs, most, now, clock } = this;
    const before = noticed(start, this.first);
    const after = noticed(end, this.last);
    this.countLaws(this.prefix, after, false);
    this.end.set(this.prefix[payoffs.length]!);
    for (const [c, { time }] of clock.entries()) {
      for (let i = 0; i < now.length; i++) now[i] = before[i]! + time * (after[i]! - before[i]!);
      this.countLaws(this.prefix, now, false);
      this.countLaws(this.suffix, now, true);
      this.counts[c]!.set(this.prefix[payoffs.length]!);
      const costs = this.costs[c]!.fill(0);
      for (let i = 0; i < payoffs.length; i++) {
        const rise = payoffs[i]! * (after[i]! - before[i]!);
        if (rise !== 0) addConvolution(costs, this.prefix[i]!, this.suffix[i + 1]!, rise, most);
      }
    }
  }

  /** rows[i]: law of the count among names before i (or from i on), for counts below `most`. */
  private countLaws(rows: readonly Float64Array[], probabilities: Float64Array, fromEnd: boolean): void {
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
}

/** Probabilities too small for any figure: products of them would be subnormal numbers, which processors are slow at. */
const UNNOTICED = 1e-40;

function noticed(probabilities: Float64Array, into: Float64Array): Float64Array {
  for (let i = 0; i < into.length; i++) into[i] = probabilities[i]! < UNNOTICED ? 0 : probabilities[i]!;
  return into;
}

/** sum[n] += scale Σ_k one[k] other[n − k], n below `most`. */
export function addConvolution(
  sum: Float64Array,
  one: Float64Array,
  other: Float64Array,
  scale: number,
  most: number,
): void {
  for (let n = 0; n < most; n++) {
    let both = 0;
    for (let k = 0; k <= n; k++) both += one[k]! * other[n - k]!;
    sum[n]! += scale * both;
  }
}
