import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { type QuickCache, quickCache } from "@/lib/pricing/quickCache";
import { quickFigures } from "@/lib/pricing/quickFigures";
import type { PricingRequest, TrancheInput } from "@/lib/pricing/request";

/** Thirty names; alike in size and recovery they stand on a lattice, mixed they do not. */
function aRequest(isMixed: boolean, part: Partial<PricingRequest> = {}): PricingRequest {
  return {
    format: 1,
    pricingDate: "2026-11-30",
    schedule: { kind: "standard", maturity: "2028-12-20", holidays: [] },
    discount: { kind: "flat", rate: 0.02 },
    pool: Array.from({ length: 30 }, (_, i) => ({
      id: `N${i}`,
      notional: isMixed ? 1_000_000 + 13_007 * i : 1_000_000,
      recovery: isMixed ? 0.2 + ((7 * i) % 30) / 100 : 0.4,
      credit: { kind: "spread" as const, nodes: [{ years: 5, spread: 0.004 + 0.0007 * i }] },
    })),
    correlation: { kind: "flat", rho: 0.3 },
    tranches: classes([0, 0.03, 0.07, 0.15, 1]),
    ...part,
  };
}

function classes(boundaries: readonly number[]): TrancheInput[] {
  return boundaries.slice(1).map((detachment, i) => ({
    id: `class ${i + 1}`,
    attachment: boundaries[i]!,
    detachment,
    running: i === 0 ? 0.05 : 0.01,
    upfront: 0.002,
  }));
}

const base = {
  kind: "base",
  interpolation: "monotone",
  beyond: "flat",
  mapping: "none",
  nodes: [
    { strike: 0.03, rho: 0.25 },
    { strike: 0.1, rho: 0.45 },
    { strike: 0.2, rho: 0.62 },
  ],
} as const;

const quotes = [
  { attachment: 0, detachment: 0.05, running: 0.05, upfront: 0.25 },
  { attachment: 0.05, detachment: 0.12, running: 0.05, upfront: 0.0 },
];

/** Greatest difference of the quick figures from those of a full price, by figure. */
function differences(cache: QuickCache | null, moved: PricingRequest) {
  const outcome = price(moved);
  if (!cache || !outcome.ok) throw new Error("no cache, or refused");
  const quick = quickFigures(cache, moved);
  let [loss, probability, money] = [0, 0, 0];
  for (const [i, full] of outcome.report.tranches.entries()) {
    const found = quick[i];
    if (!found) throw new Error(`${full.id} has no quick figures`);
    const width = full.detachment - full.attachment;
    const gap = (key: "expectedLoss" | "protectionLeg" | "annuity" | "upfrontAtRunning") =>
      width * Math.abs((found[key] ?? 0) - (full[key] ?? 0));
    loss = Math.max(loss, gap("expectedLoss"), gap("protectionLeg"), gap("annuity"), gap("upfrontAtRunning"));
    for (const key of ["hitProbability", "exhaustionProbability"] as const)
      probability = Math.max(probability, Math.abs(found[key]! - full[key]!));
    money = Math.max(money, Math.abs(found.sellerValue! - full.sellerValue!) / outcome.report.pool.notional);
    expect(found).toMatchObject({
      id: full.id,
      notional: full.notional,
      correlation: full.correlation,
      defaultsToAttach: full.defaultsToAttach,
      defaultsToExhaust: full.defaultsToExhaust,
    });
    expect(found.parSpread!).toBeCloseTo(full.parSpread!, 4);
    expect(found.leverage! * width).toBeCloseTo(full.leverage! * width, 5);
  }
  return { loss, probability, money };
}

describe("quick figures", () => {
  const moves = [
    { rho: 0, boundaries: [0, 0.0314, 0.0688, 0.1712, 1] },
    { rho: 0.137, boundaries: [0, 0.012, 0.055, 0.2, 1] },
    { rho: 0.8, boundaries: [0.0021, 0.045, 0.09, 0.15, 1] },
  ];

  it.each([false, true])(
    "agree with a full price to 1e-7 of the pool wherever boundaries and a flat correlation are moved (mixed pool: %s)",
    (isMixed) => {
      const cache = quickCache(aRequest(isMixed));
      for (const { rho, boundaries } of moves) {
        const moved = { ...aRequest(isMixed), correlation: { kind: "flat" as const, rho } };
        const found = differences(cache, { ...moved, tranches: classes(boundaries) });
        expect(found.loss).toBeLessThan(1e-7);
        expect(found.money).toBeLessThan(1e-7);
        expect(found.probability).toBeLessThan(2e-6);
      }
    },
  );

  it("agree under a base curve whose nodes are moved", () => {
    const cacheOf = aRequest(true, { correlation: { ...base, nodes: [...base.nodes] } });
    const nodes = base.nodes.map(({ strike, rho }) => ({ strike, rho: rho + 0.05 }));
    const moved = {
      ...cacheOf,
      correlation: { ...base, nodes },
      tranches: classes([0, 0.041, 0.1, 0.18, 1]),
    };
    const found = differences(quickCache(cacheOf), moved);
    expect(found.loss).toBeLessThan(1e-7);
    expect(found.money).toBeLessThan(1e-7);
    expect(found.probability).toBeLessThan(2e-6);
  });

  it("read a curve solved from quotes, and give nothing above where its ladder stopped", () => {
    const { nodes: _, ...reading } = base;
    const request = aRequest(false, { correlation: { ...reading, quotes: [...quotes] } });
    const cache = quickCache(request);
    const found = differences(cache, { ...request, tranches: classes([0, 0.04, 0.1]) });
    expect(found.loss).toBeLessThan(1e-7);
    const unattainable = { ...quotes[1]!, upfront: 0.9 };
    const stopped = { ...request, correlation: { ...reading, quotes: [quotes[0]!, unattainable] } };
    const [low, high] = quickFigures(quickCache(stopped)!, { ...stopped, tranches: classes([0, 0.04, 0.1]) });
    expect(low).not.toBeNull();
    expect(high).toBeNull();
  });

  it("count names already in default as realised", () => {
    const pool = aRequest(false).pool.map((name, i) =>
      i < 2 ? { ...name, credit: { kind: "defaulted" as const } } : name,
    );
    const request = aRequest(false, { pool });
    const found = differences(quickCache(request), {
      ...request,
      tranches: classes([0, 0.01, 0.045, 0.12, 1]),
    });
    expect(found.loss).toBeLessThan(1e-7);
    expect(found.probability).toBeLessThan(2e-6);
  });

  it("follow boundaries where loadings fix the dependence", () => {
    const pool = aRequest(false).pool.map((name, i) => ({ ...name, loading: 0.3 + 0.01 * i }));
    const request = aRequest(false, { pool, correlation: { kind: "loadings" } });
    const found = differences(quickCache(request), { ...request, tranches: classes([0, 0.04, 0.1, 0.2, 1]) });
    expect(found.loss).toBeLessThan(1e-9);
  });

  it("are silent, not wrong, beyond what the cache holds", () => {
    const cache = quickCache(aRequest(false))!;
    const far = quickFigures(cache, { ...aRequest(false), tranches: classes([0, 0.45]) });
    const steep = quickFigures(cache, { ...aRequest(false), correlation: { kind: "flat", rho: 0.95 } });
    expect(far).toEqual([null]);
    expect(steep.every((figures) => figures === null)).toBe(true);
    expect(quickCache({ ...aRequest(false), law: { kind: "largePool" } })).toBeNull();
    expect(quickCache({})).toBeNull();
  });
});
