import { describe, expect, it } from "vitest";
import type { PricingRequest } from "@/lib/pricing/request";
import { recursionBackend } from "@/lib/quant/kernel/backend";
import { reportOf } from "./priceBench";
import { base, flat, mixedPool, structure } from "./priceCases";

const yearly = { kind: "even", years: 5, perYear: 1 } as const;
const mixed = mixedPool(125);
const alike = mixed.map((name) => ({ ...name, notional: 8e6, recovery: 0.4 }));

/** Millions of row updates times factor values that a request may cost, as counted when this was written. */
const COUNTED: Record<string, { readonly request: PricingRequest; readonly millions: number }> = {
  "mixed amounts, ρ 0.3": { request: structure(mixed, flat), millions: 300.6 },
  "mixed amounts, ρ 0.9": { request: structure(mixed, { kind: "flat", rho: 0.9 }), millions: 390.5 },
  "mixed amounts, base curve": { request: structure(mixed, base), millions: 759 },
  "equal amounts, ρ 0.3": { request: structure(alike, flat), millions: 4.93 },
  "2,000 names, ρ 0.3": { request: structure(mixedPool(2_000), flat), millions: 0 },
};

describe("the counted work of a price, which a noisy machine cannot hide", () => {
  for (const [title, { request, millions }] of Object.entries(COUNTED))
    it(`125 names, six classes, five yearly dates, ${title}: at most ${millions} million`, () => {
      recursionBackend().takeWork();
      reportOf({ ...request, schedule: yearly });
      const counted = recursionBackend().takeWork() / 1e6;
      expect(counted).toBeLessThanOrEqual(1.02 * millions);
      expect(counted).toBeGreaterThanOrEqual(0.5 * millions);
    });
});
