import { angleOfCorrelation, chebyshevPoints, chebyshevValue, correlationOfAngle } from "../maths/chebyshev";
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
const FEWEST_POINTS = 5;
const MOST_POINTS = 65;
const SETTLED = 1e-8;

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

/** E[min(L, K)] at each strike's own correlation; beyond the last strike where it changes, from one law. */
function expectedMinima(laws: PoolLaws, strikes: readonly number[], rhos: readonly number[]): number[] {
  const { portfolio } = laws;
  const last = portfolio.times.length - 1;
  const minimaAt = (rho: number, at: readonly number[]) => {
    const live = at.map((strike) => Math.max(0, strike - portfolio.realisedLoss));
    return laws.expectedMinimaOnce(last, { kind: "flat", rho }, live);
  };
  const highest = rhos[rhos.length - 1]!;
  const steady = rhos.findLastIndex((rho) => rho !== highest) + 1;
  const values = [
    ...varyingMinima(minimaAt, strikes.slice(0, steady), rhos.slice(0, steady)),
    ...minimaAt(highest, strikes.slice(steady)),
  ];
  return strikes.map((strike, i) => Math.min(strike, portfolio.realisedLoss) + values[i]!);
}

type MinimaAt = (rho: number, strikes: readonly number[]) => Float64Array;

/**
 * From laws at Chebyshev points of the correlation's angle, their number doubled until the values settle: at the geometric pace of
 * interpolation the last set errs by about the square of what it changed.
 */
function varyingMinima(minimaAt: MinimaAt, strikes: readonly number[], rhos: readonly number[]): number[] {
  if (strikes.length === 0) return [];
  const angles = rhos.map(angleOfCorrelation);
  const low = Math.min(...angles);
  const high = Math.max(...angles);
  if (high - low < 1e-12) return [...minimaAt(rhos[0]!, strikes)];
  const known = new Map<number, Float64Array>();
  const sample = (angle: number) => {
    const values = known.get(angle) ?? minimaAt(correlationOfAngle(angle), strikes);
    known.set(angle, values);
    return values;
  };
  let before: number[] | null = null;
  for (let count = FEWEST_POINTS; ; count = 2 * count - 1) {
    const points = chebyshevPoints(count, low, high);
    const samples = points.map(sample);
    const values = angles.map((angle, i) =>
      chebyshevValue(
        points,
        samples.map((at) => at[i]!),
        angle,
      ),
    );
    const change = before ? Math.max(...values.map((value, i) => Math.abs(value - before![i]!))) : 1;
    if (change < SETTLED || count >= MOST_POINTS) return values;
    before = values;
  }
}
