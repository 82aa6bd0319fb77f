import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { NameInput, PricingRequest } from "@/lib/pricing/request";
import { plainMarket, reportOf, requestOf, runs } from "./draws";

/** Alike notionals, unequal risk: pools in which every correlation shows. */
const risky = fc
  .array(fc.constantFrom(0.004, 0.01, 0.03, 0.08), { minLength: 8, maxLength: 30 })
  .map((rates) =>
    rates.map(
      (rate, i): NameInput => ({
        id: `N${i}`,
        notional: 1,
        recovery: 0.4,
        credit: { kind: "hazard", rate },
      }),
    ),
  );

describe("IMPLIED: a model price gives its correlation back", () => {
  it("equity has one solution, the correlation it was priced at; every solution of any class meets the quote", () => {
    const strikes = fc.constantFrom([0, 0.06], [0.06, 0.15], [0.15, 0.4]);
    fc.assert(
      fc.property(
        risky,
        strikes,
        fc.double({ min: 0.03, max: 0.95, noNaN: true }),
        (pool, [from, to], rho) => {
          const tranche = { id: "T", attachment: from!, detachment: to!, running: 0.02 };
          const priceAt = (correlation: number) =>
            reportOf(
              requestOf(plainMarket, pool, { kind: "flat", rho: correlation }, { tranches: [tranche] }),
            ).tranches[0]!.upfrontAtRunning!;
          const upfront = priceAt(rho);
          const { solutions, attainable } = reportOf(
            requestOf(
              plainMarket,
              pool,
              { kind: "flat", rho: 0.5 },
              {
                tranches: [{ ...tranche, upfront }],
                include: ["impliedCorrelation"],
              },
            ),
          ).tranches[0]!.impliedCorrelation!;
          if (from === 0) expect(solutions).toHaveLength(1);
          const nearest = Math.min(...solutions.map((solution) => Math.abs(solution - rho)));
          const sensitivity = Math.abs(priceAt(Math.min(rho + 1e-4, 1)) - upfront) / 1e-4;
          if (sensitivity > 1e-3) expect(nearest).toBeLessThanOrEqual(1e-8 / Math.min(1, sensitivity));
          for (const solution of solutions) {
            expect(Math.abs(priceAt(solution) - upfront)).toBeLessThanOrEqual(1e-9);
            expect(solution).toBeGreaterThanOrEqual(0);
            expect(solution).toBeLessThan(1);
          }
          expect(upfront).toBeGreaterThanOrEqual(attainable[0] - 1e-7);
          expect(upfront).toBeLessThanOrEqual(attainable[1] + 1e-7);
        },
      ),
      runs(8),
    );
  });
});

const curveNodes = fc
  .tuple(
    fc.double({ min: 0.1, max: 0.35, noNaN: true }),
    fc.double({ min: 0.02, max: 0.15, noNaN: true }),
    fc.double({ min: 0.02, max: 0.15, noNaN: true }),
  )
  .map(([first, second, third]) => [
    { strike: 0.06, rho: first },
    { strike: 0.12, rho: first + second },
    { strike: 0.25, rho: first + second + third },
  ]);

const reading = fc.record({
  interpolation: fc.constantFrom("linear" as const, "monotone" as const),
  beyond: fc.constantFrom("flat" as const, "linear" as const),
});

const ladder: PricingRequest["tranches"] = [
  { id: "T0", attachment: 0, detachment: 0.06, running: 0.05, upfront: 0 },
  { id: "T1", attachment: 0.06, detachment: 0.12, running: 0.01, upfront: 0 },
  { id: "T2", attachment: 0.12, detachment: 0.25, running: 0.01, upfront: 0 },
];

describe("BASE: a curve read from quotes", () => {
  it("is the curve that made them, and reprices each quote to 1e-10", () => {
    fc.assert(
      fc.property(risky, curveNodes, reading, (pool, nodes, how) => {
        const given = { kind: "base" as const, ...how, mapping: "none" as const, nodes };
        const made = reportOf(requestOf(plainMarket, pool, given, { tranches: ladder })).tranches;
        const quotes = made.map(({ attachment, detachment, upfrontAtRunning }, i) => ({
          attachment,
          detachment,
          running: ladder[i]!.running!,
          upfront: upfrontAtRunning!,
        }));
        const read = { kind: "base" as const, ...how, mapping: "none" as const, quotes };
        const report = reportOf(requestOf(plainMarket, pool, read, { tranches: ladder }));
        expect(report.baseCorrelation!.stopped ?? null).toBeNull();
        for (const [i, tranche] of report.tranches.entries())
          expect(Math.abs(tranche.upfrontAtRunning! - quotes[i]!.upfront)).toBeLessThanOrEqual(1e-10);
        for (const [i, node] of report.baseCorrelation!.nodes.entries())
          expect(Math.abs(node.rho - nodes[i]!.rho)).toBeLessThanOrEqual(1e-7);
      }),
      runs(25),
    );
  });

  it("a level curve is the flat correlation: base tranches are differences at one law", () => {
    fc.assert(
      fc.property(risky, fc.double({ min: 0, max: 0.95, noNaN: true }), reading, (pool, rho, how) => {
        const nodes = [0.06, 0.12, 0.25].map((strike) => ({ strike, rho }));
        const base = { kind: "base" as const, ...how, mapping: "none" as const, nodes };
        const [curve, flat] = [base, { kind: "flat" as const, rho }].map(
          (correlation) => reportOf(requestOf(plainMarket, pool, correlation, { tranches: ladder })).tranches,
        );
        for (const [i, tranche] of curve!.entries())
          for (const figure of ["expectedLoss", "protectionLeg", "annuity"] as const)
            expect(Math.abs(tranche[figure]! - flat![i]![figure]!)).toBeLessThanOrEqual(1e-9);
      }),
      runs(25),
    );
  });
});

describe("MAPPING: the quoted pool onto itself", () => {
  it("every mapping leaves each strike where it is", () => {
    const mapping = fc.constantFrom("moneyness" as const, "lossShare" as const, "probability" as const);
    fc.assert(
      fc.property(risky, curveNodes, mapping, (pool, nodes, kind) => {
        const figures = (how: "none" | typeof kind) =>
          reportOf(
            requestOf(
              plainMarket,
              pool,
              { kind: "base", interpolation: "linear", beyond: "flat", mapping: how, nodes, index: { pool } },
              { tranches: ladder },
            ),
          );
        const [mapped, plain] = [figures(kind), figures("none")];
        for (const [i, tranche] of mapped.tranches.entries()) {
          if (tranche.expectedLoss === null) {
            expect(mapped.warnings.map(({ code }) => code)).toContain("noMapping");
            continue;
          }
          expect(Math.abs(tranche.expectedLoss - plain.tranches[i]!.expectedLoss!)).toBeLessThanOrEqual(1e-8);
        }
      }),
      runs(25),
    );
  });
});
