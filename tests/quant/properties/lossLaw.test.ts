import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  classes,
  markets,
  onePeriod,
  pools,
  poolsWithDependence,
  reportOf,
  requestOf,
  rhos,
  runs,
  strikeLadders,
} from "./draws";

const equities = (strikes: readonly number[]) =>
  strikes.map((detachment, i) => ({ id: `K${i}`, attachment: 0, detachment }));

/** E[min(L, K)] of several strikes, fractions of the pool. */
function minima(request: Parameters<typeof reportOf>[0]): number[] {
  return reportOf(request).tranches.map(({ expectedLoss, detachment }) => expectedLoss! * detachment);
}

describe("LAW: the loss law of random pools", () => {
  it("has mass one, no negative mass and the mean Σ l p, within 1e-12", () => {
    fc.assert(
      fc.property(markets, poolsWithDependence(14), (market, [pool, correlation]) => {
        const { lossLaw, pool: figures } = reportOf(
          requestOf(market, pool, correlation, { include: ["lossLaw"] }),
        );
        const { unit, probabilities } = lossLaw!;
        const mass = probabilities.reduce((sum, probability) => sum + probability, 0);
        const mean = probabilities.reduce((sum, probability, u) => sum + probability * u * unit!, 0);
        expect(Math.abs(mass - 1)).toBeLessThanOrEqual(1e-12);
        expect(Math.abs(mean - figures.expectedLoss)).toBeLessThanOrEqual(1e-12);
        expect(Math.min(...probabilities)).toBeGreaterThanOrEqual(0);
      }),
      runs(60),
    );
  });

  it("E[min(L, K)] rises in K, is concave, has a slope within [0, 1], and ends at the expected loss", () => {
    fc.assert(
      fc.property(poolsWithDependence(20), strikeLadders, ([pool, correlation], strikes) => {
        const request = requestOf(onePeriod, pool, correlation, { tranches: equities(strikes.slice(1)) });
        const values = [0, ...minima(request)];
        let before = 1;
        for (const [i, value] of values.entries()) {
          if (i === 0) continue;
          const width = strikes[i]! - strikes[i - 1]!;
          const slope = (value - values[i - 1]!) / width;
          expect(slope).toBeGreaterThanOrEqual(-1e-11 / width);
          expect(slope).toBeLessThanOrEqual(before + 2e-11 / width);
          before = slope;
        }
        expect(
          Math.abs(values[values.length - 1]! - reportOf(request).pool.expectedLoss),
        ).toBeLessThanOrEqual(1e-11);
      }),
      runs(90),
    );
  });

  it("does not change when the names are permuted, to 1e-13", () => {
    fc.assert(
      fc.property(
        poolsWithDependence(20).chain(([pool, correlation]) =>
          fc.tuple(
            fc.constant(pool),
            fc.shuffledSubarray(pool, { minLength: pool.length }),
            fc.constant(correlation),
          ),
        ),
        strikeLadders,
        ([pool, shuffled, correlation], strikes) => {
          const [one, other] = [pool, shuffled].map((names) =>
            minima(requestOf(onePeriod, names, correlation, { tranches: equities(strikes.slice(1)) })),
          );
          for (const [i, value] of one!.entries())
            expect(Math.abs(value - other![i]!)).toBeLessThanOrEqual(1e-13);
        },
      ),
      runs(90),
    );
  });

  it("its variance is that of the pairs: Σ l² p(1 − p) + Σ l l′ (P(both) − p p′), Φ₂ against the mixture", () => {
    fc.assert(
      fc.property(poolsWithDependence(12), ([pool, correlation]) => {
        const request = requestOf(onePeriod, pool, correlation, {
          tranches: [{ id: "all", attachment: 0, detachment: 1 }],
          include: ["pairs"],
        });
        const { pairs, tranches } = reportOf(request);
        const notional = pool.reduce((sum, name) => sum + name.notional, 0);
        const losses = pool.map((name) => (name.notional * (1 - name.recovery)) / notional);
        let variance = 0;
        for (const [i, row] of pairs!.jointDefault.entries())
          for (const [j, joint] of row.entries())
            variance += losses[i]! * losses[j]! * (joint - row[i]! * pairs!.jointDefault[j]![j]!);
        expect(Math.abs(tranches[0]!.standardDeviation! ** 2 - variance)).toBeLessThanOrEqual(1e-10);
      }),
      runs(90),
    );
  });
});

