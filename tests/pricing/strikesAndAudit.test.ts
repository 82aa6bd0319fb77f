import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";

/** Ten equal names without recovery that default with 10 % each, independently unless told: losses are tenths. */
function request(parts: Partial<PricingRequest>): PricingRequest {
  return {
    format: 1,
    schedule: { kind: "even", years: 1, perYear: 1 },
    discount: { kind: "flat", rate: 0 },
    pool: Array.from({ length: 10 }, (_, i) => ({
      id: `N${i}`,
      notional: 1,
      recovery: 0,
      credit: { kind: "yearly", probability: 0.1 },
    })),
    correlation: { kind: "flat", rho: 0 },
    tranches: [{ id: "T", attachment: 0.1, detachment: 0.2 }],
    ...parts,
  };
}

function reportOf(parts: Partial<PricingRequest>) {
  const outcome = price(request(parts));
  if (!outcome.ok) throw new Error(outcome.problems.map(({ message }) => message).join(" "));
  return outcome.report;
}

describe("STRIKE: hit is a loss above the attachment, exhaustion one of at least the detachment", () => {
  it("10 to 20 % of ten names: both need two defaults, 1 − 0.9¹⁰ − 10 · 0.1 · 0.9⁹, and warnings name the strikes", () => {
    const { tranches, warnings } = reportOf({});
    const two = 1 - 0.9 ** 10 - 0.9 ** 9;
    expect(tranches[0]!.hitProbability).toBeCloseTo(two, 12);
    expect(tranches[0]!.exhaustionProbability).toBeCloseTo(two, 12);
    const named = warnings.filter(({ code }) => code === "latticeStrike").map(({ subject }) => subject);
    expect(named).toEqual(expect.arrayContaining(["0.1", "0.2"]));
  });

  it("between two attainable losses nothing differs and nothing is warned of", () => {
    const { warnings } = reportOf({ tranches: [{ id: "T", attachment: 0.15, detachment: 0.25 }] });
    expect(warnings.filter(({ code }) => code === "latticeStrike")).toEqual([]);
  });
});

describe("AUDIT: a second opinion by another method, figure by figure", () => {
  it("on a lattice by the characteristic function: differences below 1e-10, values the report's own", () => {
    const report = reportOf({ correlation: { kind: "flat", rho: 0.3 }, include: ["audit"] });
    const { figures, method } = report.audit!;
    expect(method).toMatch(/characteristic function/);
    const loss = figures.find(({ path }) => path === "tranches.0.expectedLoss")!;
    expect(loss.value).toBe(report.tranches[0]!.expectedLoss);
    for (const { value, audited, difference } of figures) {
      expect(difference).toBe(value - audited);
      expect(Math.abs(difference)).toBeLessThan(1e-10);
    }
  });

  it("at ρ = 0.99 by simulation: twice the same, and within four stated standard errors", () => {
    const parts: Partial<PricingRequest> = { correlation: { kind: "flat", rho: 0.99 }, include: ["audit"] };
    const audit = reportOf(parts).audit!;
    expect(audit).toEqual(reportOf(parts).audit);
    expect(audit.method).toMatch(/simulation/);
    for (const { difference, standardError } of audit.figures) {
      expect(standardError).toBeGreaterThan(0);
      expect(Math.abs(difference)).toBeLessThanOrEqual(4 * standardError!);
    }
  });
});

describe("ARBITRAGE: marks of a base curve", () => {
  const base = (low: number, high: number): PricingRequest["correlation"] => ({
    kind: "base",
    nodes: [
      { strike: 0.05, rho: low },
      { strike: 0.35, rho: high },
    ],
    interpolation: "linear",
    beyond: "flat",
    mapping: "none",
  });

  it("a flat curve is one law, which has none", () => {
    expect(reportOf({ correlation: base(0.3, 0.3) }).baseCorrelation!.arbitrage).toEqual([]);
  });

  it("a curve that leaps from 5 to 90 % is marked by interval, and the class that touches it is warned of", () => {
    const { baseCorrelation, warnings } = reportOf({ correlation: base(0.05, 0.9) });
    expect(baseCorrelation!.arbitrage.length).toBeGreaterThan(0);
    for (const { from, to, size } of baseCorrelation!.arbitrage) {
      expect(from).toBeLessThan(to);
      expect(size).toBeGreaterThan(1e-6);
    }
    expect(warnings.some(({ code, subject }) => code === "arbitrage" && subject === "T")).toBe(true);
  });
});

describe("TENOR: even maturities are whole periods", () => {
  it("1.3 years of quarters are refused, 1.25 are five", () => {
    const refused = price(request({ schedule: { kind: "even", years: 1.3, perYear: 4 } }));
    expect(!refused.ok && refused.problems.map(({ path }) => path)).toContain("schedule.years");
    const { timeline } = reportOf({
      schedule: { kind: "even", years: 1.25, perYear: 4 },
      include: ["timeline"],
    });
    expect(timeline!.map(({ time }) => time)).toEqual([0.25, 0.5, 0.75, 1, 1.25]);
  });
});
