import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bootstrapSurvival, parSpread, swapLegs } from "@/lib/quant/market/defaultSwap";
import { discountCurve, discountFactor } from "@/lib/quant/market/discountCurve";
import { evenSchedule } from "@/lib/quant/market/schedule";
import { cumulativeHazard, survivalProbability } from "@/lib/quant/market/survivalCurve";
import { bivariateNormalCdf } from "@/lib/quant/maths/bivariateNormal";
import { monotoneInterpolation } from "@/lib/quant/maths/interpolation";
import { normalCdf, normalQuantile } from "@/lib/quant/maths/normal";
import { runs } from "./draws";

function real(min: number, max: number) {
  return fc.double({ min, max, noNaN: true });
}

const correlations = fc.oneof(real(-1, 1), real(0.99, 1), real(-1, -0.99), fc.constantFrom(-1, 0, 1));

describe("BIVARIATE: symmetries of Φ₂", () => {
  it("order, reflection and margins, within 2e-15", () => {
    fc.assert(
      fc.property(real(-9, 9), real(-9, 9), correlations, (x, y, rho) => {
        const value = bivariateNormalCdf(x, y, rho);
        expect(Math.abs(value - bivariateNormalCdf(y, x, rho))).toBeLessThanOrEqual(2e-15);
        expect(Math.abs(value + bivariateNormalCdf(x, -y, -rho) - normalCdf(x))).toBeLessThanOrEqual(2e-15);
        const reflected = 1 - normalCdf(x) - normalCdf(y) + value;
        expect(Math.abs(bivariateNormalCdf(-x, -y, rho) - reflected)).toBeLessThanOrEqual(2e-15);
        expect(value).toBeLessThanOrEqual(Math.min(normalCdf(x), normalCdf(y)) + 1e-16);
        expect(value).toBeGreaterThanOrEqual(Math.max(0, normalCdf(x) + normalCdf(y) - 1) - 2e-16);
      }),
      runs(5_000),
    );
  });

  it("rises with the correlation (Slepian 1962), and is a product, a minimum or an excess at 0, 1 and −1", () => {
    fc.assert(
      fc.property(real(-8, 8), real(-8, 8), correlations, correlations, (x, y, one, other) => {
        const [low, high] = [Math.min(one, other), Math.max(one, other)];
        expect(bivariateNormalCdf(x, y, high) - bivariateNormalCdf(x, y, low)).toBeGreaterThanOrEqual(-1e-15);
        const [p, q] = [normalCdf(x), normalCdf(y)];
        expect(Math.abs(bivariateNormalCdf(x, y, 0) - p * q)).toBeLessThanOrEqual(1e-16);
        expect(bivariateNormalCdf(x, y, 1)).toBe(Math.min(p, q));
        expect(Math.abs(bivariateNormalCdf(x, y, -1) - Math.max(0, p + q - 1))).toBeLessThanOrEqual(3e-16);
      }),
      runs(3_000),
    );
  });
});

describe("NORMAL: Φ and Φ⁻¹", () => {
  it("undo each other, and Φ(−x) = 1 − Φ(x)", () => {
    fc.assert(
      fc.property(real(-37, 6), (x) => {
        const p = normalCdf(x);
        const conditioning = Math.max(1, Math.exp((x * x) / 2) * p * Math.sqrt(2 * Math.PI));
        expect(Math.abs(normalQuantile(p) - x)).toBeLessThanOrEqual(
          4e-15 * conditioning * Math.max(1, Math.abs(x)),
        );
        expect(Math.abs(normalCdf(-x) - (1 - p))).toBeLessThanOrEqual(2.3e-16);
      }),
      runs(3_000),
    );
  });
});

const curves = fc.tuple(real(-0.02, 0.06), real(-0.02, 0.06)).map(([near, far]) =>
  discountCurve({
    kind: "zero",
    nodes: [
      { years: 1, rate: near },
      { years: 6, rate: far },
    ],
  }),
);

