import type { PricingRequest } from "@/lib/pricing/request";
import { drawn } from "./yardstick/kernelCases";

const BOUNDARIES = [0, 0.03, 0.06, 0.09, 0.12, 0.22, 1];
const BASE = [0.25, 0.35, 0.42, 0.48, 0.62];

/** A pool of mixed names with spreads of 20 to 800 bp, invented. */
export function mixedPool(count: number): PricingRequest["pool"] {
  const next = drawn(11);
  return Array.from({ length: count }, (_, i) => ({
    id: `Name ${i + 1}`,
    notional: Math.round(2e6 + 12e6 * next()),
    recovery: Math.round(100 * (0.2 + 0.4 * next())) / 100,
    credit: { kind: "spread", nodes: [{ years: 5, spread: Math.round(1e6 * 0.002 * 40 ** next()) / 1e6 }] },
  }));
}

/** Six classes on a pool, five years of quarters. */
export function structure(
  pool: PricingRequest["pool"],
  correlation: PricingRequest["correlation"],
  include?: PricingRequest["include"],
): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years: 5, perYear: 4 },
    discount: { kind: "flat", rate: 0.02 },
    pool,
    correlation,
    tranches: BOUNDARIES.slice(1).map((detachment, i) => ({
      id: `Class ${i + 1}`,
      attachment: BOUNDARIES[i]!,
      detachment,
      running: 0.01,
      upfront: 0,
    })),
    ...(include ? { include } : {}),
  };
}

export const flat: PricingRequest["correlation"] = { kind: "flat", rho: 0.3 };

/** A base curve as given. */
export const base: PricingRequest["correlation"] = {
  kind: "base",
  nodes: BOUNDARIES.slice(1, 6).map((strike, i) => ({ strike, rho: BASE[i]! })),
  mapping: "none",
  interpolation: "linear",
  beyond: "flat",
};

/** The same curve as quotes: upfronts that a price at the curve gives. */
export function quoted(upfronts: readonly number[]): PricingRequest["correlation"] {
  return {
    kind: "base",
    quotes: upfronts.map((upfront, i) => ({
      attachment: BOUNDARIES[i]!,
      detachment: BOUNDARIES[i + 1]!,
      running: 0.01,
      upfront,
    })),
    mapping: "none",
    interpolation: "linear",
    beyond: "flat",
  };
}
