import { recursionBackend } from "./backend";
import type { RecursionBackend } from "./instructions";
import { FREE_MEMORY, NORMAL_TABLE } from "./normalTable";

/** Factor values worked out in one call. */
export const PANEL_POINTS = 16;
const LANES = 4;

/** Names on a grid and in a one-factor model, as flat arrays. */
export interface RecursionNames {
  /** Whole steps of each name's first landing point. */
  readonly steps: Int32Array;
  /** Three landing weights a name, at steps, steps + 1, steps + 2. */
  readonly weights: Float64Array;
  /** Amount of each name in steps, not whole in general. */
  readonly sizes: Float64Array;
  /** c_i/√(1 − a_i²) and a_i/√(1 − a_i²): p_i(m) = Φ(scaled − slope · m). */
  readonly scaled: Float64Array;
  readonly slopes: Float64Array;
}

/** How far the law goes and where it is taken apart. */
export interface RecursionShape {
  /** Highest step kept; mass above goes into the overflow. */
  readonly top: number;
  /** First steps of the segments whose mass is wanted value by value, ascending, the first one 0. */
  readonly breaks: Int32Array;
  /** Weighted mass below this is dropped at both ends of a law. */
  readonly negligible: number;
}

/** The weighted conditional laws of sixteen factor values, summed and value by value. */
export interface PanelLaw {
  /** Sum over the values of weight · mass at the steps low, low + 1, … */
  readonly low: number;
  readonly masses: Float64Array;
  /** Value by value, above the top: weight · mass and weight · Σ step · mass. */
  readonly overflow: Float64Array;
  readonly overflowMoments: Float64Array;
  /** The same at [segment][16]. */
  readonly segmentMasses: Float64Array;
  readonly segmentMoments: Float64Array;
}

/** Mean, variance and size of the slope (over the factor) of the conditional sum, in steps. */
export interface ConditionalMoments {
  readonly mean: number;
  readonly variance: number;
  readonly slope: number;
}

/** Which load the memory of each backend holds. */
const loads = new WeakMap<RecursionBackend, number>();

/**
 * The conditional law of a sum of independent defaults on a grid, built by adding names one at a time (Andersen, Sidenius &
 * Basu 2003), at sixteen factor values a call. The names stay in the backend's memory until the next load, so that only the
 * load made last may be used. A start mass of each value's quadrature weight makes what is dropped small in the answer.
 */
export class Recursion {
  private readonly count: number;
  private readonly load: number;
  private readonly reals: Float64Array;
  private readonly wholes: Int32Array;
  private readonly at: ReturnType<typeof layout>;

  constructor(
    names: RecursionNames,
    private readonly shape: RecursionShape,
    private readonly backend: RecursionBackend = recursionBackend(),
  ) {
    this.count = names.steps.length;
    const { top, breaks } = shape;
    const longest = names.steps.reduce((most, steps) => Math.max(most, steps), 0);
    this.at = layout(this.count, top, Math.min(longest, top + 1), breaks.length);
    this.load = (loads.get(backend) ?? 0) + 1;
    loads.set(backend, this.load);
    backend.reserve(this.at.end);
    this.reals = new Float64Array(backend.memory());
    this.wholes = new Int32Array(backend.memory());
    this.reals.fill(0, this.at.law >> 3, this.at.end >> 3);
    for (let i = 0; i < this.count; i++)
      this.wholes[(this.at.steps >> 2) + i] = Math.min(names.steps[i]!, top + 1);
    this.wholes.set(breaks, this.at.breaks >> 2);
    this.reals.set(names.weights, this.at.weights >> 3);
    this.reals.set(names.sizes, this.at.sizes >> 3);
    this.reals.set(names.scaled, this.at.scaled >> 3);
    this.reals.set(names.slopes, this.at.slopes >> 3);
  }

