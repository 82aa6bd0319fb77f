import { describe, expect, it } from "vitest";
import { normalQuantile } from "@/lib/quant/maths/normal";
import { amountGrid } from "@/lib/quant/portfolio/amountGrid";
import { aboveStrike } from "@/lib/quant/portfolio/edgeworth";
import { expectedMinimum } from "@/lib/quant/portfolio/lossLaw";
import { momentLaw } from "@/lib/quant/portfolio/momentMixture";
import { oneFactorLaw } from "@/lib/quant/portfolio/oneFactorLaw";

/** Mixed amounts that sum to 0.55 and default probabilities from 0.2 % to 10 %, drawn by a fixed recurrence. */
function mixedPool(count: number, spread: number) {
  let state = 2024 + count;
  const next = () => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return state / 4294967296;
  };
  const drawn = Array.from({ length: count }, () => 1 + spread * (next() - 0.5));
  const total = drawn.reduce((sum, amount) => sum + amount, 0);
  const amounts = drawn.map((amount) => (0.55 * amount) / total).sort((a, b) => a - b);
  const thresholds = Float64Array.from(amounts, () => normalQuantile(0.002 + 0.1 * next() ** 2));
  return { amounts, thresholds };
}

/** Below this no closer look at the error is asked for. */
const ENOUGH = 1e-7;
const strikes = [0.01, 0.03, 0.06, 0.12, 0.22];

describe("LAW: large pools by their conditional cumulants, against the recursion as audit", () => {
  for (const [count, spread, rho] of [
    [2000, 1.8, 0.3],
    [2000, 0.02, 0.3],
    [2000, 1.8, 0.9],
    [600, 1.8, 0.05],
    [500, 1.8, 0.3],
    [500, 0.02, 0.3],
  ] as const) {
    it(`${count} names, amounts within ${spread}, ρ = ${rho}: E[min(L, K)] differs by less than the stated error`, () => {
      const { amounts, thresholds } = mixedPool(count, spread);
      const names = { thresholds, loadings: new Float64Array(count).fill(Math.sqrt(rho)) };
      const grid = amountGrid(amounts, 3, 8.3e-5);
      const audit = oneFactorLaw(grid, names, { strikes, upTo: 0.22, minimumOnly: true });
      const moments = momentLaw(Float64Array.from(amounts), names, strikes, ENOUGH);
      for (const strike of strikes) {
        const difference = moments.questions.between(0, strike) - expectedMinimum(audit, strike);
        expect(Math.abs(difference)).toBeLessThanOrEqual(moments.error);
      }
    });
  }

  it("takes as many passes over 10,000 names as over 2,000: cost is linear", () => {
    const passes = [2000, 10_000].map((count) => {
      const { amounts, thresholds } = mixedPool(count, 1.8);
      const names = { thresholds, loadings: new Float64Array(count).fill(Math.sqrt(0.3)) };
      return momentLaw(Float64Array.from(amounts), names, strikes, ENOUGH).evaluations;
    });
    expect(passes[1]).toBe(passes[0]);
    expect(passes[0]).toBeLessThanOrEqual(80);
  });

  it("tells mixed amounts from near-lattices of 500 names: 0.1 of the error stated", () => {
    const errors = [1.8, 0.02].map((spread) => {
      const { amounts, thresholds } = mixedPool(500, spread);
      const names = { thresholds, loadings: new Float64Array(500).fill(Math.sqrt(0.3)) };
      return momentLaw(Float64Array.from(amounts), names, [0.03, 0.06, 0.12], ENOUGH).error;
    });
    expect(errors[0]!).toBeLessThan(0.1 * errors[1]!);
  });

  it("states an error above what is allowed where a strike is a few names: the grid then serves", () => {
    const { amounts, thresholds } = mixedPool(500, 1.8);
    const names = { thresholds, loadings: new Float64Array(500).fill(Math.sqrt(0.3)) };
    expect(momentLaw(Float64Array.from(amounts), names, [0.003], ENOUGH).error).toBeGreaterThan(1e-7);
  });

  // Hand-checkable: a Poisson-like sum has skewness s and kurtosis s²; a normal one is the closed form.
  it("is the normal law's closed form without skewness, and its integrals are each other's derivatives", () => {
    const normal = { mean: 0, deviation: 1, skewness: 0, kurtosis: 0 };
    expect(aboveStrike(normal, 0).excess).toBeCloseTo(1 / Math.sqrt(2 * Math.PI), 15);
    expect(aboveStrike(normal, 0).square).toBeCloseTo(0.5, 15);
    const skewed = { mean: 0.1, deviation: 0.02, skewness: 0.2, kurtosis: 0.04 };
    const step = 1e-5;
    for (const strike of [0.06, 0.1, 0.15]) {
      const [below, here, above] = [-step, 0, step].map((by) => aboveStrike(skewed, strike + by));
      expect((below!.excess - above!.excess) / (2 * step)).toBeCloseTo(here!.probability, 6);
      expect((below!.square - above!.square) / (2 * step)).toBeCloseTo(2 * here!.excess, 6);
    }
  });
});
