import { angleOfCorrelation, chebyshevPoints, correlationOfAngle } from "../maths/chebyshev";
import type { Dependence, PoolLaws } from "../portfolio/distribution";
import { FEWEST_FOR_MOMENTS } from "../portfolio/factorDistribution";

/**
 * E[min(X, K)] of the live names' loss, ready to be read at any strike and correlation: at whole steps of the law's own grid, at
 * every date, at Chebyshev points in arcsin √ρ. Plain data, so that it can be handed from a worker to a page.
 */
export interface LossCache {
  /** Strikes 0, step, 2 step … : between them E[min(X, K)] is linear, for the law has no atoms there. */
  readonly step: number;
  readonly strikes: number;
  /** u with ρ = sin²(πu/2); one point where the dependence cannot be moved. */
  readonly points: readonly number[];
  /** [strike][date 1..M][point]. */
  readonly minima: Float64Array;
  /** P(X > k step) at the last date, the rise of E[min] over the step above: [strike][point]. */
  readonly tails: Float64Array;
  /** Largest sum, and the mean at every date 0..M: all that is left to say from the largest sum on. */
  readonly largest: number;
  readonly means: Float64Array;
}

/** Highest correlation held, sin²(0.4π): above it expected losses turn too sharply for these points. */
const HIGHEST_ANGLE = 0.8;
const POINTS = 22;
/** Entries that a page can hold without noticing (64 MB). */
const MOST_ENTRIES = 8_000_000;

/** What is fixed about the dependence, or null where any flat correlation may be asked for. */
type Fixed = Exclude<Dependence, { kind: "flat" }> | null;

/**
 * Works a cache out for strikes of the live sum up to `highest`; null for laws without a grid (the large pool, sets of defaults,
 * pools taken by their cumulants) and for grids too fine to keep.
 */
export function lossCache(laws: PoolLaws, fixed: Fixed, highest: number): LossCache | null {
  const { expectedLoss, live, realisedLoss, times } = laws.portfolio;
  const step = laws.unit;
  if (step === null || live.length === 0) return null;
  if (!laws.isExact && live.length >= FEWEST_FOR_MOMENTS) return null;
  const largest = live.reduce((sum, name) => sum + name.loss, 0);
  const strikes = Math.floor(Math.min(highest, largest) / step + 1e-9) + 1;
  const points = fixed ? [0] : chebyshevPoints(POINTS, 0, HIGHEST_ANGLE);
  const dates = times.length - 1;
  if (strikes < 2 || strikes * points.length * dates > MOST_ENTRIES) return null;
  const lattice = Array.from({ length: strikes + 1 }, (_, k) => k * step);
  const minima = new Float64Array(dates * strikes * points.length);
  const tails = new Float64Array(strikes * points.length);
  for (const [p, u] of points.entries()) {
    const dependence = fixed ?? ({ kind: "flat", rho: correlationOfAngle(u) } as const);
    let values: Float64Array = new Float64Array(0);
    for (let j = 1; j <= dates; j++) {
      values = laws.expectedMinimaOnce(j, dependence, lattice);
      for (let k = 0; k < strikes; k++) minima[(k * dates + j - 1) * points.length + p] = values[k]!;
    }
    if (!laws.isExact) values = laws.expectedMinimaOnce(dates, dependence, lattice, false);
    for (let k = 0; k < strikes; k++) tails[k * points.length + p] = (values[k + 1]! - values[k]!) / step;
  }
  const means = expectedLoss.map((mean) => mean - realisedLoss);
  return { step, strikes, points, minima, tails, largest, means };
}

/** A strike within this of an atom is at the atom. */
const SAME = 1e-11;

/** Where a cache is read over correlation: the weight of each of its points, summing to one. */
export type ReadingWeights = Float64Array;

/** Weights for a correlation (barycentric formula, Berrut & Trefethen 2004); null beyond what is held. */
export function weightsAt({ points }: LossCache, rho: number): ReadingWeights | null {
  const weights = new Float64Array(points.length);
  const u = points.length === 1 ? 0 : angleOfCorrelation(rho);
  const last = points.length - 1;
  if (u > points[last]!) return null;
  const exact = points.indexOf(u);
  if (exact >= 0) {
    weights[exact] = 1;
    return weights;
  }
  let sum = 0;
  for (let p = 0; p <= last; p++) {
    const weight = ((p % 2 === 0 ? 1 : -1) * (p === 0 || p === last ? 0.5 : 1)) / (u - points[p]!);
    weights[p] = weight;
    sum += weight;
  }
  for (let p = 0; p <= last; p++) weights[p]! /= sum;
  return weights;
}

/** E[min(X, K)] at dates 0..M into `out`; false where the strike lies beyond what is held. */
export function readMinima(
  { largest, means, minima, points, step, strikes }: LossCache,
  weights: ReadingWeights,
  strike: number,
  out: Float64Array,
): boolean {
  out[0] = 0;
  if (strike <= 0) out.fill(0);
  else if (strike >= largest - SAME) out.set(means);
  else {
    const position = strike / step;
    const k = Math.min(Math.floor(position), strikes - 2);
    const share = position - k;
    if (share > 1 + 1e-9) return false;
    const count = points.length;
    const row = (out.length - 1) * count;
    for (let j = 1; j < out.length; j++) {
      const from = k * row + (j - 1) * count;
      let here = 0;
      let next = 0;
      for (let p = 0; p < count; p++) {
        here += weights[p]! * minima[from + p]!;
        next += weights[p]! * minima[from + row + p]!;
      }
      out[j] = here + share * (next - here);
    }
  }
  return true;
}

/** P(X > K) at the last date, or with `orAt` P(X ≥ K); null beyond what is held. */
export function readTail(cache: LossCache, weights: ReadingWeights, strike: number, orAt: boolean) {
  const { largest, points, step, strikes, tails } = cache;
  if (!orAt && strike >= largest - SAME) return 0;
  const k = Math.floor((strike + (orAt ? -SAME : SAME)) / step);
  if (k < 0) return 1;
  if (k >= strikes) return strike > largest + SAME ? 0 : null;
  let sum = 0;
  for (let p = 0; p < points.length; p++) sum += weights[p]! * tails[k * points.length + p]!;
  return Math.min(1, Math.max(0, sum));
}
