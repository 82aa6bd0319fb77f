/** A function given at increasing arguments. */
export interface Knots {
  readonly arguments: readonly number[];
  readonly values: readonly number[];
}

/** Index i of the interval [x_i, x_{i+1}] that holds x, within the knots. */
function intervalOf(xs: readonly number[], x: number): number {
  let i = 0;
  while (i < xs.length - 2 && x > xs[i + 1]!) i++;
  return i;
}

/** Value on the chord between two knots; x must lie within the knots. */
export function linearInterpolation({ arguments: xs, values: ys }: Knots, x: number): number {
  if (xs.length === 1) return ys[0]!;
  const i = intervalOf(xs, x);
  if (x === xs[i]) return ys[i]!;
  if (x === xs[i + 1]) return ys[i + 1]!;
  return ys[i]! + ((ys[i + 1]! - ys[i]!) * (x - xs[i]!)) / (xs[i + 1]! - xs[i]!);
}

/** A secant below this is flat: ratios to it would leave the range of numbers. */
const FLAT = 1e-150;

/**
 * Slopes of the monotone cubic of Fritsch & Carlson (1980): the mean of adjacent secants, one-sided at the ends, zero
 * where the secants' signs differ, then limited to the circle α² + β² ≤ 9 from left to right.
 */
export function monotoneSlopes({ arguments: xs, values: ys }: Knots): number[] {
  const count = xs.length;
  if (count === 1) return [0];
  const secants = Array.from({ length: count - 1 }, (_, i) => (ys[i + 1]! - ys[i]!) / (xs[i + 1]! - xs[i]!));
  const slopes = Array.from({ length: count }, (_, i) => {
    if (i === 0) return secants[0]!;
    if (i === count - 1) return secants[count - 2]!;
    const [before, after] = [secants[i - 1]!, secants[i]!];
    return before * after <= 0 ? 0 : 0.5 * (before + after);
  });
  for (let i = 0; i < count - 1; i++) {
    const secant = secants[i]!;
    if (Math.abs(secant) < FLAT) {
      slopes[i] = 0;
      slopes[i + 1] = 0;
      continue;
    }
    const alpha = slopes[i]! / secant;
    const beta = slopes[i + 1]! / secant;
    const square = alpha * alpha + beta * beta;
    if (square > 9) {
      const shrink = 3 / Math.sqrt(square);
      slopes[i] = shrink * alpha * secant;
      slopes[i + 1] = shrink * beta * secant;
    }
  }
  return slopes;
}

/** Value of the monotone cubic; x must lie within the knots. */
export function monotoneInterpolation(knots: Knots, x: number, slopes = monotoneSlopes(knots)): number {
  const { arguments: xs, values: ys } = knots;
  if (xs.length === 1) return ys[0]!;
  const i = intervalOf(xs, x);
  const width = xs[i + 1]! - xs[i]!;
  const t = (x - xs[i]!) / width;
  const left = 1 - t;
  return (
    ys[i]! * (1 + 2 * t) * left * left +
    ys[i + 1]! * t * t * (3 - 2 * t) +
    width * (slopes[i]! * t * left * left - slopes[i + 1]! * t * t * left)
  );
}
