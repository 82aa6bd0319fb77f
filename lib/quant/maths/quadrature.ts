/** Nodes and weights of a rule on [−1, 1]. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const rules = new Map<number, QuadratureRule>();

/**
 * Gauss–Legendre rule with n nodes on [−1, 1], ascending, exact for polynomials of degree 2n − 1. Roots of the
 * Legendre polynomial by Newton's method from its three-term recurrence; the rule is kept for the next call.
 * @throws RangeError when n is not a positive whole number.
 */
export function gaussLegendre(n: number): QuadratureRule {
  if (!Number.isInteger(n) || n < 1) throw new RangeError(`a rule needs a whole number of nodes, not ${n}`);
  const known = rules.get(n);
  if (known) return known;
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < Math.floor((n + 1) / 2); i++) {
    const { root, slope } = legendreRoot(n, cosineOfFraction((i + 0.75) / (n + 0.5)));
    const isMiddle = n % 2 === 1 && i === (n - 1) / 2;
    const x = isMiddle ? 0 : root;
    const weight = 2 / ((1 - x * x) * slope * slope);
    nodes[i] = -x;
    nodes[n - 1 - i] = x;
    weights[i] = weight;
    weights[n - 1 - i] = weight;
  }
  const rule = { nodes, weights };
  rules.set(n, rule);
  return rule;
}

function legendreRoot(n: number, start: number): { root: number; slope: number } {
  let x = start;
  for (let iteration = 0; iteration < 12; iteration++) {
    const { value, slope } = legendre(n, x);
    const step = value / slope;
    x -= step;
    if (Math.abs(step) < 1e-17) break;
  }
  return { root: x, slope: legendre(n, x).slope };
}

function legendre(n: number, x: number): { value: number; slope: number } {
  let value = 1;
  let before = 0;
  for (let j = 1; j <= n; j++) {
    const next = ((2 * j - 1) * x * value - (j - 1) * before) / j;
    before = value;
    value = next;
  }
  return { value, slope: (n * (x * value - before)) / (x * x - 1) };
}

/** cos(π · fraction) for a fraction in [0, 1/2], good to 1e-8: a start for Newton's method, no more. */
function cosineOfFraction(fraction: number): number {
  const square = (Math.PI * fraction) ** 2;
  let value = 1;
  for (let k = 12; k >= 2; k -= 2) value = 1 - (value * square) / (k * (k - 1));
  return value;
}
