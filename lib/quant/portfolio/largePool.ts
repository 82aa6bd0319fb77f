import { bivariateNormalCdf } from "../maths/bivariateNormal";
import { normalCdf, normalDensity, normalQuantile } from "../maths/normal";
import { gaussLegendre } from "../maths/quadrature";
import type { Distribution } from "./distributionQuestions";

/** A pool of infinitely many alike names: default threshold c, recovery R, flat correlation ρ (Vasicek 1987/2002). */
export interface LargePool {
  readonly threshold: number;
  readonly lossGivenDefault: number;
  readonly correlation: number;
}

/** m* = (c − √(1−ρ) Φ⁻¹(k))/√ρ, or null where it has no value (ρ = 0, k ≤ 0, k ≥ 1). */
function criticalFactor(
  { threshold, lossGivenDefault, correlation }: LargePool,
  strike: number,
): number | null {
  const k = strike / lossGivenDefault;
  if (correlation === 0 || k <= 0 || k >= 1) return null;
  return (threshold - Math.sqrt(1 - correlation) * normalQuantile(k)) / Math.sqrt(correlation);
}

/** P(L > K). */
export function largePoolAbove(pool: LargePool, strike: number): number {
  const critical = criticalFactor(pool, strike);
  if (critical !== null) return normalCdf(critical);
  if (strike >= pool.lossGivenDefault) return 0;
  const probability = normalCdf(pool.threshold);
  if (strike > 0 || pool.correlation === 0) return probability * pool.lossGivenDefault > strike ? 1 : 0;
  return probability > 0 || strike < 0 ? 1 : 0;
}

/** P(L ≥ K); differs from P(L > K) only where the law has an atom. */
export function largePoolFrom(pool: LargePool, strike: number): number {
  if (strike <= 0) return 1;
  const certain = normalCdf(pool.threshold) * pool.lossGivenDefault;
  if (pool.correlation === 0) return certain >= strike * (1 - 1e-15) ? 1 : 0;
  if (pool.correlation === 1) return strike <= pool.lossGivenDefault ? normalCdf(pool.threshold) : 0;
  return largePoolAbove(pool, strike);
}

/** E[(L − K)⁺] = (1−R) Φ₂(c, m*; √ρ) − K Φ(m*), with its limits. */
export function largePoolExcess(pool: LargePool, strike: number): number {
  const { threshold, lossGivenDefault, correlation } = pool;
  const expected = lossGivenDefault * normalCdf(threshold);
  if (strike <= 0) return expected - strike;
  if (strike >= lossGivenDefault) return 0;
  const critical = criticalFactor(pool, strike);
  if (critical === null) return Math.max(0, expected - strike);
  const joint = bivariateNormalCdf(threshold, critical, Math.sqrt(correlation));
  return Math.max(0, lossGivenDefault * joint - strike * normalCdf(critical));
}

/** E[min((L − A)⁺, D − A)²] = 2 ∫ (x − A) P(L > x) dx over the tranche, in the factor's variable where it is smooth. */
export function largePoolSquare(pool: LargePool, attachment: number, detachment: number): number {
  const { threshold, lossGivenDefault, correlation } = pool;
  const width = (loss: number) => Math.min(Math.max(loss - attachment, 0), detachment - attachment);
  if (correlation === 0) return width(lossGivenDefault * normalCdf(threshold)) ** 2;
  if (correlation === 1) return normalCdf(threshold) * width(lossGivenDefault) ** 2;
  const root = Math.sqrt(correlation);
  const scale = Math.sqrt(1 - correlation);
  const low = criticalFactor(pool, detachment) ?? -38;
  const high = criticalFactor(pool, attachment) ?? 38;
  let sum = (detachment - attachment) ** 2 * normalCdf(detachment >= lossGivenDefault ? -38 : low);
  const { nodes, weights } = gaussLegendre(24);
  const from = Math.max(detachment >= lossGivenDefault ? -38 : low, -38);
  const to = Math.min(high, 38);
  const step = Math.min(1, scale / root);
  const centre = threshold / root;
  for (let start = from; start < to; ) {
    const near = Math.max(step, Math.abs(start - centre) / 4);
    const end = Math.min(to, start + Math.min(near, 1));
    const half = 0.5 * (end - start);
    for (let i = 0; i < nodes.length; i++) {
      const m = start + half * (1 + nodes[i]!);
      const loss = lossGivenDefault * normalCdf((threshold - root * m) / scale);
      sum += half * weights[i]! * normalDensity(m) * width(loss) ** 2;
    }
    start = end;
  }
  return sum;
}

/** Loss that is not exceeded with the given probability. */
export function largePoolQuantile(pool: LargePool, level: number): number {
  const { threshold, lossGivenDefault, correlation } = pool;
  if (correlation === 1) return level > 1 - normalCdf(threshold) ? lossGivenDefault : 0;
  const scale = Math.sqrt(1 - correlation);
  return lossGivenDefault * normalCdf((threshold + Math.sqrt(correlation) * normalQuantile(level)) / scale);
}

/** The questions answered in closed form. */
export function largePoolDistribution(pool: LargePool): Distribution {
  return {
    between: (attachment, detachment) =>
      largePoolExcess(pool, attachment) - largePoolExcess(pool, detachment),
    minima: (strikes) =>
      Float64Array.from(strikes, (strike) => largePoolExcess(pool, 0) - largePoolExcess(pool, strike)),
    squareBetween: (attachment, detachment) => largePoolSquare(pool, attachment, detachment),
    above: (strike) => largePoolAbove(pool, strike),
    from: (strike) => largePoolFrom(pool, strike),
    isAtom: () => false,
    atoms: null,
    isContinuous: true,
    quantile: (level) => largePoolQuantile(pool, level),
    error: 1e-15,
  };
}
