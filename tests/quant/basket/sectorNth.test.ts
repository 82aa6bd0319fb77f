import { describe, expect, test } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";
import { normalCdf, normalDensity, normalQuantile } from "@/lib/quant/maths/normal";

const spec = [
  { id: "A", sector: "Ports", notional: 10, recovery: 0.4, probability: 0.02 },
  { id: "B", sector: "Ports", notional: 25, recovery: 0.1, probability: 0.05 },
  { id: "C", sector: "Mills", notional: 5, recovery: 0.7, probability: 0.01 },
  { id: "D", sector: "Mills", notional: 15, recovery: 0.3, probability: 0.08 },
  { id: "E", sector: "Farms", notional: 20, recovery: 0.5, probability: 0.03 },
];
const sectors = ["Ports", "Mills", "Farms"];

function request(within: number, between: number): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years: 1, perYear: 1 },
    discount: { kind: "flat", rate: 0 },
    pool: spec.map(({ probability, ...name }) => ({ ...name, credit: { kind: "yearly", probability } })),
    correlation: { kind: "sector", within, between },
    tranches: [],
    nthToDefault: [1, 2, 3, 4, 5],
  };
}

function contracts(asked: PricingRequest) {
  const outcome = price(asked);
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  expect(outcome.report.warnings).toEqual([]);
  return outcome.report.nthToDefault;
}

/** The law of the sum of two independent counts. */
function sumOf(one: readonly number[], other: readonly number[]): number[] {
  const sum = new Array<number>(one.length + other.length - 1).fill(0);
  for (const [k, mass] of one.entries()) for (const [n, more] of other.entries()) sum[k + n]! += mass * more;
  return sum;
}

/** P(N ≥ n) by a trapezoid rule over the common factor and each sector's own. */
function byTrapezoid(within: number, between: number): number[] {
  const step = 0.1;
  const grid = Array.from({ length: 161 }, (_, i) => -8 + step * i);
  const mixed = (law: (factor: number) => number[]) => {
    const laws = grid.map((factor) => law(factor).map((mass) => mass * normalDensity(factor) * step));
    return laws[0]!.map((_, k) => laws.reduce((sum, masses) => sum + masses[k]!, 0));
  };
  const counts = mixed((common) =>
    sectors
      .map((sector) =>
        mixed((own) => {
          const market = Math.sqrt(between) * common + Math.sqrt(within - between) * own;
          return spec
            .filter((name) => name.sector === sector)
            .map(({ probability }) =>
              normalCdf((normalQuantile(probability) - market) / Math.sqrt(1 - within)),
            )
            .reduce<number[]>((law, p) => sumOf(law, [1 - p, p]), [1]);
        }),
      )
      .reduce(sumOf, [1]),
  );
  return [1, 2, 3, 4, 5].map((n) => counts.slice(n).reduce((sum, mass) => sum + mass, 0));
}

describe("NTH-SECTOR: n-th to default in the sector model", () => {
  test.each([
    [0.3, 0.1],
    [0.6, 0.55],
    [0.5, 0],
  ])(
    "within %f and between %f, the chances of n defaults are those of a plain double quadrature",
    (within, between) => {
      const expected = byTrapezoid(within, between);
      for (const [i, { probability }] of contracts(request(within, between)).entries())
        expect(Math.abs(probability - expected[i]!)).toBeLessThan(1e-11);
    },
  );

  test("the payments of all contracts together are those of every default", () => {
    const total = contracts(request(0.4, 0.15)).reduce((sum, { protectionLeg }) => sum + protectionLeg, 0);
    const average = 15;
    const every = spec.reduce(
      (sum, { notional, recovery, probability }) => sum + (notional * (1 - recovery) * probability) / average,
      0,
    );
    expect(Math.abs(total - every)).toBeLessThan(1e-12);
  });

  test("within equal to between is the flat correlation", () => {
    const flat = contracts({ ...request(0.3, 0.3), correlation: { kind: "flat", rho: 0.3 } });
    for (const [i, contract] of contracts(request(0.3, 0.3)).entries()) {
      expect(Math.abs(contract.probability - flat[i]!.probability)).toBeLessThan(1e-11);
      expect(Math.abs(contract.protectionLeg - flat[i]!.protectionLeg)).toBeLessThan(1e-11);
    }
  });

  test("a sector that defaults as one (within 1) and sectors that are one (between 1) have figures", () => {
    const [first] = contracts(request(1, 0));
    const widest = [0.05, 0.08, 0.03];
    const none = widest.reduce((product, probability) => product * (1 - probability), 1);
    expect(Math.abs(first!.probability - (1 - none))).toBeLessThan(1e-6);
    const asOne = contracts(request(1, 1)).map(({ probability }) => probability);
    expect(asOne).toEqual(
      [0.08, 0.05, 0.03, 0.02, 0.01].map((probability) => expect.closeTo(probability, 12)),
    );
  });
});
