import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { NameInput } from "@/lib/pricing/request";
import { oneFactor, plainMarket, pools, reportOf, requestOf, runs } from "./draws";

const all = (pool: NameInput[]) => pool.map((_, i) => i + 1);

describe("BASKET: n-th to default", () => {
  it("P(at least n defaults) falls in n and sums to the expected number of defaults", () => {
    fc.assert(
      fc.property(pools(9), oneFactor, (pool, correlation) => {
        const report = reportOf(requestOf(plainMarket, pool, correlation, { nthToDefault: all(pool) }));
        const probabilities = report.nthToDefault.map(({ probability }) => probability);
        const sum = probabilities.reduce((total, probability) => total + probability, 0);
        expect(Math.abs(sum - report.pool.defaultsExpected)).toBeLessThanOrEqual(1e-10);
        for (const [i, probability] of probabilities.entries())
          expect(probability).toBeLessThanOrEqual((probabilities[i - 1] ?? 1) + 1e-12);
      }),
      runs(80),
    );
  });

  it("all contracts together protect what the pool contract does, unequal names or not", () => {
    fc.assert(
      fc.property(pools(7), oneFactor, (pool, correlation) => {
        const report = reportOf(requestOf(plainMarket, pool, correlation, { nthToDefault: all(pool) }));
        const sum = report.nthToDefault.reduce((total, contract) => total + contract.protectionLeg, 0);
        expect(Math.abs(sum / pool.length - report.pool.protectionLeg)).toBeLessThanOrEqual(1e-10);
      }),
      runs(60),
    );
  });

  it("the count is that of the pool's loss law when nothing is recovered and all notionals are equal", () => {
    fc.assert(
      fc.property(pools(9), oneFactor, (pool, correlation) => {
        const equal = pool.map((name) => ({ ...name, notional: 1, recovery: 0 }));
        const report = reportOf(
          requestOf(plainMarket, equal, correlation, { nthToDefault: all(pool), include: ["lossLaw"] }),
        );
        const { unit, probabilities } = report.lossLaw!;
        for (const { n, probability } of report.nthToDefault) {
          const beyond = probabilities.reduce(
            (sum, mass, u) => (Math.round(u * unit! * pool.length) >= n ? sum + mass : sum),
            0,
          );
          expect(Math.abs(beyond - probability)).toBeLessThanOrEqual(1e-11);
        }
      }),
      runs(60),
    );
  });

  it("at ρ = 1 the n-th contract is the n-th riskiest name; at ρ = 0 of alike names the count is binomial", () => {
    fc.assert(
      fc.property(pools(8), (pool) => {
        const correlation = { kind: "flat" as const, rho: 1 };
        const report = reportOf(requestOf(plainMarket, pool, correlation, { nthToDefault: all(pool) }));
        const single = (name: NameInput) =>
          reportOf(requestOf(plainMarket, [name], correlation)).pool.defaultsExpected;
        const falling = pool.map(single).sort((one, other) => other - one);
        for (const [i, { probability }] of report.nthToDefault.entries())
          expect(Math.abs(probability - falling[i]!)).toBeLessThanOrEqual(1e-12);
      }),
      runs(60),
    );
  });
});

describe("PAIRS: joint default and event correlation", () => {
  it("lie within their bounds, max(0, p + p′ − 1) and min(p, p′), and rise with the asset correlation", () => {
    fc.assert(
      fc.property(pools(8), oneFactor, (pool, correlation) => {
        const { jointDefault, eventCorrelation } = reportOf(
          requestOf(plainMarket, pool, correlation, { include: ["pairs"] }),
        ).pairs!;
        for (const [i, row] of jointDefault.entries()) {
          for (const [j, joint] of row.entries()) {
            if (i === j) continue;
            const [p, q] = [row[i]!, jointDefault[j]![j]!];
            expect(joint).toBe(jointDefault[j]![i]);
            expect(joint).toBeLessThanOrEqual(Math.min(p, q) + 1e-15);
            expect(joint).toBeGreaterThanOrEqual(Math.max(0, p + q - 1) - 1e-15);
            const asset =
              correlation.kind === "flat" ? correlation.rho : pool[i]!.loading! * pool[j]!.loading!;
            const event = eventCorrelation[i]![j];
            if (event === null || event === undefined) continue;
            expect(Math.abs(event)).toBeLessThanOrEqual(1 + 1e-12);
            if (asset === 0) expect(Math.abs(joint - p * q)).toBeLessThanOrEqual(1e-15);
            if (Math.abs(asset) > 0.1)
              expect(joint - p * q).toSatisfy((excess: number) => excess * asset >= -1e-15);
          }
        }
      }),
      runs(100),
    );
  });
});
