import { describe, expect, it } from "vitest";
import { marketDrivers, nameDrivers, SPREAD_SCALES } from "@/lib/pricing/drivers";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";
import { noShock } from "@/lib/pricing/shock";
import { shockedFigures } from "@/lib/pricing/shockedFigures";

const request: PricingRequest = {
  format: 1,
  currency: "EUR",
  pricingDate: "2026-11-30",
  schedule: { kind: "standard", maturity: "2031-12-20", holidays: [] },
  discount: { kind: "flat", rate: 0.02 },
  pool: Array.from({ length: 8 }, (_, i) => ({
    id: `N${i}`,
    notional: 1_000_000,
    recovery: 0.4,
    credit:
      i === 7
        ? { kind: "defaulted" as const }
        : { kind: "spread" as const, nodes: [{ years: 5, spread: 0.01 + 0.002 * i }] },
  })),
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [
    { id: "low", attachment: 0.1, detachment: 0.2, running: 0.05 },
    { id: "all", attachment: 0, detachment: 1, running: 0.01, recoveryPaydown: true },
  ],
  include: ["sensitivities"],
};

describe("drivers", () => {
  const market = marketDrivers(request);
  if (!market.ok) throw new Error("The test's own request is refused.");

  it("are the sensitivities of the report, whole and in pieces, to the bit", () => {
    const priced = price(request);
    const reported = priced.ok ? priced.report.sensitivities! : [];
    const names = [
      [0, 1, 2],
      [3, 4, 5, 6, 7],
    ].flatMap((places) => {
      const answer = nameDrivers(request, places);
      return answer.ok ? answer.names : [];
    });
    for (const [i, { byName, ...whole }] of reported.entries()) {
      expect(market.classes[i]).toMatchObject(whole);
      expect(
        names.map(({ id, spread01, jumpToDefault }) => ({
          id,
          spread01: spread01[i],
          jumpToDefault: jumpToDefault[i],
        })),
      ).toEqual(byName);
    }
    expect(names[7]).toMatchObject({ spread01: [null, null], jumpToDefault: [null, null] });
  });

  it("show convexity as the value's move under a common factor on every spread", () => {
    for (const [k, scale] of SPREAD_SCALES.entries()) {
      const moved = shockedFigures(request, { ...noShock, scale });
      const still = shockedFigures(request, noShock);
      if (!moved.ok || !still.ok) throw new Error("refused");
      for (const [i, { scaled }] of market.classes.entries())
        expect(scaled[k]).toBe(moved.classes[i]!.value! - still.classes[i]!.value!);
    }
  });

  it("hedge the whole pool by nearly itself, and a thin class by several times its notional", () => {
    // The class from 0 to 1 is the pool contract, but for its coupon: at its par spread the ratio is one.
    const par = price(request);
    const running = par.ok ? par.report.tranches[1]!.parSpread! : 0;
    const atPar = marketDrivers({
      ...request,
      tranches: [request.tranches[0]!, { ...request.tranches[1]!, running }],
    });
    expect(atPar.ok && atPar.classes[1]!.hedgeRatio).toBeCloseTo(1, 6);
    expect(atPar.ok && atPar.classes[0]!.hedgeRatio).toBeGreaterThan(1);
  });

  it("hedge a pool of one name by that name's own contract, notional for notional", () => {
    const alone = {
      ...request,
      pool: [request.pool[0]!],
      tranches: [{ id: "all", attachment: 0, detachment: 1, recoveryPaydown: true }],
    };
    const answer = nameDrivers(alone, [0]);
    const [hedge] = answer.ok ? answer.names[0]!.hedge : [null];
    // The tranche takes defaults at the middle of each period, the name's contract in continuous time: they differ a little.
    expect(hedge! / 1_000_000).toBeGreaterThan(0.995);
    expect(hedge! / 1_000_000).toBeLessThan(1.005);
    const defaulted = nameDrivers(request, [7]);
    expect(defaulted.ok && defaulted.names[0]!.hedge).toEqual([null, null]);
  });
});