describe("CORRELATION: the ends and the order", () => {
  it("ρ = 1: names default in the order of their probabilities, on one uniform draw", () => {
    fc.assert(
      fc.property(pools(20), strikeLadders, (pool, strikes) => {
        const correlation = { kind: "flat" as const, rho: 1 };
        const tranches = equities(strikes.slice(1));
        const found = minima(requestOf(onePeriod, pool, correlation, { tranches }));
        const single = (name: (typeof pool)[number]) =>
          reportOf(requestOf(onePeriod, [name], correlation)).pool.defaultsExpected;
        const notional = pool.reduce((sum, name) => sum + name.notional, 0);
        const falling = pool
          .map((name) => ({
            probability: single(name),
            loss: (name.notional * (1 - name.recovery)) / notional,
          }))
          .sort((one, other) => other.probability - one.probability);
        for (const [k, { detachment }] of tranches.entries()) {
          let lost = 0;
          let expected = 0;
          for (const [i, { probability, loss }] of falling.entries()) {
            lost += loss;
            expected += Math.min(lost, detachment) * (probability - (falling[i + 1]?.probability ?? 0));
          }
          expect(Math.abs(found[k]! - expected)).toBeLessThanOrEqual(1e-12);
        }
      }),
      runs(90),
    );
  });

  it("ρ = 0 is every other way to say independence: loadings of zero, and sectors without correlation", () => {
    fc.assert(
      fc.property(pools(20, "lattice"), strikeLadders, (pool, strikes) => {
        const free = pool.map((name) => ({ ...name, loading: 0 }));
        const tranches = equities(strikes.slice(1));
        const flat = minima(requestOf(onePeriod, free, { kind: "flat", rho: 0 }, { tranches }));
        const loadings = minima(requestOf(onePeriod, free, { kind: "loadings" }, { tranches }));
        const sectors = minima(
          requestOf(onePeriod, free, { kind: "sector", within: 0, between: 0 }, { tranches }),
        );
        for (const [i, value] of flat.entries()) {
          expect(Math.abs(value - loadings[i]!)).toBeLessThanOrEqual(1e-12);
          expect(Math.abs(value - sectors[i]!)).toBeLessThanOrEqual(1e-12);
        }
      }),
      runs(60),
    );
  });

  it("one loading √ρ for all, or one correlation within and across sectors, is the flat correlation ρ", () => {
    fc.assert(
      fc.property(
        pools(20, "lattice"),
        fc.constantFrom(0.05, 0.3, 0.8),
        strikeLadders,
        (pool, rho, strikes) => {
          const loaded = pool.map((name) => ({ ...name, loading: Math.sqrt(rho) }));
          const tranches = equities(strikes.slice(1));
          const flat = minima(requestOf(onePeriod, loaded, { kind: "flat", rho }, { tranches }));
          const loadings = minima(requestOf(onePeriod, loaded, { kind: "loadings" }, { tranches }));
          const sectors = minima(
            requestOf(onePeriod, loaded, { kind: "sector", within: rho, between: rho }, { tranches }),
          );
          for (const [i, value] of flat.entries()) {
            expect(Math.abs(value - loadings[i]!)).toBeLessThanOrEqual(1e-10);
            expect(Math.abs(value - sectors[i]!)).toBeLessThanOrEqual(1e-10);
          }
        },
      ),
      runs(60),
    );
  });

  it("loadings all turned round give the same law: the factor is symmetric", () => {
    fc.assert(
      fc.property(pools(20), strikeLadders, (pool, strikes) => {
        const tranches = equities(strikes.slice(1));
        const turned = pool.map((name) => ({ ...name, loading: -name.loading! }));
        const [one, other] = [pool, turned].map((names) =>
          minima(requestOf(onePeriod, names, { kind: "loadings" }, { tranches })),
        );
        for (const [i, value] of one!.entries())
          expect(Math.abs(value - other![i]!)).toBeLessThanOrEqual(1e-11);
      }),
      runs(60),
    );
  });

  it("more correlation takes from every E[min(L, K)]: equity gains and senior loses, pool by pool", () => {
    fc.assert(
      fc.property(pools(14), rhos, rhos, strikeLadders, (pool, one, other, strikes) => {
        const [low, high] = [Math.min(one, other), Math.max(one, other)].map((rho) =>
          minima(requestOf(onePeriod, pool, { kind: "flat", rho }, { tranches: equities(strikes.slice(1)) })),
        );
        for (const [i, value] of low!.entries()) expect(high![i]!).toBeLessThanOrEqual(value + 1e-8);
      }),
      runs(60),
    );
  });
});

