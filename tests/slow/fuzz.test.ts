import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";

const sound: PricingRequest = {
  format: 1,
  schedule: { kind: "even", years: 1, perYear: 1 },
  discount: { kind: "flat", rate: 0.02 },
  pool: [{ id: "A", notional: 1, recovery: 0.4, credit: { kind: "hazard", rate: 0.02 } }],
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [{ id: "T", attachment: 0, detachment: 0.3 }],
};

function isFiniteThroughout(value: unknown): boolean {
  if (typeof value === "number") return Number.isFinite(value);
  return typeof value !== "object" || value === null || Object.values(value).every(isFiniteThroughout);
}

const anything = fc.anything({ maxDepth: 3, withBigInt: false });

describe("FUZZ: a hundred thousand requests, never an exception, never a number that is not finite", () => {
  it("raw JSON values of any shape", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (raw) => {
        const outcome = price(raw);
        expect(outcome.ok ? 0 : outcome.problems.length).toBeGreaterThan(0);
      }),
      { numRuns: 50_000 },
    );
  });

  it("a sound request with one part, or one field of its first name, replaced by anything", () => {
    const keys = fc.constantFrom(...(Object.keys(sound) as (keyof PricingRequest)[]));
    const fields = fc.constantFrom("id", "notional", "recovery", "credit", "loading", "sector");
    const part = fc.oneof(anything, fc.double(), fc.constantFrom(-1, 0, 1e-300, 1e300, Number.NaN));
    fc.assert(
      fc.property(keys, fields, part, fc.boolean(), (key, field, value, isName) => {
        const request = isName
          ? { ...sound, pool: [{ ...sound.pool[0], [field]: value }] }
          : { ...sound, [key]: value };
        const outcome = price(request);
        expect(!outcome.ok || isFiniteThroughout(outcome.report)).toBe(true);
      }),
      { numRuns: 50_000 },
    );
  });
});
