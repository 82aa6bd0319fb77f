import { gaussLegendre } from "../maths/quadrature";

/** (2j + 1) P_j at the nodes of the n-point rule for the degrees whose coefficients are compared. */
export interface LegendreProbe {
  /** Two degrees about half of n, and the two highest below n. */
  readonly middle: readonly Float64Array[];
  readonly highest: readonly Float64Array[];
}

export function legendreProbe(n: number): LegendreProbe {
  const { nodes } = gaussLegendre(n);
  const degree = (j: number) => nodes.map((x) => (2 * j + 1) * legendre(j, x));
  return { middle: [degree(n / 2 - 2), degree(n / 2 - 1)], highest: [degree(n - 2), degree(n - 1)] };
}

function legendre(degree: number, x: number): number {
  let before = 0;
  let value = 1;
  for (let j = 1; j <= degree; j++) {
    const next = ((2 * j - 1) * x * value - (j - 1) * before) / j;
    before = value;
    value = next;
  }
  return value;
}

/**
 * An estimate of the error of an n-point Gauss–Legendre sum from its own terms (weights included). The rule errs by the
 * integrand's Legendre coefficients from degree 2n on. Those of a function smooth on the interval fall at least
 * geometrically: by as much from n to 2n as from 0 to n, and as twice from n/2 to n. The larger of the two is taken; it is the
 * second where a kink or a step keeps the coefficients from falling.
 */
export function legendreError(terms: Float64Array, { middle, highest }: LegendreProbe): number {
  const last = largest(terms, highest);
  if (last === 0) return 0;
  const size = terms.reduce((sum, term) => sum + Math.abs(term), 0);
  const fall = last / Math.max(last, largest(terms, middle));
  return last * Math.max(fall * fall, Math.min(1, last / size));
}

function largest(terms: Float64Array, degrees: readonly Float64Array[]): number {
  let most = 0;
  for (const degree of degrees) {
    let coefficient = 0;
    for (let k = 0; k < terms.length; k++) coefficient += terms[k]! * degree[k]!;
    most = Math.max(most, Math.abs(coefficient));
  }
  return most;
}
