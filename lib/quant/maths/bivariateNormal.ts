import { exp } from "./elementary";
import { normalCdf } from "./normal";
import { gaussLegendre } from "./quadrature";

const TWO_PI = 6.283185307179586;
const SQRT_2PI = 2.5066282746310005;
const MODERATE_CORRELATION = 0.925;

/**
 * Φ₂(x, y; ρ) = P(X ≤ x, Y ≤ y) for standard normals with correlation ρ in [−1, 1], absolute error about 5e-16;
 * for ρ ≥ 0 the relative error stays small in the tails too. ρ = 0 and ±1 are the closed forms, arguments may be
 * infinite. After A. Genz, "Numerical computation of rectangular bivariate and trivariate normal and t
 * probabilities", Statistics and Computing 14 (2004), with the angle replaced by the tangent of its half.
 * @throws RangeError when ρ is outside [−1, 1].
 */
export function bivariateNormalCdf(x: number, y: number, correlation: number): number {
  if (!(correlation >= -1 && correlation <= 1))
    throw new RangeError(`a correlation is in [-1, 1], not ${correlation}`);
  if (x === Number.NEGATIVE_INFINITY || y === Number.NEGATIVE_INFINITY) return 0;
  if (x === Number.POSITIVE_INFINITY) return normalCdf(y);
  if (y === Number.POSITIVE_INFINITY) return normalCdf(x);
  if (correlation === 0) return normalCdf(x) * normalCdf(y);
  if (correlation === 1) return normalCdf(Math.min(x, y));
  if (correlation === -1) return oppositeLimit(x, y);
  const value =
    Math.abs(correlation) < MODERATE_CORRELATION
      ? moderate(x, y, correlation)
      : correlation > 0
        ? nearOne(x, y, correlation)
        : nearMinusOne(x, y, correlation);
  return Math.min(Math.max(value, 0), normalCdf(Math.min(x, y)));
}

/** max(0, Φ(x) + Φ(y) − 1) without cancellation between values near one. */
function oppositeLimit(x: number, y: number): number {
  if (x + y <= 0) return 0;
  return intervalProbability(-y, x);
}

/** P(low < X ≤ high), from the side where the values are small. */
function intervalProbability(low: number, high: number): number {
  return low > 0 ? normalCdf(-low) - normalCdf(-high) : normalCdf(high) - normalCdf(low);
}

/** Φ(x)Φ(y) plus the integral of the bivariate density over the correlation, r = 2t/(1 + t²). */
function moderate(x: number, y: number, correlation: number): number {
  const end = correlation / (1 + Math.sqrt((1 - correlation) * (1 + correlation)));
  const halfSquares = (x * x + y * y) / 2;
  const product = x * y;
  const { nodes, weights } = gaussLegendre(24);
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) {
    const t = (end * (1 + nodes[i]!)) / 2;
    const square = t * t;
    const r = (2 * t) / (1 + square);
    const cosine = (1 - square) / (1 + square);
    sum += (weights[i]! * exp((r * product - halfSquares) / (cosine * cosine))) / (1 + square);
  }
  return normalCdf(x) * normalCdf(y) + (sum * end) / TWO_PI;
}

function nearOne(x: number, y: number, correlation: number): number {
  return normalCdf(Math.min(x, y)) - departure(-x, -y, correlation);
}

function nearMinusOne(x: number, y: number, correlation: number): number {
  const limit = x + y > 0 ? intervalProbability(-y, x) : 0;
  return limit + departure(-x, y, -correlation);
}

/** How far P(X > h, Y > k; ρ) lies below P(X > max(h, k)), for ρ in [0.925, 1): Genz's expansion and remainder. */
function departure(h: number, k: number, correlation: number): number {
  const product = h * k;
  const variance = (1 - correlation) * (1 + correlation);
  const deviation = Math.sqrt(variance);
  const gapSquare = (h - k) * (h - k);
  const c = (4 - product) / 8;
  const d = (12 - product) / 16;
  const exponent = -(gapSquare / variance + product) / 2;
  let sum = 0;
  if (exponent > -745) {
    sum =
      deviation *
      exp(exponent) *
      (1 - (c * (gapSquare - variance) * (1 - (d * gapSquare) / 5)) / 3 + (c * d * variance * variance) / 5);
  }
  if (-product < 1400) {
    const gap = Math.sqrt(gapSquare);
    const tail = normalCdf(-gap / deviation);
    if (tail > 0) {
      sum -=
        exp(-product / 2) * SQRT_2PI * tail * gap * (1 - (c * gapSquare * (1 - (d * gapSquare) / 5)) / 3);
    }
  }
  return (sum + remainder(deviation / 2, gapSquare, product, c, d)) / TWO_PI;
}

function remainder(half: number, gapSquare: number, product: number, c: number, d: number): number {
  const { nodes, weights } = gaussLegendre(24);
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) {
    const root = half * (1 + nodes[i]!);
    const square = root * root;
    const exponent = -(gapSquare / square + product) / 2;
    if (exponent <= -745) continue;
    const r = Math.sqrt(1 - square);
    const exact = exp((-product * square) / (2 * (1 + r) * (1 + r))) / r;
    sum += weights[i]! * exp(exponent) * (exact - (1 + c * square * (1 + d * square)));
  }
  return half * sum;
}
