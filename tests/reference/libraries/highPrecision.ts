import { Decimal } from "decimal.js";

/** decimal.js at 50 digits. */
export const Exact = Decimal.clone({ precision: 50 });
export type Exact = Decimal;

/** The value that a double holds, not the shortest decimal that names it. */
export function exactly(x: number): Exact {
  let whole = x;
  let halvings = 0;
  while (!Number.isInteger(whole)) {
    whole *= 2;
    halvings++;
  }
  return new Exact(BigInt(whole).toString()).div(new Exact(2).pow(halvings));
}

const PI = Exact.acos(-1);
const ROOT_TWO_PI = PI.times(2).sqrt();

/** Φ(x): Taylor's series for |x| < 6, Laplace's continued fraction of the tail beyond. */
export function exactNormalCdf(x: number): Exact {
  const z = exactly(x);
  const density = z.times(z).div(-2).exp().div(ROOT_TWO_PI);
  if (Math.abs(x) < 6) {
    let term = z;
    let sum = z;
    for (let k = 1; term.abs().gt("1e-55"); k++) {
      term = term
        .times(z)
        .times(z)
        .div(2 * k + 1);
      sum = sum.plus(term);
    }
    return density.times(sum).plus(0.5);
  }
  const size = z.abs();
  let fraction = size;
  for (let k = 300; k >= 1; k--) fraction = size.plus(new Exact(k).div(fraction));
  const tail = density.div(fraction);
  return x < 0 ? tail : new Exact(1).minus(tail);
}

/** φ(x). */
export function exactNormalDensity(x: number): Exact {
  const z = exactly(x);
  return z.times(z).div(-2).exp().div(ROOT_TWO_PI);
}

/** Φ₂(0, 0; ρ) = 1/4 + arcsin ρ/(2π) (Sheppard 1899). */
export function exactQuadrant(rho: number): Exact {
  return exactly(rho).asin().div(PI.times(2)).plus(0.25);
}

/** Legendre polynomial of degree n and its slope at x, by the three-term recurrence. */
export function exactLegendre(n: number, x: number): { value: Exact; slope: Exact } {
  const z = exactly(x);
  let before = new Exact(1);
  let here = z;
  for (let j = 2; j <= n; j++) {
    const next = z
      .times(here)
      .times(2 * j - 1)
      .minus(before.times(j - 1))
      .div(j);
    before = here;
    here = next;
  }
  const slope = z.times(here).minus(before).times(n).div(z.times(z).minus(1));
  return { value: here, slope };
}

/** Law of a sum of independent defaults, amounts in whole steps. */
export function exactIndependentLaw(
  names: readonly { readonly steps: number; readonly probability: Exact }[],
): Exact[] {
  let law = [new Exact(1)];
  for (const { steps, probability } of names) {
    const stay = new Exact(1).minus(probability);
    const next = Array.from({ length: law.length + steps }, () => new Exact(0));
    for (const [u, mass] of law.entries()) {
      next[u] = next[u]!.plus(mass.times(stay));
      next[u + steps] = next[u + steps]!.plus(mass.times(probability));
    }
    law = next;
  }
  return law;
}

/** Relative error of a double against an exact value. */
export function relativeError(found: number, exact: Exact): number {
  return exactly(found).div(exact).minus(1).abs().toNumber();
}
