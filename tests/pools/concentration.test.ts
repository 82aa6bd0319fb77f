import { describe, expect, it } from "vitest";
import { nameShares, poolTotals, sectorShares } from "@/lib/pools/concentration";
import type { NameInput } from "@/lib/pricing/request";

const credit = { kind: "hazard" as const, rate: 0.01 };
const names: NameInput[] = [
  { id: "a", name: "Aldermoor", sector: "Foods", notional: 30, recovery: 0.4, credit },
  { id: "b", sector: "Foods", notional: 30, recovery: 0.2, credit },
  { id: "c", notional: 40, recovery: 0.5, credit },
];

describe("what a pool adds up to", () => {
  it("weights recovery by notional: 0.3·0.4 + 0.3·0.2 + 0.4·0.5 = 0.38", () => {
    expect(poolTotals(names)).toMatchObject({ names: 3, notional: 100, largestShare: 0.4 });
    expect(poolTotals(names).recovery).toBeCloseTo(0.38, 15);
  });

  it("has as many effective names as names when all are equal (inverse Herfindahl-Hirschman index)", () => {
    const equal = Array.from({ length: 8 }, (_, i) => ({ ...names[0]!, id: `n${i}` }));
    expect(poolTotals(equal).effectiveNames).toBeCloseTo(8, 12);
    expect(poolTotals(names).effectiveNames).toBeCloseTo(1 / 0.34, 12);
  });

  it("shares the notional by sector and by name, largest first", () => {
    expect(sectorShares(names)).toEqual([
      { label: "Foods", notional: 60, names: 2, share: 0.6 },
      { label: "No sector", notional: 40, names: 1, share: 0.4 },
    ]);
    expect(nameShares(names).map(({ label }) => label)).toEqual(["c", "Aldermoor", "b"]);
  });

  it("has no mean and no concentration without names", () => {
    expect(poolTotals([])).toEqual({
      names: 0,
      notional: 0,
      recovery: null,
      effectiveNames: null,
      largestShare: null,
    });
  });
});
