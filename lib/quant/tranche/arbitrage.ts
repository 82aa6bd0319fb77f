import { chebyshevPoints, chebyshevValue } from "../maths/chebyshev";
import type { PoolLaws } from "../portfolio/distribution";

/** A strike interval on which a base curve allows arbitrage at maturity, and the largest violation of slope in it. */
export interface ArbitrageMark {
  readonly from: number;
  readonly to: number;
  /** E[min(L, K)] falls; rises faster than K; is not concave. */
  readonly kind: "decreasing" | "slope" | "convex";
  readonly size: number;
}

const FINEST_STEP = 0.001;
const IGNORED = 1e-6;
const POINTS = 33;

/**
 * Strikes at which E[min(L, K)] at ρ(K) fails to rise, to be concave, or to have a slope in [0, 1]; at maturity, on a
 * grid whose step is the larger of 0.1 % and the pool's own unit.
 */
export function arbitrageMarks(laws: PoolLaws, rhoAt: (strike: number) => number): ArbitrageMark[] {
  const step = Math.max(FINEST_STEP, laws.unit ?? 0);
  const strikes = Array.from({ length: Math.floor(1 / step + 1e-9) + 1 }, (_, i) => Math.min(1, i * step));
  const values = expectedMinima(laws, strikes, strikes.map(rhoAt));
  const slopes = strikes.slice(1).map((strike, i) => (values[i + 1]! - values[i]!) / (strike - strikes[i]!));
  const marks: ArbitrageMark[] = [];
  for (const [i, slope] of slopes.entries()) {
    const from = strikes[i]!;
    const to = strikes[i + 1]!;
    if (slope < -IGNORED) append(marks, { from, to, kind: "decreasing", size: -slope });
    if (slope > 1 + IGNORED) append(marks, { from, to, kind: "slope", size: slope - 1 });
    const rise = i > 0 ? slope - slopes[i - 1]! : 0;
    if (rise > IGNORED) append(marks, { from: strikes[i - 1]!, to, kind: "convex", size: rise });
  }
  return marks.sort((one, other) => one.from - other.from);
}

/** Adds a mark, or widens the last one of its kind when they touch. */
function append(marks: ArbitrageMark[], mark: ArbitrageMark): void {
  const index = marks.findLastIndex((other) => other.kind === mark.kind);
  const last = marks[index];
  if (last && mark.from <= last.to + 1e-12) {
    marks[index] = { ...last, to: mark.to, size: Math.max(last.size, mark.size) };
  } else marks.push(mark);
}

/** E[min(L, K)] at each strike's own correlation, from whole laws at Chebyshev points of √ρ's range. */
function expectedMinima(laws: PoolLaws, strikes: readonly number[], rhos: readonly number[]): number[] {
  const { portfolio } = laws;
  const last = portfolio.times.length - 1;
  const live = (strike: number) => Math.max(0, strike - portfolio.realisedLoss);
  const lawAt = (rho: number) => {
    const law = laws.forOneDependence().whole("loss", last, { kind: "flat", rho });
    return strikes.map((strike) => law.between(0, live(strike)));
  };
  const roots = rhos.map((rho) => Math.sqrt(rho));
  const low = Math.min(...roots);
  const high = Math.max(...roots);
  const certain = strikes.map((strike) => Math.min(strike, portfolio.realisedLoss));
  if (high - low < 1e-12) return lawAt(rhos[0]!).map((value, i) => certain[i]! + value);
  const points = chebyshevPoints(POINTS, low, high);
  const samples = points.map((root) => lawAt(Math.min(1, root * root)));
  return strikes.map(
    (_, i) =>
      certain[i]! +
      chebyshevValue(
        points,
        samples.map((sample) => sample[i]!),
        roots[i]!,
      ),
  );
}
