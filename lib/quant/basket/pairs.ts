import { bivariateNormalCdf } from "../maths/bivariateNormal";

/** Joint default probability by a date of two names with default thresholds c and an asset correlation. */
export function jointDefault(one: number, other: number, assetCorrelation: number): number {
  return bivariateNormalCdf(one, other, assetCorrelation);
}

/**
 * Default (event) correlation (P₁₂ − p₁p₂)/√(p₁(1−p₁)p₂(1−p₂)); null where a name's default is certain or impossible.
 * It is not the asset correlation.
 */
export function eventCorrelation(joint: number, one: number, other: number): number | null {
  const variance = one * (1 - one) * other * (1 - other);
  return variance > 0 ? (joint - one * other) / Math.sqrt(variance) : null;
}