describe("SURVIVAL: what is quoted comes back", () => {
  it("every par contract on a bootstrapped curve is worth zero, and Q never rises; else the quote is refused", () => {
    const spreads = fc.array(real(0.0001, 0.3), { minLength: 1, maxLength: 5 });
    let refused = 0;
    fc.assert(
      fc.property(curves, spreads, real(0, 0.95), (discount, quoted, recovery) => {
        if (!discount.ok) throw new Error("the curve is refused");
        const quotes = quoted.map((coupon, i) => ({
          schedule: evenSchedule(4 * (i + 1), 4),
          coupon,
          upfront: 0,
          years: i + 1,
          path: `nodes.${i}`,
        }));
        const outcome = bootstrapSurvival(quotes, discount.value, recovery);
        if (!outcome.ok) {
          refused++;
          expect(outcome.problems[0]!.code).toBe("noHazard");
          return;
        }
        for (const { schedule, coupon, years } of quotes) {
          const { annuity } = swapLegs(schedule, discount.value, outcome.value);
          const par = parSpread(schedule, discount.value, outcome.value, recovery)!;
          expect(Math.abs(par - coupon) * annuity).toBeLessThanOrEqual(1e-13);
          expect(cumulativeHazard(outcome.value, years)).toBeGreaterThanOrEqual(
            cumulativeHazard(outcome.value, years - 1),
          );
        }
      }),
      runs(400),
    );
    expect(refused).toBeGreaterThan(0);
  });

  it("closed-form legs are the limit of a fine sum over short steps", () => {
    fc.assert(
      fc.property(curves, real(0.0005, 0.4), (discount, spread) => {
        if (!discount.ok) throw new Error("the curve is refused");
        const schedule = evenSchedule(12, 4);
        const quote = { schedule, coupon: spread, upfront: 0, years: 3, path: "nodes.0" };
        const curve = bootstrapSurvival([quote], discount.value, 0.4);
        if (!curve.ok) throw new Error("a single spread is refused");
        const survival = (t: number) => survivalProbability(curve.value, t);
        const steps = 3_000;
        let [protection, annuity] = [0, 0];
        for (let k = 0; k < steps; k++) {
          const [from, to] = [(3 * k) / steps, (3 * (k + 1)) / steps];
          const middle = 0.5 * (from + to);
          const mass = discountFactor(discount.value, middle) * (survival(from) - survival(to));
          protection += mass;
          annuity += mass * (middle - Math.floor(middle * 4) / 4);
        }
        for (const { end, accrual } of schedule.periods)
          annuity += accrual * discountFactor(discount.value, end) * survival(end);
        const legs = swapLegs(schedule, discount.value, curve.value);
        expect(Math.abs(legs.protection - protection)).toBeLessThanOrEqual(1e-7);
        expect(Math.abs(legs.annuity - annuity)).toBeLessThanOrEqual(1e-7);
      }),
      runs(60),
    );
  });
});

describe("DISCOUNT: par rates", () => {
  it("a swap at each par node is worth par on the curve that it made", () => {
    const rates = fc.array(real(-0.02, 0.1), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(rates, (pars) => {
        const curve = discountCurve({ kind: "par", nodes: pars.map((rate, i) => ({ years: i + 1, rate })) });
        if (!curve.ok) return;
        let annuity = 0;
        for (const [i, rate] of pars.entries()) {
          const factor = discountFactor(curve.value, i + 1);
          annuity += factor;
          expect(Math.abs(rate * annuity + factor - 1)).toBeLessThanOrEqual(1e-14 * (1 + annuity));
        }
      }),
      runs(500),
    );
  });
});

describe("BASE: the monotone cubic", () => {
  it("meets its knots, stays between neighbours and keeps the direction of the data", () => {
    const knots = fc.array(fc.tuple(real(0.01, 1), real(0, 1)), { minLength: 2, maxLength: 8 });
    fc.assert(
      fc.property(knots, real(0, 1), (drawn, place) => {
        let sum = 0;
        const xs = drawn.map(([step]) => {
          sum += step;
          return sum;
        });
        const ys = drawn.map(([, y]) => y);
        const all = { arguments: xs, values: ys };
        for (const [i, x] of xs.entries()) {
          expect(Math.abs(monotoneInterpolation(all, x) - ys[i]!)).toBeLessThanOrEqual(1e-15);
          if (i === 0) continue;
          const [left, right] = [ys[i - 1]!, ys[i]!];
          const at = xs[i - 1]! + place * (x - xs[i - 1]!);
          const value = monotoneInterpolation(all, Math.min(at, x));
          expect(value).toBeGreaterThanOrEqual(Math.min(left, right) - 1e-14);
          expect(value).toBeLessThanOrEqual(Math.max(left, right) + 1e-14);
        }
      }),
      runs(1_000),
    );
  });
});
