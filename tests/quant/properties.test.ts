import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";

const pools = fc.array(
  fc.record({
    notional: fc.integer({ min: 1, max: 10 }),
    recovery: fc.constantFrom(0, 0.2, 0.4, 0.9),
    rate: fc.constantFrom(0, 1e-6, 0.005, 0.02, 0.4),
  }),
  { minLength: 1, maxLength: 25 },
);
const correlations = fc.constantFrom(0, 0.05, 0.3, 0.7, 0.999, 1);

interface Drawn {
  readonly notional: number;
  readonly recovery: number;
  readonly rate: number;
}

function requestOf(
  pool: readonly Drawn[],
  rho: number,
  strikes: readonly number[],
  more: Partial<PricingRequest> = {},
): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years: 2, perYear: 1 },
    discount: { kind: "flat", rate: 0.02 },
    pool: pool.map(({ notional, recovery, rate }, i) => ({
      id: `N${i}`,
      notional,
      recovery,
      credit: { kind: "hazard", rate },
    })),
    correlation: { kind: "flat", rho },
    tranches: strikes.slice(1).map((detachment, i) => ({
      id: `T${i}`,
      attachment: strikes[i]!,
      detachment,
      running: 0.01,
      upfront: 0,
    })),
    ...more,
  };
}

function reportOf(request: PricingRequest): PricingReport {
  const outcome = price(request);
  if (!outcome.ok) throw new Error(outcome.problems.map((problem) => problem.message).join(" "));
  return outcome.report;
}

const strikes = [0, 0.02, 0.05, 0.1, 0.2, 0.35, 0.6, 1];

describe("LAW: the loss law of random pools", () => {
  it("has mass one and the mean Σ l p, both within 1e-12", () => {
    fc.assert(
      fc.property(pools, correlations, (pool, rho) => {
        const { lossLaw, pool: figures } = reportOf(requestOf(pool, rho, [0, 1], { include: ["lossLaw"] }));
        const { unit, probabilities } = lossLaw!;
        const mass = probabilities.reduce((sum, probability) => sum + probability, 0);
        const mean = probabilities.reduce((sum, probability, u) => sum + probability * u * unit!, 0);
        expect(Math.abs(mass - 1)).toBeLessThanOrEqual(1e-12);
        expect(Math.abs(mean - figures.expectedLoss)).toBeLessThanOrEqual(1e-12);
      }),
      { numRuns: 60 },
    );
  });
});

