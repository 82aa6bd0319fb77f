import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import { bivariateNormalCdf } from "@/lib/quant/maths/bivariateNormal";
import { exp, expm1, log, log1p } from "@/lib/quant/maths/elementary";
import { normalCdf, normalDensity, normalQuantile } from "@/lib/quant/maths/normal";
import { gaussLegendre } from "@/lib/quant/maths/quadrature";
import { brentRoot } from "@/lib/quant/maths/roots";
import { LargestErrors } from "../support/largestErrors";
import {
  Exact,
  exactLegendre,
  exactly,
  exactNormalCdf,
  exactNormalDensity,
  exactQuadrant,
  relativeError,
} from "./highPrecision";

const errors = new LargestErrors(
  "Functions against decimal.js at 50 digits, at random points: relative error",
);
afterAll(() => errors.print());

function expectClose(topic: string, found: number, exact: Exact, allowed: number, at: string): void {
  const error = exact.isZero() ? Math.abs(found) : relativeError(found, exact);
  errors.note(topic, error, allowed, at);
  expect(error, `${topic} at ${at} is ${found}, exactly ${exact.toString()}`).toBeLessThanOrEqual(allowed);
}

function real(min: number, max: number) {
  return fc.double({ min, max, noNaN: true });
}

const ULP = 2.3e-16;

describe("ELEMENTARY: own exp and log against decimal.js at 50 digits", () => {
  it("exp within one unit of the last place, from e^-700 to e^700", () => {
    fc.assert(
      fc.property(fc.oneof(real(-700, 700), real(-1, 1)), (x) =>
        expectClose("exp", exp(x), exactly(x).exp(), ULP, String(x)),
      ),
      { numRuns: 600 },
    );
  });
  it("log within one unit of the last place, near one and at the ends of the range too", () => {
    fc.assert(
      fc.property(fc.oneof(real(1e-300, 1e300), real(0.5, 2), real(1e-12, 1)), (x) =>
        expectClose("log", log(x), exactly(x).ln(), ULP, String(x)),
      ),
      { numRuns: 400 },
    );
  });
  it("expm1 and log1p keep the digits of small arguments", () => {
    fc.assert(
      fc.property(fc.oneof(real(-1e-10, 1e-10), real(-0.9, 3)), (x) => {
        fc.pre(Math.abs(x) > 1e-20);
        const one = exactly(x).plus(1);
        expectClose("expm1", expm1(x), exactly(x).exp().minus(1), ULP, String(x));
        expectClose("log1p", log1p(x), one.ln(), ULP, String(x));
      }),
      { numRuns: 300 },
    );
  });
});

describe("NORMAL: against decimal.js at 50 digits", () => {
  it("Φ and φ to 1e-14 relative from −37 to 8", () => {
    fc.assert(
      fc.property(fc.oneof(real(-37, 8), real(-2, 2)), (x) => {
        expectClose("Φ", normalCdf(x), exactNormalCdf(x), 1e-14, String(x));
        expectClose("φ", normalDensity(x), exactNormalDensity(x), 1e-14, String(x));
      }),
      { numRuns: 150 },
    );
  });
  it("Φ⁻¹: the exact Φ of what it returns is the probability asked for, as far as a double can say", () => {
    fc.assert(
      fc.property(fc.oneof(real(1e-300, 1e-10), real(1e-10, 0.5), real(0.5, 0.999999)), (p) => {
        const x = normalQuantile(p);
        const slope = exactNormalDensity(x);
        const step = exactNormalCdf(x).minus(exactly(p)).div(slope);
        const error = step.div(new Exact(x).abs().plus(0.1)).abs().toNumber();
        errors.note("Φ⁻¹", error, 1e-14, String(p));
        expect(error, `p = ${p}`).toBeLessThanOrEqual(1e-14);
      }),
      { numRuns: 150 },
    );
  });
});

describe("BIVARIATE: where the closed form is known (Sheppard 1899)", () => {
  it("Φ₂(0, 0; ρ) = 1/4 + arcsin ρ/2π within 1e-15", () => {
    fc.assert(
      fc.property(fc.oneof(real(-1, 1), real(0.999, 1), real(-1, -0.999)), (rho) => {
        const found = bivariateNormalCdf(0, 0, rho);
        const error = exactly(found).minus(exactQuadrant(rho)).abs().toNumber();
        errors.note("Φ₂(0, 0; ρ), absolute", error, 1e-15, String(rho));
        expect(error).toBeLessThanOrEqual(1e-15);
      }),
      { numRuns: 200 },
    );
  });
});

describe("QUADRATURE: Gauss–Legendre rules against Legendre polynomials at 50 digits", () => {
  for (const n of [1, 2, 3, 7, 8, 16, 24, 31, 48, 96]) {
    it(`${n} nodes: one Newton step from a node is below 2e-16, weights are 2/((1 − x²) P′²) to 1e-15`, () => {
      const { nodes, weights } = gaussLegendre(n);
      for (const [i, x] of nodes.entries()) {
        const { value, slope } = exactLegendre(n, x);
        const step = value.div(slope);
        errors.note("Gauss–Legendre node, absolute", step.abs().toNumber(), 2e-16, `${n}, ${i}`);
        expect(step.abs().toNumber()).toBeLessThanOrEqual(2e-16);
        const root = exactly(x).minus(step);
        const exact = exactLegendreWeight(n, root);
        const error = exactly(weights[i]!).minus(exact).abs().toNumber();
        errors.note("Gauss–Legendre weight, absolute", error, 1e-15, `${n}, ${i}`);
        expect(error).toBeLessThanOrEqual(1e-15);
      }
    });
  }
});

function exactLegendreWeight(n: number, x: Exact): Exact {
  let before = new Exact(1);
  let here = x;
  for (let j = 2; j <= n; j++) {
    const next = x
      .times(here)
      .times(2 * j - 1)
      .minus(before.times(j - 1))
      .div(j);
    before = here;
    here = next;
  }
  const slope = n === 1 ? new Exact(1) : x.times(here).minus(before).times(n).div(x.times(x).minus(1));
  return new Exact(2).div(new Exact(1).minus(x.times(x)).times(slope).times(slope));
}

describe("ROOTS: Brent's method against decimal.js", () => {
  it("finds cube roots and logarithms to the last places", () => {
    fc.assert(
      fc.property(real(0.01, 50), (y) => {
        expectClose(
          "root of x³ = y",
          brentRoot((x) => x * x * x - y, 0, 60),
          exactly(y).cbrt(),
          1e-15,
          String(y),
        );
        const root = brentRoot((x) => exp(x) - y, -6, 6);
        const error = exactly(y).ln().minus(exactly(root)).abs().toNumber();
        errors.note("root of e^x = y, absolute", error, 2e-15, String(y));
        expect(error).toBeLessThanOrEqual(2e-15);
      }),
      { numRuns: 200 },
    );
  });
});
