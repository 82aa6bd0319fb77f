import { normalCdf } from "../maths/normal";

/** Names of a one-factor model at one date. */
export interface FactorNames {
  /** c_i: default thresholds, ±∞ allowed. */
  readonly thresholds: Float64Array;
  /** a_i in (−1, 1). */
  readonly loadings: Float64Array;
}

/** c_i/√(1 − a_i²) and a_i/√(1 − a_i²): p_i(m) = Φ(scaled − slope · m). */
export function conditionalSlopes({ thresholds, loadings }: FactorNames) {
  const scales = loadings.map((loading) => Math.sqrt((1 - loading) * (1 + loading)));
  return {
    scaled: thresholds.map((threshold, i) => threshold / scales[i]!),
    slopes: loadings.map((loading, i) => loading / scales[i]!),
  };
}

/** Conditional default probability of each name, computed once for names that share threshold and loading. */
export class ConditionalProbabilities {
  readonly values: Float64Array;
  private readonly scaledThreshold: Float64Array;
  private readonly slope: Float64Array;
  /** Index of an earlier name with the same threshold and loading, or the name's own. */
  private readonly twin: Int32Array;

  constructor({ thresholds, loadings }: FactorNames) {
    const count = thresholds.length;
    this.values = new Float64Array(count);
    this.scaledThreshold = new Float64Array(count);
    this.slope = new Float64Array(count);
    this.twin = new Int32Array(count);
    const seen = new Map<string, number>();
    for (let i = 0; i < count; i++) {
      const loading = loadings[i]!;
      const scale = Math.sqrt((1 - loading) * (1 + loading));
      this.scaledThreshold[i] = thresholds[i]! / scale;
      this.slope[i] = loading / scale;
      const key = `${thresholds[i]} ${loading}`;
      this.twin[i] = seen.get(key) ?? i;
      if (this.twin[i] === i) seen.set(key, i);
    }
  }

  /** p_i(m) = Φ((c_i − a_i m)/√(1 − a_i²)). */
  at(factor: number): Float64Array {
    const { values, twin } = this;
    for (let i = 0; i < values.length; i++) {
      values[i] =
        twin[i] === i ? normalCdf(this.scaledThreshold[i]! - this.slope[i]! * factor) : values[twin[i]!]!;
    }
    return values;
  }
}
