import { describe, expect, it } from "vitest";
import { checkRequest } from "@/lib/pricing/refusals";
import type { PricingRequest } from "@/lib/pricing/request";

function asked(names: number, years: number, include: PricingRequest["include"]): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years, perYear: 4 },
    discount: { kind: "flat", rate: 0.02 },
    pool: Array.from({ length: names }, (_, i) => ({
      id: `N${i}`,
      notional: 1,
      recovery: 0.4,
      credit: { kind: "hazard", rate: 0.01 + i * 1e-6 },
    })),
    correlation: { kind: "flat", rho: 0.3 },
    tranches: [{ id: "T", attachment: 0, detachment: 0.03 }],
    include,
  };
}

describe("FUZZ: work beyond the limit is refused by a sentence that names it", () => {
  it("500 unequal names over five years with every sensitivity are within it", () => {
    expect(checkRequest(asked(500, 5, ["sensitivities"])).ok).toBe(true);
  });

  it("20 000 names over ten years are within it, with sensitivities name by name they are not", () => {
    expect(checkRequest(asked(20_000, 10, [])).ok).toBe(true);
    const checked = checkRequest(asked(20_000, 10, ["sensitivities"]));
    expect(!checked.ok && checked.problems).toMatchObject([{ code: "limit", path: "include" }]);
    expect(!checked.ok && checked.problems[0]!.message).toMatch(/limit 50000000000 steps/);
  });
});
