import type { Distribution } from "../portfolio/distribution";

/** Tranche loss at a confidence level, fractions of the tranche's notional. */
export interface QuantileMeasure {
  readonly level: number;
  /** Smallest loss x with P(loss ≤ x) ≥ level. */
  readonly loss: number;
  /** Mean loss in the worst 1 − level of cases (expected shortfall). */
  readonly shortfall: number;
}

export const QUANTILE_LEVELS = [0.95, 0.99, 0.999] as const;

/** Standard deviation of the tranche loss, fraction of its notional. */
export function standardDeviation(
  distribution: Distribution,
  low: number,
  high: number,
  shift: number,
  width: number,
): number {
  const mean = (shift + distribution.between(low, high)) / width;
  const square =
    (shift * shift + 2 * shift * distribution.between(low, high) + distribution.squareBetween(low, high)) /
    (width * width);
  return Math.sqrt(Math.max(0, square - mean * mean));
}

/**
 * Quantile and expected shortfall of the tranche loss. `low` and `high` are the strikes left for the live names,
 * `shift` is the loss already realised in the tranche (fractions of the pool), `width` the tranche's own.
 */
export function trancheQuantile(
  distribution: Distribution,
  level: number,
  low: number,
  high: number,
  shift: number,
  width: number,
): QuantileMeasure {
  const clamp = (amount: number) => shift + Math.min(Math.max(amount - low, 0), high - low);
  const quantile = distribution.quantile(level);
  const loss = clamp(quantile);
  const cut = Math.min(Math.max(quantile, low), high);
  const beyond = cut < high ? distribution.between(cut, high) : 0;
  return { level, loss: loss / width, shortfall: Math.min(1, (loss + beyond / (1 - level)) / width) };
}
