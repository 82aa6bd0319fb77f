import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { attribute } from "@/lib/pricing/attribution";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";
import { aName } from "../support/builders";

const before: PricingRequest = {
  format: 1,
  pricingDate: "2026-12-01",
  schedule: { kind: "standard", maturity: "2031-12-20", holidays: [] },
  discount: { kind: "flat", rate: 0.02 },
  pool: ["A", "B", "C", "D"].map((id) => aName({ id })),
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [
    { id: "low", attachment: 0, detachment: 0.15, running: 0.05 },
    { id: "high", attachment: 0.15, detachment: 0.6, running: 0.01 },
  ],
};

function valueIn(request: PricingRequest, id: string): number {
  const outcome = price(request);
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  return outcome.report.tranches.find((tranche) => tranche.id === id)?.sellerValue ?? 0;
}

function attributed(from: PricingRequest, to: PricingRequest) {
  const answer = attribute(from, to);
  if (!answer.ok) throw new Error(answer.problems[0]?.message);
  return answer.attribution;
}

describe("what moved a value", () => {
  test("is told part by part in the stated order, only for parts that changed, and sums to the whole change", () => {
    const after: PricingRequest = {
      ...before,
      pool: before.pool.map((name) =>
        name.id === "A"
          ? { ...name, recovery: 0.3 }
          : { ...name, credit: { kind: "spread", nodes: [{ years: 5, spread: 0.012 }] } },
      ),
      correlation: { kind: "flat", rho: 0.35 },
      pricingDate: "2026-12-02",
    };
    const { steps } = attributed(before, after);
    expect(steps.map(({ movers }) => movers)).toEqual([["names"], ["spreads"], ["correlation"], ["time"]]);
    const sum = steps.reduce((total, { byClass }) => total + (byClass.low ?? 0), 0);
    expect(sum).toBeCloseTo(valueIn(after, "low") - valueIn(before, "low"), 6);
  });

  test("each step is the value with the part taken over less the value without it", () => {
    const after: PricingRequest = {
      ...before,
      discount: { kind: "flat", rate: 0.03 },
      correlation: { kind: "flat", rho: 0.5 },
    };
    const { steps } = attributed(before, after);
    const between = valueIn({ ...before, discount: after.discount }, "high");
    expect(steps[0]?.byClass.high).toBe(between - valueIn(before, "high"));
    expect(steps[1]?.byClass.high).toBe(valueIn(after, "high") - between);
  });

  test("nothing changed, nothing moved", () => {
    expect(attributed(before, { ...before, include: ["lossLaw"] }).steps).toEqual([]);
  });

  test("a class that only one request has comes or goes with the structure, from or to nothing", () => {
    const after: PricingRequest = { ...before, tranches: before.tranches.slice(0, 1) };
    const { steps } = attributed(before, after);
    expect(steps).toEqual([{ movers: ["structure"], byClass: { low: 0, high: -valueIn(before, "high") } }]);
  });

  test("a step that cannot be priced by itself is taken together with the next", () => {
    const from: PricingRequest = {
      ...before,
      pool: before.pool.map((name) => ({ ...name, loading: 0.5 })),
      correlation: { kind: "loadings" },
    };
    const { steps } = attributed(from, before);
    expect(steps.map(({ movers }) => movers)).toEqual([["names", "correlation"]]);
    expect(steps[0]?.byClass.low).toBe(valueIn(before, "low") - valueIn(from, "low"));
  });

  test("a request that is refused tells its problems", () => {
    const answer = attribute(before, {
      ...before,
      tranches: [{ id: "x", attachment: 0.2, detachment: 0.1 }],
    });
    expect(answer.ok ? [] : answer.problems.map(({ path }) => path)).toContain("tranches.0");
  });

  test("whatever moves, the steps of every class sum to its whole change", () => {
    const parts = fc.record({
      rate: fc.double({ min: -0.01, max: 0.08, noNaN: true }),
      rho: fc.double({ min: 0, max: 0.9, noNaN: true }),
      spread: fc.double({ min: 0.001, max: 0.08, noNaN: true }),
      edge: fc.double({ min: 0.05, max: 0.5, noNaN: true }),
    });
    fc.assert(
      fc.property(parts, ({ rate, rho, spread, edge }) => {
        const after: PricingRequest = {
          ...before,
          discount: { kind: "flat", rate },
          correlation: { kind: "flat", rho },
          pool: [
            ...before.pool.slice(1),
            aName({ id: "E", credit: { kind: "spread", nodes: [{ years: 5, spread }] } }),
          ],
          tranches: [{ id: "low", attachment: 0, detachment: edge, running: 0.04 }],
        };
        const { steps, before: from, after: to } = attributed(before, after);
        for (const id of ["low", "high"]) {
          const sum = steps.reduce((total, { byClass }) => total + (byClass[id] ?? 0), 0);
          expect(Math.abs(sum - ((to[id] ?? 0) - (from[id] ?? 0)))).toBeLessThan(1e-7);
        }
      }),
      { numRuns: 25 },
    );
  });
});
