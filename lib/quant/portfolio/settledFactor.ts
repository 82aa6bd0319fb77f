import type { ConditionalMoments, Recursion } from "../kernel/recursion";
import { exp } from "../maths/elementary";
import { normalCdf } from "../maths/normal";

/** The factor interval on which a conditional law is not settled, and what the mass below it is. */
export interface UnsettledInterval {
  readonly low: number;
  readonly high: number;
}

/** Below this factor value nothing is left of a tail of 1e-15 that its first six digits show. */
export const LOWEST_UNSETTLED = -9.5;
const LOWEST = LOWEST_UNSETTLED;
const STEP = 0.25;
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

/** P(X ≤ top) ≤ exp(−x²/(2(σ² + b x/3))) with x = mean − top > 0. */
function belowBound({ mean, variance }: ConditionalMoments, top: number, largest: number): number {
  const distance = mean - top;
  return distance <= 0 ? 1 : exp((-0.5 * distance * distance) / (variance + (largest * distance) / 3));
}
