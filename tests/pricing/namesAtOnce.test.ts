import { describe, expect, it } from "vitest";
import { namesAtOnce } from "@/lib/pricing/namesAtOnce";
import type { NameInput, PricingRequest } from "@/lib/pricing/request";
import { values, withCoupons } from "@/lib/pricing/revaluation";
import { namesOneByOne } from "@/lib/pricing/sensitivitySection";
import { valuationOf } from "@/lib/pricing/valuation";

/** Sixteen names from 60 to 900 bp, one quoted by upfront, one by default probabilities, one in default. */
function aPool(isMixed: boolean): NameInput[] {
  return Array.from({ length: 16 }, (_, i) => ({
    id: `N${i}`,
    notional: isMixed ? 1_000_000 + 31_013 * i : 1_000_000,
    recovery: isMixed ? 0.2 + ((5 * i) % 16) / 40 : 0.4,
    loading: i % 5 === 0 ? 0.2 : 0.55,
    credit: creditOf(i),
  }));
}

function creditOf(i: number): NameInput["credit"] {
  if (i === 3) return { kind: "upfront", years: 5, upfront: 0.04, coupon: 0.01 };
  if (i === 5)
    return {
      kind: "cumulative",
      nodes: [
        { years: 1, probability: 0.02 },
        { years: 3, probability: 0.09 },
      ],
    };
  if (i === 7) return { kind: "defaulted" };
  const spread = 0.006 + 0.0056 * i;
  return {
    kind: "spread",
    nodes: [
      { years: 3, spread },
      { years: 5, spread: spread * 1.1 },
    ],
  };
}

const base: PricingRequest["correlation"] = {
  kind: "base",
  interpolation: "linear",
  beyond: "flat",
  mapping: "none",
  nodes: [
    { strike: 0.1, rho: 0.2 },
    { strike: 0.3, rho: 0.6 },
  ],
};

function aRequest(isMixed: boolean, correlation: PricingRequest["correlation"]): PricingRequest {
  const boundaries = [0, 0.06, 0.15, 0.32, 1];
  return {
    format: 1,
    pricingDate: "2026-11-30",
    schedule: { kind: "standard", maturity: "2028-06-20", holidays: [] },
    discount: { kind: "flat", rate: 0.02 },
    pool: aPool(isMixed),
    correlation,
    // An imposed unit keeps the mixed pool's grid coarse: both ways of working stand on the same one.
    law: isMixed ? { kind: "finite", unit: 0.0002 } : { kind: "finite" },
    tranches: boundaries.slice(1).map((detachment, i) => ({
      id: `class ${i + 1}`,
      attachment: boundaries[i]!,
      detachment,
      running: 0.03,
    })),
  };
}

/** Whether two values agree to 1e-4 of their size or 1e-8 of notional, whichever is larger. */
function expectAgreement(found: number | null, wanted: number | null, notional: number) {
  if (wanted === null) expect(found).toBeNull();
  else
    expect(Math.abs(found! - wanted)).toBeLessThanOrEqual(Math.max(1e-4 * Math.abs(wanted), 1e-8 * notional));
}

describe("names taken all at once", () => {
  it.each([
    {
      words: "a lattice at a flat correlation",
      isMixed: false,
      correlation: { kind: "flat" as const, rho: 0.35 },
    },
    {
      words: "a mixed pool near correlation one",
      isMixed: true,
      correlation: { kind: "flat" as const, rho: 0.9 },
    },
    { words: "independent names", isMixed: false, correlation: { kind: "flat" as const, rho: 0 } },
    { words: "names with loadings of their own", isMixed: true, correlation: { kind: "loadings" as const } },
    { words: "a base curve", isMixed: false, correlation: base },
  ])("equal full bumps of each name, spread and default, for $words", ({ isMixed, correlation }) => {
    const valuation = withCoupons(valuationOf(aRequest(isMixed, correlation), [])!);
    const today = values(valuation);
    const every = valuation.names.map((_, i) => i);
    const atOnce = namesAtOnce(valuation, today, every)!;
    const sampled = [0, 3, 5, 7, 15];
    const oneByOne = namesOneByOne(valuation, today, sampled);
    expect(atOnce.map(({ id }) => id)).toEqual(valuation.names.map(({ id }) => id));
    for (const [q, i] of sampled.entries())
      for (const t of today.keys()) {
        expectAgreement(atOnce[i]!.spread01[t]!, oneByOne[q]!.spread01[t]!, valuation.portfolio.notional);
        expectAgreement(
          atOnce[i]!.jumpToDefault[t]!,
          oneByOne[q]!.jumpToDefault[t]!,
          valuation.portfolio.notional,
        );
      }
  });

  it("are left to full valuations where one pass is not exact", () => {
    const sectors = aRequest(false, { kind: "sector", within: 0.4, between: 0.2 });
    const mapped = aRequest(false, { ...base, mapping: "moneyness" });
    const large: PricingRequest = {
      ...aRequest(false, { kind: "flat", rho: 0.3 }),
      law: { kind: "largePool" },
    };
    for (const request of [sectors, mapped, large]) {
      const valuation = withCoupons(valuationOf(request, [])!);
      expect(namesAtOnce(valuation, values(valuation), [0])).toBeNull();
    }
  });
});
