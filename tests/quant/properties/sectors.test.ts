import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { onePeriod, poolsInSectors, reportOf, requestOf, runs } from "./draws";

const strikes = [0.04, 0.1, 0.17, 0.33, 0.55, 1];
const tranches = strikes.map((detachment, i) => ({ id: `K${i}`, attachment: 0, detachment }));

describe("LAW: sectors", () => {
  it("mass one, mean Σ l p, E[min(L, K)] concave, its variance that of the pairs", () => {
    fc.assert(
      fc.property(poolsInSectors, ([pool, correlation]) => {
        const report = reportOf(
          requestOf(onePeriod, pool, correlation, { tranches, include: ["lossLaw", "pairs"] }),
        );
        const { unit, probabilities } = report.lossLaw!;
        const mass = probabilities.reduce((sum, probability) => sum + probability, 0);
        const mean = probabilities.reduce((sum, probability, u) => sum + probability * u * unit!, 0);
        expect(Math.abs(mass - 1)).toBeLessThanOrEqual(1e-12);
        expect(Math.abs(mean - report.pool.expectedLoss)).toBeLessThanOrEqual(1e-12);
        const values = [
          0,
          ...report.tranches.map(({ expectedLoss, detachment }) => expectedLoss! * detachment),
        ];
        const slopes = strikes.map(
          (strike, i) => (values[i + 1]! - values[i]!) / (strike - (strikes[i - 1] ?? 0)),
        );
        for (const [i, slope] of slopes.entries())
          expect(slope).toBeLessThanOrEqual((slopes[i - 1] ?? 1) + 1e-9);
        const { jointDefault } = report.pairs!;
        const notional = pool.reduce((sum, name) => sum + name.notional, 0);
        const losses = pool.map((name) => (name.notional * (1 - name.recovery)) / notional);
        let variance = 0;
        for (const [i, row] of jointDefault.entries())
          for (const [j, joint] of row.entries())
            variance += losses[i]! * losses[j]! * (joint - row[i]! * jointDefault[j]![j]!);
        expect(Math.abs(report.tranches[5]!.standardDeviation! ** 2 - variance)).toBeLessThanOrEqual(1e-10);
      }),
      runs(8),
    );
  });

  it("does not change when the names are permuted or the sectors renamed, to 1e-13", () => {
    fc.assert(
      fc.property(poolsInSectors, ([pool, correlation]) => {
        const renamed = [...pool].reverse().map((name) => ({ ...name, sector: `sector ${name.sector}` }));
        const [one, other] = [pool, renamed].map(
          (names) => reportOf(requestOf(onePeriod, names, correlation, { tranches })).tranches,
        );
        for (const [i, { expectedLoss }] of one!.entries())
          expect(Math.abs(expectedLoss! - other![i]!.expectedLoss!)).toBeLessThanOrEqual(1e-13);
      }),
      runs(6),
    );
  });
});