  /** The laws at sixteen factor values, each starting from its weight. */
  panel(factors: Float64Array, weights: Float64Array): PanelLaw {
    this.assertLoaded();
    const { at, backend, count, reals, shape, wholes } = this;
    const segments = shape.breaks.length;
    const stride = 8 * PANEL_POINTS;
    const overflow = new Float64Array(PANEL_POINTS);
    const overflowMoments = new Float64Array(PANEL_POINTS);
    let lowest = shape.top + 1;
    let highest = -1;
    reals.set(factors, at.factors >> 3);
    for (let block = 0; block < PANEL_POINTS; block += LANES) {
      reals.set(weights.subarray(block, block + LANES), at.rows >> 3);
      backend.conditional(
        count,
        at.scaled,
        at.slopes,
        at.factors + 8 * block,
        NORMAL_TABLE,
        at.probabilities,
      );
      backend.addNames(
        count,
        shape.top,
        shape.negligible,
        at.rows,
        at.steps,
        at.weights,
        at.sizes,
        at.probabilities,
        at.overflow,
        at.bounds,
      );
      const low = wholes[at.bounds >> 2]!;
      const high = wholes[(at.bounds >> 2) + 1]!;
      backend.collect(
        at.rows,
        low,
        high,
        at.law,
        segments,
        at.breaks,
        at.masses + 8 * block,
        at.moments + 8 * block,
        stride,
      );
      const spilled = at.overflow >> 3;
      overflow.set(reals.subarray(spilled, spilled + LANES), block);
      overflowMoments.set(reals.subarray(spilled + LANES, spilled + 2 * LANES), block);
      lowest = Math.min(lowest, low);
      highest = Math.max(highest, high);
    }
    const law = at.law >> 3;
    const masses = reals.slice(law + lowest, law + highest + 1);
    reals.fill(0, law + lowest, law + highest + 1);
    return {
      low: lowest,
      masses,
      overflow,
      overflowMoments,
      segmentMasses: reals.slice(at.masses >> 3, (at.masses >> 3) + segments * PANEL_POINTS),
      segmentMoments: reals.slice(at.moments >> 3, (at.moments >> 3) + segments * PANEL_POINTS),
    };
  }

  /** What the conditional sum looks like at two factor values, without its law. */
  momentsAt(one: number, other: number): readonly [ConditionalMoments, ConditionalMoments] {
    this.assertLoaded();
    const { at, backend, reals } = this;
    reals[at.factors >> 3] = one;
    reals[(at.factors >> 3) + 1] = other;
    backend.moments(this.count, at.scaled, at.slopes, at.sizes, at.factors, NORMAL_TABLE, at.overflow);
    const read = (lane: number) => ({
      mean: reals[(at.overflow >> 3) + lane]!,
      variance: reals[(at.overflow >> 3) + 2 + lane]!,
      slope: reals[(at.overflow >> 3) + 4 + lane]!,
    });
    return [read(0), read(1)];
  }

  /** First four cumulants of the conditional sum of sizes at two factor values, without its law: [one, other] for each. */
  cumulantsAt(one: number, other: number): Float64Array {
    this.assertLoaded();
    const { at, backend, reals } = this;
    reals[at.factors >> 3] = one;
    reals[(at.factors >> 3) + 1] = other;
    backend.cumulants(this.count, at.scaled, at.slopes, at.sizes, at.factors, NORMAL_TABLE, at.overflow);
    return reals.slice(at.overflow >> 3, (at.overflow >> 3) + 8);
  }

  private assertLoaded(): void {
    if (loads.get(this.backend) !== this.load)
      throw new Error("These names have left the kernel: another recursion was loaded after them.");
  }
}

/** Byte offsets of one load. Rows stand last, with room below for the longest step and the unrolled loops. */
function layout(count: number, top: number, longest: number, segments: number) {
  let next = FREE_MEMORY;
  const take = (bytes: number) => {
    const start = next;
    next = (next + bytes + 63) & ~63;
    return start;
  };
  const at = {
    steps: take(4 * count),
    weights: take(24 * count),
    sizes: take(8 * count),
    scaled: take(8 * count),
    slopes: take(8 * count),
    probabilities: take(8 * LANES * count),
    factors: take(8 * PANEL_POINTS),
    overflow: take(64),
    bounds: take(8),
    breaks: take(4 * segments),
    masses: take(8 * PANEL_POINTS * segments),
    moments: take(8 * PANEL_POINTS * segments),
    law: take(8 * (top + 1)),
  };
  const rows = take(8 * LANES * (longest + top + 12)) + 8 * LANES * (longest + 8);
  return { ...at, rows, end: next };
}
