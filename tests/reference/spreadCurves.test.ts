import { describe, expect, it } from "vitest";
import { bootstrapSurvival } from "@/lib/quant/market/defaultSwap";
import { evenSchedule } from "@/lib/quant/market/schedule";
import type { Published } from "./published/check";
import { fittedDiscount, printedTenors, YEAR_ON_360 } from "./published/defaultSwaps";
import { data } from "./support/data";

const published = data<Published[]>("published.json");

function bootstrapped(id: string) {
  const entry = published.find((candidate) => candidate.id === id)!;
  const tenors = printedTenors(entry);
  const quotes = tenors.map(({ years, spread }, i) => ({
    schedule: evenSchedule(years * 4, 4),
    coupon: spread * YEAR_ON_360,
    upfront: 0,
    years,
    path: `nodes.${i}`,
  }));
  return { tenors, outcome: bootstrapSurvival(quotes, fittedDiscount(entry), 0.4) };
}

// Source: O'Kane & Turnbull (2003); their curve and dates are not printed, so the discount factors are fitted to their
// risky annuities and hazards are comparable to a few percent of a hazard only.
describe("SURVIVAL: spread curves of O'Kane & Turnbull (2003)", () => {
  it("fig. 10: the hazards between the tenors come out as printed, within 4 %", () => {
    const { tenors, outcome } = bootstrapped("OT-Fig10");
    expect(outcome.ok).toBe(true);
    if (!outcome.ok) return;
    const { times, cumulative } = outcome.value;
    for (const [i, { hazard }] of tenors.entries()) {
      const found = (cumulative[i]! - (cumulative[i - 1] ?? 0)) / (times[i]! - (times[i - 1] ?? 0));
      expect(Math.abs(found / hazard - 1), `tenor ${tenors[i]!.years}`).toBeLessThanOrEqual(0.04);
    }
  });

  it("fig. 11: the inverted curve is refused at three years, where the source's own hazard is negative", () => {
    const { tenors, outcome } = bootstrapped("OT-Fig11");
    expect(tenors[3]).toMatchObject({ years: 3, hazard: -0.004883 });
    expect(!outcome.ok && outcome.problems[0]).toMatchObject({ code: "noHazard", path: "nodes.3" });
  });
});
