import type { ConditionalMoments, Recursion, RecursionNames } from "../kernel/recursion";
import { exp } from "../maths/elementary";
import { normalCdf, normalDensity } from "../maths/normal";
import { gaussLegendre } from "../maths/quadrature";

/** The factor interval on which a conditional law is not settled, and what the mass below it is. */
export interface UnsettledInterval {
  readonly low: number;
  readonly high: number;
}

/** Below this factor value nothing is left of a tail of 1e-15 that its first six digits show. */
export const LOWEST_UNSETTLED = -9.5;
const LOWEST = LOWEST_UNSETTLED;
const STEP = 0.25;
const RULE = gaussLegendre(16);
/** Share of the mean that may be left out above the interval. */
const NO_MORE_LOSS = 1e-14;

/** How much may be wrong about the mass taken as settled: in all, and as a share of it. */
export interface SettledStandard {
  readonly absolute: number;
  readonly relative: number;
}

/**
 * Where the answer still depends on the factor. Below `low` the sum exceeds the top for certain (Bernstein's inequality),
 * above `high` what is left of the mean is negligible. `isMonotone` says that no loading is negative: otherwise
 * nothing settles.
 */
export function unsettledInterval(
  recursion: Recursion,
  top: number,
  largest: number,
  isMonotone: boolean,
  standard: SettledStandard,
): UnsettledInterval {
  if (!isMonotone) return { low: LOWEST, high: -LOWEST };
  let low = LOWEST;
  const isSettled = (moments: ConditionalMoments, m: number) => {
    const wrong = belowBound(moments, top, largest);
    return wrong <= standard.relative && normalCdf(m) * wrong <= standard.absolute;
  };
  for (let m = LOWEST; m < -LOWEST; m += 2 * STEP) {
    const [one, other] = recursion.momentsAt(m, m + STEP);
    if (!isSettled(one, m)) break;
    low = m;
    if (!isSettled(other, m + STEP)) break;
    low = m + STEP;
  }
  let high = -LOWEST;
  let total = 0;
  for (let m = low; m < -LOWEST; m += 2 * STEP) {
    const [one, other] = recursion.momentsAt(m, m + STEP);
    total = Math.max(total, one.mean * (normalCdf(-m) - normalCdf(-m - STEP)));
    high = m + STEP;
    if (other.mean * normalCdf(-m - STEP) < NO_MORE_LOSS * total) break;
    high = m + 2 * STEP;
  }
  return { low, high };
}

/** Σ step · mass of what lies at factor values below `low`, where the law itself is not laid out: ∫ φ(m) E[X | m] dm. */
export function momentBelow(recursion: Recursion, { slopes }: RecursionNames, low: number): number {
  const steepest = slopes.reduce((most, slope) => Math.max(most, Math.abs(slope)), 0.5);
  const panels = Math.ceil((low - LOWEST) / Math.min(2, 4 / steepest));
  const half = (0.5 * (low - LOWEST)) / panels;
  let sum = 0;
  for (let panel = 0; panel < panels; panel++) {
    const centre = LOWEST + (2 * panel + 1) * half;
    for (let k = 0; k < RULE.nodes.length; k += 2) {
      const one = centre + half * RULE.nodes[k]!;
      const other = centre + half * RULE.nodes[k + 1]!;
      const [at, next] = recursion.momentsAt(one, other);
      sum += half * RULE.weights[k]! * normalDensity(one) * at.mean;
      sum += half * RULE.weights[k + 1]! * normalDensity(other) * next.mean;
    }
  }
  return sum;
}

/** P(X ≤ top) ≤ exp(−x²/(2(σ² + b x/3))) with x = mean − top > 0. */
function belowBound({ mean, variance }: ConditionalMoments, top: number, largest: number): number {
  const distance = mean - top;
  return distance <= 0 ? 1 : exp((-0.5 * distance * distance) / (variance + (largest * distance) / 3));
}
