import { afterAll, describe, expect, it } from "vitest";
import { parseDay } from "@/lib/quant/market/calendar";
import { type DiscountInput, discountCurve, discountFactor } from "@/lib/quant/market/discountCurve";
import { standardSchedule } from "@/lib/quant/market/schedule";
import { bivariateNormalCdf } from "@/lib/quant/maths/bivariateNormal";
import { normalCdf, normalQuantile } from "@/lib/quant/maths/normal";
import { type BaseNode, baseCurve } from "@/lib/quant/tranche/baseCurve";
import { data } from "./support/data";
import { LargestErrors } from "./support/largestErrors";

interface Functions {
  readonly phi: { x: number; value: number }[];
  readonly phiInv: { p: number; value: number }[];
  readonly phi2: { h: number; k: number; rho: number; value: number }[];
  readonly discount: { curve: DiscountInput; points: { t: number; df: number }[] }[];
  readonly schedule: {
    pricingDate: string;
    maturity: string;
    holidays: string[];
    accrualDays: number[];
    times: number[];
    paymentTimes: number[];
    accruedDays: number;
  }[];
  readonly interpolation: {
    nodes: BaseNode[];
    points: { strike: number; linearFlat: number; linearLinear: number; monotoneFlat: number }[];
  }[];
}

const functions = data<Functions>("functions.json");
const errors = new LargestErrors("Functions: difference from high precision");
afterAll(() => errors.print());

function expectWithin(topic: string, error: number, allowed: number, at: string): void {
  errors.note(topic, error, allowed, at);
  expect(error, at).toBeLessThanOrEqual(allowed);
}

// Source: mpmath at 60 digits; Φ₂ cross-checked with R's mvtnorm.
describe("NORMAL: relative error at most 1e-14, tails included", () => {
  it("Φ", () => {
    for (const { x, value } of functions.phi)
      expectWithin("Φ, relative", Math.abs(normalCdf(x) / value - 1), 1e-14, `x = ${x}`);
  });
  it("Φ⁻¹", () => {
    for (const { p, value } of functions.phiInv) {
      const error = Math.abs(normalQuantile(p) - value);
      expectWithin("Φ⁻¹", error, 1e-15 + 1e-14 * Math.abs(value), `p = ${p}`);
    }
  });
});

describe("BIVARIATE: absolute error at most 1e-15 for every correlation", () => {
  it("at the tabulated points", () => {
    for (const { h, k, rho, value } of functions.phi2) {
      const error = Math.abs(bivariateNormalCdf(h, k, rho) - value);
      expectWithin("Φ₂", error, 1e-15, `${h}, ${k}, ${rho}`);
    }
  });
  it("with correlation near one and in deep tails, relative error at most 1e-12 where it is positive", () => {
    for (const { x, y, rho, value } of data<{ x: number; y: number; rho: number; value: string }[]>(
      "bivariate_extremes.json",
    )) {
      const found = bivariateNormalCdf(x, y, rho);
      const point = `${x}, ${y}, ${rho}`;
      expectWithin("Φ₂ at extremes", Math.abs(found - Number(value)), 5e-16, point);
      if (rho > 0) expectWithin("Φ₂ tails, relative", Math.abs(found / Number(value) - 1), 1e-12, point);
    }
  });
  it("common practice, no source: 5 % and 5 % give 0.25 % at 0, about 0.37 % at 0.1, 5 % at 1", () => {
    const c = normalQuantile(0.05);
    expect(bivariateNormalCdf(c, c, 0)).toBeCloseTo(0.0025, 12);
    expect(bivariateNormalCdf(c, c, 0.1)).toBeCloseTo(0.0037, 4);
    expect(bivariateNormalCdf(c, c, 1)).toBeCloseTo(0.05, 12);
  });
});

describe("SCHEDULE: standard periods, business days and accruals", () => {
  it("dates, days and times of four contracts", () => {
    for (const row of functions.schedule) {
      const holidays = new Set(row.holidays.map((holiday) => parseDay(holiday)!));
      const { periods, accruedAtStart } = standardSchedule(
        parseDay(row.pricingDate)!,
        parseDay(row.maturity)!,
        holidays,
      );
      expect(periods.map((period) => Math.round(period.accrual * 360))).toEqual(row.accrualDays);
      expect(Math.round(accruedAtStart * 360)).toBe(row.accruedDays);
      for (const [j, period] of periods.entries()) {
        expect(Math.abs(period.end - row.times[j]!)).toBeLessThanOrEqual(1e-15);
        expect(Math.abs(period.payment - row.paymentTimes[j]!)).toBeLessThanOrEqual(1e-15);
      }
    }
  });
});

describe("DISCOUNT: flat, zero and par curves", () => {
  it("factors at the tabulated times, relative error at most 1e-13", () => {
    for (const { curve, points } of functions.discount) {
      const built = discountCurve(curve);
      expect(built.ok).toBe(true);
      if (built.ok)
        for (const { t, df } of points)
          expectWithin(
            "discount, relative",
            Math.abs(discountFactor(built.value, t) / df - 1),
            1e-13,
            `t = ${t}`,
          );
    }
  });
});

describe("BASE: interpolation and extrapolation of base correlations", () => {
  it("linear and monotone, flat and linear beyond", () => {
    for (const { nodes, points } of functions.interpolation) {
      for (const { strike, linearFlat, linearLinear, monotoneFlat } of points) {
        expect(baseCurve(nodes, { interpolation: "linear", beyond: "flat" })(strike)).toBeCloseTo(
          linearFlat,
          13,
        );
        expect(baseCurve(nodes, { interpolation: "linear", beyond: "linear" })(strike)).toBeCloseTo(
          linearLinear,
          13,
        );
        expect(baseCurve(nodes, { interpolation: "monotone", beyond: "flat" })(strike)).toBeCloseTo(
          monotoneFlat,
          13,
        );
      }
    }
  });
});
