/** cos(πu) for u in [0, 1], by its series around the nearer of 0, 1/2 and 1; error about 1e-16. */
export function cosinePi(u: number): number {
  if (u > 0.5) return -cosinePi(1 - u);
  if (u > 0.25) return sine(Math.PI * (0.5 - u));
  const square = (Math.PI * u) ** 2;
  let value = 1;
  for (let k = 20; k >= 2; k -= 2) value = 1 - (value * square) / (k * (k - 1));
  return value;
}

function sine(x: number): number {
  const square = x * x;
  let value = 1;
  for (let k = 21; k >= 3; k -= 2) value = 1 - (value * square) / (k * (k - 1));
  return x * value;
}

/** Chebyshev points of the second kind on [low, high], ascending; n ≥ 2. */
export function chebyshevPoints(n: number, low: number, high: number): number[] {
  return Array.from({ length: n }, (_, k) => low + ((high - low) * (1 - cosinePi(k / (n - 1)))) / 2);
}

/** Value at x of the polynomial through values at Chebyshev points (barycentric formula, Berrut & Trefethen 2004). */
export function chebyshevValue(points: readonly number[], values: ArrayLike<number>, x: number): number {
  let top = 0;
  let bottom = 0;
  const last = points.length - 1;
  for (let k = 0; k <= last; k++) {
    const distance = x - points[k]!;
    if (distance === 0) return values[k]!;
    const weight = ((k % 2 === 0 ? 1 : -1) * (k === 0 || k === last ? 0.5 : 1)) / distance;
    top += weight * values[k]!;
    bottom += weight;
  }
  return top / bottom;
}

/** ρ = sin²(πu/2) for u in [0, 1]: the variable in which expected losses are smooth in correlation. */
export function correlationOfAngle(u: number): number {
  return (1 - cosinePi(u)) / 2;
}

/** u in [0, 1] with sin²(πu/2) = ρ, by Newton's method on the sine from the near end. */
export function angleOfCorrelation(rho: number): number {
  if (rho <= 0) return 0;
  if (rho >= 1) return 1;
  if (rho > 0.5) return 1 - angleOfCorrelation(1 - rho);
  const wanted = Math.sqrt(rho);
  let x = wanted * (1 + rho * (1 / 6 + rho * (3 / 40 + rho * (5 / 112))));
  for (let step = 0; step < 3; step++) {
    const here = sine(x);
    x -= (here - wanted) / Math.sqrt(1 - here * here);
  }
  return (2 * x) / Math.PI;
}
