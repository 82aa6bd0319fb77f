import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { LargestErrors } from "../support/largestErrors";
import { Exact, exactIndependentLaw, exactly, relativeError } from "./highPrecision";

const errors = new LargestErrors("Independent names against decimal.js at 50 digits");
afterAll(() => errors.print());

const names = fc.array(
  fc.record({ steps: fc.integer({ min: 1, max: 6 }), rate: fc.constantFrom(1e-6, 0.003, 0.02, 0.3, 2.3) }),
  { minLength: 1, maxLength: 14 },
);

describe("LAW: at ρ = 0 the loss law is the convolution of the names', worked out at 50 digits", () => {
  it("mass by mass to 3e-15, E[min(L, K)] to 1e-15, tails down to 1e-15 to 1e-12 relative", () => {
    fc.assert(
      fc.property(names, fc.double({ min: 0.02, max: 0.98, noNaN: true }), (pool, strike) => {
        const outcome = price({
          format: 1,
          schedule: { kind: "even", years: 1, perYear: 1 },
          discount: { kind: "flat", rate: 0 },
          pool: pool.map(({ steps, rate }, i) => ({
            id: `N${i}`,
            notional: steps,
            recovery: 0,
            credit: { kind: "hazard", rate },
          })),
          correlation: { kind: "flat", rho: 0 },
          tranches: [
            { id: "below", attachment: 0, detachment: strike },
            { id: "above", attachment: strike, detachment: 1 },
          ],
          include: ["lossLaw"],
        });
        if (!outcome.ok) throw new Error(outcome.problems[0]!.message);
        const { lossLaw, tranches, pool: figures } = outcome.report;
        const exact = exactIndependentLaw(
          pool.map(({ steps, rate }) => ({ steps, probability: new Exact(1).minus(exactly(-rate).exp()) })),
        );
        const total = pool.reduce((sum, { steps }) => sum + steps, 0);
        const below = exact.reduce(
          (sum, mass, u) => sum.plus(mass.times(Exact.min(new Exact(u).div(total), strike))),
          new Exact(0),
        );
        const error = below.div(strike).minus(tranches[0]!.expectedLoss!).abs().toNumber() * strike;
        errors.note("E[min(L, K)], absolute", error, 1e-15, `K = ${strike}`);
        expect(error).toBeLessThanOrEqual(1e-15);
        const tail = exact.reduce(
          (sum, mass, u) => (u / total > strike + 1e-9 ? sum.plus(mass) : sum),
          new Exact(0),
        );
        const isAtStrike = exact.some((_, u) => Math.abs(u / total - strike) <= 1e-9);
        if (!isAtStrike && tail.gt(1e-15)) {
          const relative = relativeError(tranches[1]!.hitProbability!, tail);
          errors.note("P(L > K), relative", relative, 1e-12, `K = ${strike}`);
          expect(relative).toBeLessThanOrEqual(1e-12);
        }
        if (figures.unit === null) return;
        const steps = 1 / (lossLaw!.unit! * total);
        for (const [u, mass] of exact.entries()) {
          const isOnGrid = Math.abs(u * steps - Math.round(u * steps)) < 1e-9;
          const found = isOnGrid ? (lossLaw!.probabilities[Math.round(u * steps)] ?? 0) : 0;
          const difference = mass.minus(found).abs().toNumber();
          errors.note("mass, absolute", difference, 3e-15, `${u} of ${total}`);
          expect(difference).toBeLessThanOrEqual(3e-15);
        }
      }),
      { numRuns: 200 },
    );
  });
});
