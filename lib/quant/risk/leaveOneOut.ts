import type { AmountGrid } from "../portfolio/amountGrid";

/** Mass below this is trimmed at both ends of a law. */
const NEGLIGIBLE = 1e-18;

/**
 * For independent names on a grid: E[min(X, K)] at strikes in steps, and what each name's default adds to it, all else as it is.
 * The laws of the first names are stored going forward; going backward, the expectation over the names still to come is
 * carried at every partial sum (stored-state adjoint). Nothing is divided, so that no probability is too near one.
 */
export class LeaveOneOut {
  readonly minima: Float64Array;
  /** [strike][name], in steps. */
  readonly slopes: Float64Array;
  private readonly count: number;
  private readonly row: number;
  /** Laws of the first i names, cut at the top; row `count` is the whole law. */
  private readonly laws: Float64Array;
  private readonly low: Int32Array;
  private readonly high: Int32Array;
  /** min(u, K) averaged over the names still to come, less K: zero from K on. */
  private readonly ahead: Float64Array;

  constructor(
    private readonly grid: AmountGrid,
    private readonly top: number,
    private readonly strikes: readonly number[],
  ) {
    this.count = grid.steps.length;
    this.row = top + 1;
    this.laws = new Float64Array(this.row * (this.count + 1));
    this.low = new Int32Array(this.count + 1);
    this.high = new Int32Array(this.count + 1);
    const longest = grid.steps.reduce((most, steps) => Math.max(most, steps), 0);
    this.ahead = new Float64Array(top + Math.min(longest, top + 1) + 8);
    this.minima = new Float64Array(strikes.length);
    this.slopes = new Float64Array(strikes.length * this.count);
  }

  /** Works the figures out for these default probabilities. */
  workOut(probabilities: Float64Array): void {
    this.forward(probabilities);
    for (let s = 0; s < this.strikes.length; s++) this.backward(probabilities, s);
  }

  private forward(probabilities: Float64Array): void {
    const { count, grid, high, laws, low, row, top } = this;
    laws[0] = 1;
    low[0] = 0;
    high[0] = 0;
    for (let i = 0; i < count; i++) {
      const from = i * row;
      const to = from + row;
      const p = probabilities[i]!;
      const shift = grid.steps[i]!;
      const keep = 1 - p;
      const one = p * grid.weights[3 * i]!;
      const two = p * grid.weights[3 * i + 1]!;
      const three = p * grid.weights[3 * i + 2]!;
      const first = low[i]!;
      const last = high[i]!;
      const end = Math.min(top, last + shift + (three !== 0 ? 2 : two !== 0 ? 1 : 0));
      for (let u = first; u <= end; u++) laws[to + u] = u <= last ? keep * laws[from + u]! : 0;
      for (let u = first, v = to + first + shift; u <= last; u++, v++) {
        const mass = laws[from + u]!;
        const at = u + shift;
        if (at > top) break;
        laws[v]! += one * mass;
        if (at < top && two !== 0) laws[v + 1]! += two * mass;
        if (at + 1 < top && three !== 0) laws[v + 2]! += three * mass;
      }
      let begin = first;
      let stop = end;
      while (begin < stop && Math.abs(laws[to + begin]!) < NEGLIGIBLE) begin++;
      while (stop > begin && Math.abs(laws[to + stop]!) < NEGLIGIBLE) stop--;
      low[i + 1] = begin;
      high[i + 1] = stop;
    }
  }

  private backward(probabilities: Float64Array, s: number): void {
    const { ahead, count, grid, high, laws, low, row, slopes } = this;
    const strike = this.strikes[s]!;
    const kept = Math.min(this.top, Math.ceil(strike) - 1);
    for (let u = 0; u < ahead.length; u++) ahead[u] = Math.min(u, strike) - strike;
    let below = 0;
    for (let u = low[count]!, end = Math.min(high[count]!, kept); u <= end; u++)
      below += laws[count * row + u]! * ahead[u]!;
    this.minima[s] = strike + below;
    for (let i = count - 1; i >= 0; i--) {
      const from = i * row;
      const p = probabilities[i]!;
      const shift = Math.min(grid.steps[i]!, this.top + 1);
      const one = grid.weights[3 * i]!;
      const two = grid.weights[3 * i + 1]!;
      const three = grid.weights[3 * i + 2]!;
      const end = Math.min(high[i]!, kept);
      let slope = 0;
      for (let u = low[i]!, v = low[i]! + shift; u <= end; u++, v++) {
        const here = ahead[u]!;
        const rise = one * ahead[v]! + two * ahead[v + 1]! + three * ahead[v + 2]! - here;
        slope += laws[from + u]! * rise;
        ahead[u] = here + p * rise;
      }
      slopes[s * count + i] = slope;
    }
  }
}
