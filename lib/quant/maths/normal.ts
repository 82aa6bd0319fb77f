import { exp, log } from "./elementary";

const INVERSE_SQRT_2PI = 0.398942280401432677939946;

/** Value of a polynomial, highest power first. */
function polynomial(coefficients: readonly number[], x: number): number {
  let value = 0;
  for (const coefficient of coefficients) value = value * x + coefficient;
  return value;
}

/** Standard normal density φ(x). */
export function normalDensity(x: number): number {
  return INVERSE_SQRT_2PI * halfSquareExp(x);
}

/** e^(−x²/2) without the rounding error of x²: the part of x on a grid of 1/16 squares exactly (Cody 1969). */
function halfSquareExp(x: number): number {
  const size = Math.abs(x);
  if (size > 40) return 0;
  const grid = Math.trunc(size * 16) / 16;
  const rest = (size - grid) * (size + grid);
  return exp(-grid * grid * 0.5) * exp(-rest * 0.5);
}

const CENTRE_TOP = [
  0.065682337918207449113, 2.2352520354606839287, 161.02823106855587881, 1067.6894854603709582,
  18154.981253343561249,
];
const CENTRE_BOTTOM = [
  1, 47.20258190468824187, 976.09855173777669322, 10260.932208618978205, 45507.789335026729956,
];
const MIDDLE_TOP = [
  1.0765576773720192317e-8, 0.39894151208813466764, 8.8831497943883759412, 93.506656132177855979,
  597.27027639480026226, 2494.5375852903726711, 6848.1904505362823326, 11602.651437647350124,
  9842.7148383839780218,
];
const MIDDLE_BOTTOM = [
  1, 22.266688044328115691, 235.38790178262499861, 1519.377599407554805, 6485.558298266760755,
  18615.571640885098091, 34900.952721145977266, 38912.003286093271411, 19685.429676859990727,
];
/** Mills ratio (1 − Φ)/φ for size > 5.65 by Laplace's continued fraction (Abramowitz & Stegun 26.2.14). */
function millsRatio(size: number): number {
  let fraction = size;
  for (let k = size < 9 ? 45 : 20; k >= 1; k--) fraction = size + k / fraction;
  return 1 / fraction;
}

/** P(X > size) for size ≥ 0.67448975, relative error about 1e-15. */
function upperTail(size: number): number {
  const density = halfSquareExp(size);
  if (size <= 5.656854249492380195206754) {
    return density * (polynomial(MIDDLE_TOP, size) / polynomial(MIDDLE_BOTTOM, size));
  }
  return density * INVERSE_SQRT_2PI * millsRatio(size);
}

/**
 * Standard normal distribution function Φ(x), relative error ≤ 1e-14 wherever the result is a normal double.
 * Rational approximations of W. J. Cody, "Rational Chebyshev approximations for the error function" (1969).
 */
export function normalCdf(x: number): number {
  if (Number.isNaN(x)) return x;
  const size = Math.abs(x);
  if (size <= 0.67448975) {
    const square = size > 1.1e-16 ? x * x : 0;
    return 0.5 + x * (polynomial(CENTRE_TOP, square) / polynomial(CENTRE_BOTTOM, square));
  }
  const tail = upperTail(size);
  return x > 0 ? 1 - tail : tail;
}

const QUANTILE_CENTRE_TOP = [
  2.5090809287301226727e3, 3.3430575583588128105e4, 6.7265770927008700853e4, 4.5921953931549871457e4,
  1.3731693765509461125e4, 1.9715909503065514427e3, 1.3314166789178437745e2, 3.387132872796366608,
];
const QUANTILE_CENTRE_BOTTOM = [
  5.226495278852854561e3, 2.8729085735721942674e4, 3.930789580009271061e4, 2.1213794301586595867e4,
  5.3941960214247511077e3, 6.871870074920579083e2, 4.2313330701600911252e1, 1,
];
const QUANTILE_MIDDLE_TOP = [
  7.7454501427834140764e-4, 2.27238449892691845833e-2, 2.4178072517745061177e-1, 1.27045825245236838258,
  3.64784832476320460504, 5.7694972214606914055, 4.6303378461565452959, 1.42343711074968357734,
];
const QUANTILE_MIDDLE_BOTTOM = [
  1.05075007164441684324e-9, 5.475938084995344946e-4, 1.51986665636164571966e-2, 1.4810397642748007459e-1,
  6.8976733498510000455e-1, 1.6763848301838038494, 2.05319162663775882187, 1,
];
const QUANTILE_TAIL_TOP = [
  2.01033439929228813265e-7, 2.71155556874348757815e-5, 1.2426609473880784386e-3, 2.6532189526576123093e-2,
  2.9656057182850489123e-1, 1.7848265399172913358, 5.4637849111641143699, 6.6579046435011037772,
];
const QUANTILE_TAIL_BOTTOM = [
  2.04426310338993978564e-15, 1.4215117583164458887e-7, 1.8463183175100546818e-5, 7.868691311456132591e-4,
  1.48753612908506148525e-2, 1.3692988092273580531e-1, 5.9983220655588793769e-1, 1,
];

/** Φ⁻¹ of a probability below 0.075, from the logarithm of its inverse. */
function tailQuantile(probability: number): number {
  const r = Math.sqrt(-log(probability));
  const value =
    r <= 5
      ? polynomial(QUANTILE_MIDDLE_TOP, r - 1.6) / polynomial(QUANTILE_MIDDLE_BOTTOM, r - 1.6)
      : polynomial(QUANTILE_TAIL_TOP, r - 5) / polynomial(QUANTILE_TAIL_BOTTOM, r - 5);
  return -value;
}

/** Φ⁻¹ of a probability at most one half. */
function lowerQuantile(probability: number): number {
  if (probability === 0) return Number.NEGATIVE_INFINITY;
  if (probability < 0.075) {
    const start = tailQuantile(probability);
    if (probability < 1e-300) return start;
    const step = (normalCdf(start) - probability) / normalDensity(start);
    return start - step / (1 + 0.5 * start * step);
  }
  const offset = probability - 0.5;
  const r = 0.180625 - offset * offset;
  return (offset * polynomial(QUANTILE_CENTRE_TOP, r)) / polynomial(QUANTILE_CENTRE_BOTTOM, r);
}

/**
 * Φ⁻¹(p), relative error ≤ 1e-14; −∞ at 0, +∞ at 1, NaN outside [0, 1]. For p near 1 with known 1 − p use
 * `normalQuantileComplement`. M. J. Wichura, Algorithm AS 241 (1988), polished by one Halley step in the tails.
 */
export function normalQuantile(probability: number): number {
  if (!(probability >= 0 && probability <= 1)) return Number.NaN;
  return probability <= 0.5 ? lowerQuantile(probability) : -lowerQuantile(1 - probability);
}

/** Φ⁻¹(1 − q) from the complement q, keeping the digits of a small q. */
export function normalQuantileComplement(complement: number): number {
  return -normalQuantile(complement);
}
