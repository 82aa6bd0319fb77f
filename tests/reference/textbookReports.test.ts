import { describe, expect, it } from "vitest";
import { brentRoot } from "@/lib/quant/maths/roots";
import { textbookHazard } from "./published/defaultSwaps";
import { alikeRequest, pool2007, quotes2007, reportOf } from "./published/tranches";

// Source: J. Hull, Options, Futures and Other Derivatives (9th–11th ed.), chapter 25. The checks of published.json follow
// his 60-point rule; here the same questions go to the report itself, whose mixture is converged.
describe("TRANCHE: Hull's examples through whole reports", () => {
  it("example 25.2: the 3–6 % tranche of 125 names breaks even at 348 basis points", () => {
    const market = { recovery: 0.4, rate: 0.035 };
    const pool = { ...market, names: 125, hazard: textbookHazard(0.005, { ...market, perYear: 4 }) };
    const { tranches } = reportOf(alikeRequest(pool, 0.15, [[0.03, 0.06]]));
    expect(Math.abs(1e4 * tranches[0]!.parSpread! - 348)).toBeLessThanOrEqual(0.51);
  });

  it("example 25.3: the third of ten names breaks even at 153 basis points", () => {
    const pool = { names: 10, recovery: 0.4, rate: 0.05, hazard: 0.02 };
    const request = alikeRequest(pool, 0.3, []);
    const { nthToDefault } = reportOf({
      ...request,
      schedule: { kind: "even", years: 5, perYear: 1 },
      nthToDefault: [3],
    });
    expect(Math.abs(1e4 * nthToDefault[0]!.parSpread! - 153)).toBeLessThanOrEqual(0.51);
  });
});

describe("IMPLIED: table 25.8 of Hull through whole reports", () => {
  const request = alikeRequest(pool2007, 0.3, []);
  const { tranches } = reportOf({
    ...request,
    tranches: quotes2007.map(({ strikes: [attachment, detachment], running, upfront }, i) => ({
      id: `T${i}`,
      attachment,
      detachment,
      running,
      upfront,
    })),
    include: ["impliedCorrelation"],
  });

  it("compound correlations are 17.7, 7.8, 14.0, 18.2 and 23.3 %", () => {
    const printed = [17.7, 7.8, 14.0, 18.2, 23.3];
    for (const [i, value] of printed.entries()) {
      const found = 100 * tranches[i]!.impliedCorrelation!.solutions[0]!;
      expect(Math.abs(found - value), `tranche ${i} at ${found}`).toBeLessThanOrEqual(0.051);
    }
  });

  // Own finding, confirmed by a trapezoid rule over binomial laws: a 60-point rule, as the book's, sees this root near 95.5 %.
  it("3–6 % has a second one, at 99.946 % once the mixture is converged, that meets the quote", () => {
    const { strikes, running } = quotes2007[1]!;
    const second = tranches[1]!.impliedCorrelation!.solutions[1]!;
    expect(second).toBeCloseTo(0.999457, 5);
    const { parSpread } = reportOf(alikeRequest(pool2007, second, [strikes])).tranches[0]!;
    expect(Math.abs(parSpread! - running)).toBeLessThanOrEqual(1e-10);
  });

  it("the base correlation at 22 %, on the source's rule, is 60.7 % converged: the printed 60.5 is his quadrature", () => {
    let below = 0;
    for (const [i, { strikes }] of quotes2007.entries()) {
      const rho = tranches[i]!.impliedCorrelation!.solutions[0]!;
      const own = reportOf(alikeRequest(pool2007, rho, [strikes])).tranches[0]!;
      below += (strikes[1] - strikes[0]) * own.protectionLeg!;
    }
    const miss = (rho: number) =>
      0.22 * reportOf(alikeRequest(pool2007, rho, [[0, 0.22]])).tranches[0]!.protectionLeg! - below;
    expect(100 * brentRoot(miss, 0.3, 0.9, 1e-6)).toBeCloseTo(60.7, 1);
  });
});
