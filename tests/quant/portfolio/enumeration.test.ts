import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { checkRequest } from "@/lib/pricing/refusals";
import { valuationOf } from "@/lib/pricing/valuation";
import { normalQuantile } from "@/lib/quant/maths/normal";

interface Name {
  readonly notional: number;
  readonly recovery: number;
  readonly probability: number;
}

/** Φ by its Taylor series at 0, summed to machine precision: |x| ≤ 8.5; shares nothing with the core's Φ. */
function seriesCdf(x: number): number {
  if (Math.abs(x) > 8.5) return x > 0 ? 1 : 0;
  let term = x;
  let sum = x;
  for (let k = 1; Math.abs(term) > 1e-18 * Math.abs(sum) + 1e-300; k++) {
    term *= (x * x) / (2 * k + 1);
    sum += term;
  }
  return 0.5 + (sum * Math.exp((-x * x) / 2)) / Math.sqrt(2 * Math.PI);
}

/** E[min(L, K)]/K over all 2^N sets of defaults, the factor by the trapezoid rule: a plain second reading of the model. */
function enumeratedEquityLoss(names: readonly Name[], rho: number, strike: number): number {
  const notional = names.reduce((sum, name) => sum + name.notional, 0);
  const thresholds = names.map((name) => normalQuantile(name.probability));
  const losses = Array.from({ length: 2 ** names.length }, (_, set) =>
    names.reduce(
      (sum, name, i) => sum + ((set >> i) & 1 ? (name.notional * (1 - name.recovery)) / notional : 0),
      0,
    ),
  );
  const step = rho > 0.99 ? 0.004 : 0.05;
  const steps = Math.round(8.4 / step);
  let expectation = 0;
  for (let node = -steps; node <= steps; node++) {
    const factor = node * step;
    const weight = (step * Math.exp((-factor * factor) / 2)) / Math.sqrt(2 * Math.PI);
    let sets = [weight];
    for (const threshold of thresholds) {
      const p = seriesCdf((threshold - Math.sqrt(rho) * factor) / Math.sqrt(1 - rho));
      sets = [...sets.map((mass) => mass * (1 - p)), ...sets.map((mass) => mass * p)];
    }
    for (const [set, mass] of sets.entries()) expectation += mass * Math.min(losses[set]!, strike);
  }
  return expectation / strike;
}

function pricedEquityLosses(names: readonly Name[], rho: number, strikes: readonly number[]): number[] {
  return priced(names, rho, strikes).tranches.map((tranche) => tranche.expectedLoss!);
}

function priced(names: readonly Name[], rho: number, strikes: readonly number[], unit?: number) {
  const outcome = price({
    format: 1,
    schedule: { kind: "even", years: 1, perYear: 1 },
    discount: { kind: "flat", rate: -0.01 },
    pool: names.map(({ notional, recovery, probability }, i) => ({
      id: `N${i}`,
      notional,
      recovery,
      credit: { kind: "hazard", rate: -Math.log1p(-probability) },
    })),
    correlation: { kind: "flat", rho },
    tranches: strikes.map((detachment, i) => ({
      id: `T${i}`,
      attachment: 0,
      detachment,
      running: 0.01,
      upfront: 0,
    })),
    ...(unit === undefined ? {} : { law: { kind: "finite", unit } }),
  });
  if (!outcome.ok) throw new Error(outcome.problems.map((problem) => problem.message).join(" "));
  return outcome.report;
}

const strikes = [0.003, 0.0713, 0.3, 0.777];
const dominated: Name[] = [
  { notional: 30, recovery: 0, probability: 0.02 },
  { notional: 17.31, recovery: 0.4, probability: 0.9 },
  { notional: 13.07, recovery: 0.9, probability: 1e-6 },
  { notional: 11.9, recovery: 0.25, probability: 0.11 },
  { notional: 15.003, recovery: 0.9, probability: 0.35 },
  { notional: 12.717, recovery: 0, probability: 0.004 },
];
const even: Name[] = [0.01, 0.02, 0.05, 0.1, 0.2, 0.4, 0.9].map((probability) => ({
  notional: 1,
  recovery: 0.4,
  probability,
}));

describe("LAW: against every set of defaults and a trapezoid rule (independent implementation here)", () => {
  for (const rho of [0, 0.05, 0.3, 0.7, 0.999]) {
    it(`one name with 30 % of the pool, recoveries 0 to 0.9, p from 1e-6 to 0.9, ρ = ${rho}: 1e-11`, () => {
      const priced = pricedEquityLosses(dominated, rho, strikes);
      for (const [i, strike] of strikes.entries())
        expect(Math.abs(priced[i]! - enumeratedEquityLoss(dominated, rho, strike))).toBeLessThanOrEqual(
          1e-11,
        );
    });

    it(`equal losses of unequal names, ρ = ${rho}: 1e-11`, () => {
      const priced = pricedEquityLosses(even, rho, strikes);
      for (const [i, strike] of strikes.entries())
        expect(Math.abs(priced[i]! - enumeratedEquityLoss(even, rho, strike))).toBeLessThanOrEqual(1e-11);
    });
  }

  it("a single name loses min(l, K)/K with its own probability, whatever ρ", () => {
    const single: Name[] = [{ notional: 5, recovery: 0.4, probability: 0.07 }];
    for (const rho of [0, 0.5, 1]) {
      const [low, high] = pricedEquityLosses(single, rho, [0.3, 0.8]);
      expect(Math.abs(low! - 0.07)).toBeLessThanOrEqual(1e-13);
      expect(Math.abs(high! - (0.07 * 0.6) / 0.8)).toBeLessThanOrEqual(1e-13);
    }
  });
});