describe("TRANCHE: classes that share the pool out between them", () => {
  it("lose together what the pool loses, and E[min(L, K)] is concave in K", () => {
    fc.assert(
      fc.property(pools, correlations, (pool, rho) => {
        const { tranches, pool: figures } = reportOf(requestOf(pool, rho, strikes));
        const sum = tranches.reduce(
          (total, tranche) => total + tranche.expectedLoss! * (tranche.detachment - tranche.attachment),
          0,
        );
        expect(Math.abs(sum - figures.expectedLoss)).toBeLessThanOrEqual(1e-11);
        for (const [i, tranche] of tranches.entries()) {
          expect(tranche.expectedLoss).toBeGreaterThanOrEqual(0);
          if (i > 0)
            expect(tranche.expectedLoss!).toBeLessThanOrEqual(tranches[i - 1]!.expectedLoss! + 1e-11);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("split in two, lose the same together", () => {
    fc.assert(
      fc.property(
        pools,
        correlations,
        fc.double({ min: 0.011, max: 0.49, noNaN: true }),
        (pool, rho, cut) => {
          const whole = reportOf(requestOf(pool, rho, [0.01, 0.5])).tranches[0]!.expectedLoss! * 0.49;
          const parts = reportOf(requestOf(pool, rho, [0.01, cut, 0.5])).tranches.map(
            (tranche) => tranche.expectedLoss! * (tranche.detachment - tranche.attachment),
          );
          expect(Math.abs(parts[0]! + parts[1]! - whole)).toBeLessThanOrEqual(1e-11);
        },
      ),
      { numRuns: 40 },
    );
  });

  it("do not change when the names are permuted, to 1e-13", () => {
    fc.assert(
      fc.property(pools, correlations, (pool, rho) => {
        const one = reportOf(requestOf(pool, rho, strikes));
        const other = reportOf(requestOf([...pool].reverse(), rho, strikes));
        for (const [i, tranche] of one.tranches.entries()) {
          expect(Math.abs(tranche.expectedLoss! - other.tranches[i]!.expectedLoss!)).toBeLessThanOrEqual(
            1e-13,
          );
        }
      }),
      { numRuns: 40 },
    );
  });
});

describe("CORRELATION: where the closed forms are known", () => {
  const alike = Array.from({ length: 4 }, () => ({ notional: 1, recovery: 0, rate: 0.1 }));
  const p = 1 - Math.exp(-0.2);

  it("ρ = 0: the number of defaults is binomial", () => {
    const { lossLaw } = reportOf(requestOf(alike, 0, [0, 1], { include: ["lossLaw"] }));
    const binomial = [1, 4, 6, 4, 1].map((ways, k) => ways * p ** k * (1 - p) ** (4 - k));
    for (const [k, probability] of binomial.entries())
      expect(lossLaw!.probabilities[k]).toBeCloseTo(probability, 13);
  });

  it("ρ = 1: all or none", () => {
    const { lossLaw } = reportOf(requestOf(alike, 1, [0, 1], { include: ["lossLaw"] }));
    expect(lossLaw!.probabilities[0]).toBeCloseTo(1 - p, 13);
    expect(lossLaw!.probabilities[4]).toBeCloseTo(p, 13);
  });

  it("a higher correlation takes loss from the equity and gives it to the senior class", () => {
    const pool = Array.from({ length: 20 }, () => ({ notional: 1, recovery: 0.4, rate: 0.03 }));
    const [low, high] = [0.1, 0.6].map((rho) => reportOf(requestOf(pool, rho, [0, 0.06, 0.3, 1])).tranches);
    expect(high![0]!.expectedLoss!).toBeLessThan(low![0]!.expectedLoss!);
    expect(high![2]!.expectedLoss!).toBeGreaterThan(low![2]!.expectedLoss!);
  });

  it("the finite pool goes to the large pool as names are added", () => {
    const gap = (count: number) => {
      const pool = Array.from({ length: count }, () => ({ notional: 1, recovery: 0.4, rate: 0.02 }));
      const finite = reportOf(requestOf(pool, 0.3, [0, 0.06])).tranches[0]!.expectedLoss!;
      const large = reportOf(requestOf(pool, 0.3, [0, 0.06], { law: { kind: "largePool" } })).tranches[0]!
        .expectedLoss!;
      return Math.abs(finite - large);
    };
    expect(gap(200)).toBeLessThan(gap(50));
    expect(gap(50)).toBeLessThan(gap(10));
  });
});

describe("BASKET: n-th to default", () => {
  it("the probabilities of at least n defaults sum to the expected number of defaults", () => {
    fc.assert(
      fc.property(
        pools.filter((pool) => pool.length <= 8),
        correlations,
        (pool, rho) => {
          const report = reportOf(requestOf(pool, rho, [0, 1], { nthToDefault: pool.map((_, i) => i + 1) }));
          const sum = report.nthToDefault.reduce((total, contract) => total + contract.probability, 0);
          expect(Math.abs(sum - report.pool.defaultsExpected)).toBeLessThanOrEqual(1e-10);
        },
      ),
      { numRuns: 30 },
    );
  });
});

describe("IMPLIED: a model price gives its correlation back", () => {
  it("for an equity class, to 1e-9", () => {
    const pool = Array.from({ length: 10 }, () => ({ notional: 1, recovery: 0.4, rate: 0.03 }));
    const request = requestOf(pool, 0.37, [0, 0.12]);
    const upfront = reportOf(request).tranches[0]!.upfrontAtRunning!;
    const quoted = {
      ...request,
      tranches: [{ ...request.tranches[0]!, upfront }],
      include: ["impliedCorrelation" as const],
    };
    const { solutions } = reportOf(quoted).tranches[0]!.impliedCorrelation!;
    expect(solutions).toHaveLength(1);
    expect(solutions[0]).toBeCloseTo(0.37, 9);
  });
});

describe("AUDIT: the characteristic function agrees with the recursion", () => {
  it("to 1e-11 on an exact lattice, and the stated bound is honest", () => {
    const pool = Array.from({ length: 20 }, (_, i) => ({
      notional: 1 + (i % 3),
      recovery: 0.4,
      rate: 0.01 + 0.003 * i,
    }));
    const report = reportOf(requestOf(pool, 0.3, [0, 0.05, 0.2], { include: ["audit"] }));
    expect(report.audit!.figures.length).toBeGreaterThan(4);
    for (const { difference } of report.audit!.figures)
      expect(Math.abs(difference)).toBeLessThanOrEqual(1e-11);
    expect(report.numericalError).toBeLessThan(1e-9);
  });
});