describe("LARGE: many small names", () => {
  it("each doubling of alike names brings E[min(L, K)] up towards the large pool, never past it", () => {
    const rates = fc.constantFrom(0.002, 0.02, 0.15);
    fc.assert(
      fc.property(
        rates,
        fc.constantFrom(0, 0.4, 0.9),
        fc.constantFrom(0.05, 0.3, 0.7, 0.95),
        (rate, recovery, rho) => {
          const strike = 0.3 * (1 - recovery);
          const at = (count: number, law: "finite" | "largePool") => {
            const pool = Array.from({ length: count }, (_, i) => ({
              id: `N${i}`,
              notional: 1,
              recovery,
              credit: { kind: "hazard" as const, rate },
            }));
            const more = { tranches: equities([strike]), law: { kind: law } };
            return minima(requestOf(onePeriod, pool, { kind: "flat", rho }, more))[0]!;
          };
          const limit = at(1, "largePool");
          const values = [5, 10, 20, 40, 80, 160].map((count) => at(count, "finite"));
          for (const [i, value] of values.entries()) {
            expect(value).toBeLessThanOrEqual(limit + 1e-10);
            if (i > 0) expect(value).toBeGreaterThanOrEqual(values[i - 1]! - 1e-10);
          }
          const [gap, half] = [limit - values[4]!, limit - values[5]!];
          if (gap > 1e-7) expect(half / gap).toBeLessThanOrEqual(0.62);
        },
      ),
      runs(18),
    );
  });
});

describe("TRANCHE: quantiles, hits and moments fit one another", () => {
  it("hit ≥ expected loss ≥ exhaustion; the deviation is at most that of all or nothing; shortfalls lie above quantiles", () => {
    fc.assert(
      fc.property(poolsWithDependence(20), strikeLadders, ([pool, correlation], strikes) => {
        for (const tranche of reportOf(
          requestOf(onePeriod, pool, correlation, { tranches: classes(strikes) }),
        ).tranches) {
          const { expectedLoss, hitProbability, exhaustionProbability, standardDeviation, quantiles } =
            tranche;
          expect(hitProbability! + 1e-6).toBeGreaterThanOrEqual(expectedLoss!);
          expect(expectedLoss! + 1e-6).toBeGreaterThanOrEqual(exhaustionProbability!);
          const most = Math.max(0, expectedLoss! * (1 - expectedLoss!));
          expect(standardDeviation! ** 2).toBeLessThanOrEqual(most + 1e-7);
          let before = 0;
          for (const { loss, shortfall } of quantiles) {
            expect(loss).toBeGreaterThanOrEqual(before);
            expect(shortfall).toBeGreaterThanOrEqual(loss - 1e-9);
            expect(shortfall).toBeLessThanOrEqual(1 + 1e-9);
            before = loss;
          }
        }
      }),
      runs(90),
    );
  });
});