describe("ERROR: the stated numerical error", () => {
  it("covers a shared grid even at strikes that the pool's losses reach exactly: 14 names against a finer grid", () => {
    const losses = Array.from({ length: 14 }, (_, i) => 1 + ((i * 31) % 17) / 7.003 + i * 0.0137);
    const total = losses.reduce((sum, loss) => sum + loss, 0);
    const strikes = [losses[1]!, losses[2]! + losses[5]!, losses[1]! + losses[4]!].map(
      (loss) => loss / total,
    );
    const at = (unit: number) => {
      const outcome = price({
        format: 1,
        schedule: { kind: "even", years: 1, perYear: 1 },
        discount: { kind: "flat", rate: 0 },
        pool: losses.map((notional, i) => ({
          id: `N${i}`,
          notional,
          recovery: 0,
          credit: { kind: "hazard", rate: i % 2 ? 0.02 : 0.3 },
        })),
        correlation: { kind: "flat", rho: 0.3 },
        tranches: strikes.map((detachment, i) => ({
          id: `T${i}`,
          attachment: 0,
          detachment,
          running: 0.01,
          upfront: 0,
        })),
        law: { kind: "finite", unit },
      });
      if (!outcome.ok) throw new Error(outcome.problems.map((problem) => problem.message).join(" "));
      return outcome.report;
    };
    const coarse = at(5.3e-4);
    const fine = at(3.1e-5);
    for (const [i, strike] of strikes.entries()) {
      const error = Math.abs(coarse.tranches[i]!.expectedLoss! - fine.tranches[i]!.expectedLoss!) * strike;
      expect(error).toBeLessThanOrEqual(coarse.numericalError + fine.numericalError);
    }
    expect(coarse.numericalError).toBeLessThanOrEqual(5.3e-4 / 4 + 1e-9);
  });

  it("covers, at most 2,000 times too widely, what grids of 1e-4 to 1e-2 do to eight names: every set of defaults, strikes on sums", () => {
    const losses = [1, 2.137, 3.551, 1.777, 2.903, 1.271, 3.009, 2.417];
    const total = losses.reduce((sum, loss) => sum + loss, 0);
    const names: Name[] = losses.map((notional, i) => ({
      notional,
      recovery: 0,
      probability: [0.3, 0.01, 0.1][i % 3]!,
    }));
    const sums = [losses[1]!, losses[0]! + losses[4]!, losses[2]! + losses[5]! + losses[6]!];
    const strikes = [0.03, ...sums.map((sum) => sum / total)];
    for (const rho of [0.1, 0.6]) {
      const exact = strikes.map((strike) => enumeratedEquityLoss(names, rho, strike));
      for (const unit of [1e-2, 1.7e-3, 1e-4]) {
        const { tranches, numericalError } = priced(names, rho, strikes, unit);
        const error = Math.max(
          ...strikes.map((strike, i) => strike * Math.abs(tranches[i]!.expectedLoss! - exact[i]!)),
        );
        expect(error).toBeLessThanOrEqual(numericalError);
        expect(numericalError).toBeLessThanOrEqual(2000 * error);
      }
    }
  });

  it("is rounding for a lattice, and for names whose sets of defaults are enumerated", () => {
    expect(priced(even, 0.3, strikes).numericalError).toBeLessThanOrEqual(1e-9);
    expect(priced(dominated, 0.3, strikes).numericalError).toBeLessThanOrEqual(1e-9);
  });

  it("counts the grid that a sector model lays where one factor would enumerate", () => {
    const checked = checkRequest({
      format: 1,
      schedule: { kind: "even", years: 1, perYear: 1 },
      discount: { kind: "flat", rate: 0 },
      pool: dominated.map(({ notional, recovery, probability }, i) => ({
        id: `N${i}`,
        notional,
        recovery,
        credit: { kind: "yearly", probability },
      })),
      correlation: { kind: "flat", rho: 0.3 },
      tranches: [{ id: "T", attachment: 0, detachment: 0.3 }],
    });
    const { laws } = valuationOf((checked as Extract<typeof checked, { ok: true }>).request, [])!;
    expect(laws.sharedUnit({ kind: "flat", rho: 0.3 })).toBeNull();
    expect(laws.sharedUnit({ kind: "sector", within: 0.4, between: 0.2 })).toBeGreaterThan(0);
    expect(laws.sharedUnit({ kind: "sector", within: 1, between: 1 })).toBeNull();
  });
});
