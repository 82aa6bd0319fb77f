import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";
import { noShock, type Shock } from "@/lib/pricing/shock";
import { type ShockedClass, shockedFigures } from "@/lib/pricing/shockedFigures";
import { cellAt, cellCount, cellShock, gridSchema } from "@/lib/pricing/stressGrid";

const request: PricingRequest = {
  format: 1,
  currency: "EUR",
  pricingDate: "2026-11-30",
  schedule: { kind: "even", years: 5, perYear: 4 },
  discount: { kind: "flat", rate: 0.02 },
  pool: Array.from({ length: 12 }, (_, i) => ({
    id: `N${i}`,
    sector: i < 6 ? "Foods" : "Ships",
    notional: 1_000_000,
    recovery: 0.4,
    credit: { kind: "spread" as const, nodes: [{ years: 5, spread: 0.01 + 0.001 * i }] },
  })),
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [
    { id: "low", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.1 },
    { id: "high", attachment: 0.1, detachment: 0.3, running: 0.01 },
    { id: "all", attachment: 0, detachment: 1, running: 0.01, recoveryPaydown: false },
  ],
  include: ["sensitivities"],
};

const priced = (() => {
  const outcome = price(request);
  if (!outcome.ok) throw new Error("The test's own request is refused.");
  return outcome.report;
})();

function classesAfter(shock: Partial<Shock>, of: PricingRequest = request): readonly ShockedClass[] {
  const figures = shockedFigures(of, { ...noShock, ...shock });
  if (!figures.ok) throw new Error(figures.problems.map(({ message }) => message).join(" "));
  return figures.classes;
}

/** How far each class's value moved from the report's. */
function moves(shock: Partial<Shock>): number[] {
  return classesAfter(shock).map(({ value }, i) => value! - priced.tranches[i]!.sellerValue!);
}

function expectClose(found: readonly number[], wanted: readonly (number | null)[]): void {
  for (const [i, value] of found.entries()) expect(value).toBeCloseTo(wanted[i]!, 4);
}

describe("figures after a shock", () => {
  it("are the report's own when nothing moves, to the bit", () => {
    for (const [i, row] of classesAfter({}).entries()) {
      const { sellerValue, expectedLoss, parSpread } = priced.tranches[i]!;
      expect(row).toEqual({ id: priced.tranches[i]!.id, value: sellerValue, expectedLoss, parSpread });
    }
  });

  it("move by the report's sensitivities for the same definite bumps", () => {
    const of = (pick: (row: NonNullable<typeof priced.sensitivities>[number]) => number | null) =>
      priced.sensitivities!.map(pick);
    expectClose(
      moves({ shift: 1e-4 }),
      of((row) => row.spread01),
    );
    expectClose(
      moves({ recovery: 0.01 }),
      of((row) => row.recovery01),
    );
    expectClose(
      moves({ correlation: 0.01 }),
      of((row) => row.correlation01),
    );
    expectClose(
      moves({ defaults: { kind: "names", ids: ["N3"] } }),
      of((row) => row.byName[3]!.jumpToDefault),
    );
  });

  it("let the widest names default by their par spread, and take what they cost off the value", () => {
    const figures = shockedFigures(request, { ...noShock, defaults: { kind: "widest", count: 2 } });
    expect(figures.ok && figures.defaulted).toEqual(["N11", "N10"]);
    // Two of twelve equal names at a recovery of 40 % lose 2 · 0.6 / 12 = 10 % of the pool: the lowest class is gone.
    expect(figures.ok && figures.classes[0]!.expectedLoss).toBeCloseTo(1, 12);
  });

  it("leave the expected loss of the whole pool alone when only correlation moves", () => {
    const [one, other] = [-0.2, 0.4].map((correlation) => classesAfter({ correlation })[2]!.expectedLoss!);
    expect(one).toBeCloseTo(priced.tranches[2]!.expectedLoss!, 9);
    expect(other).toBeCloseTo(priced.tranches[2]!.expectedLoss!, 9);
  });

  it("move one sector only when the shock is that sector's, by its own factor times the common one", () => {
    const both = classesAfter({ scale: 1.5 });
    const parts = classesAfter({
      sectors: [
        { sector: "Foods", scale: 1.5, recovery: 0 },
        { sector: "Ships", scale: 1.5, recovery: 0 },
      ],
    });
    expect(parts).toEqual(both);
    const ships = classesAfter({ sectors: [{ sector: "Ships", scale: 1.5, recovery: 0 }] });
    expect(ships[2]!.expectedLoss!).toBeLessThan(both[2]!.expectedLoss!);
    expect(ships[2]!.expectedLoss!).toBeGreaterThan(priced.tranches[2]!.expectedLoss!);
  });

  it("say that a correlation was held at the end of its range, and refuse what has no meaning, with reasons", () => {
    const held = shockedFigures(request, { ...noShock, correlation: 0.9 });
    expect(held.ok && held.isHeld).toBe(true);
    const unknown = shockedFigures(request, { ...noShock, defaults: { kind: "names", ids: ["X"] } });
    expect(!unknown.ok && unknown.problems[0]!.code).toBe("unknownName");
    const recovered = shockedFigures(request, { ...noShock, recovery: 0.7 });
    expect(!recovered.ok && recovered.problems).toHaveLength(12);
  });

  it("value a class without a coupon at its own par spread before the shock", () => {
    const tranches = [{ id: "high", attachment: 0.1, detachment: 0.3 }];
    const [still] = classesAfter({}, { ...request, tranches });
    expect(still!.value).toBeCloseTo(0, 6);
  });
});

describe("a stress grid", () => {
  const grid = gridSchema.parse({
    spreads: { kind: "relative", steps: [-0.5, 0, 1] },
    correlations: [0, 0.1],
    shock: { scale: 2 },
  });

  it("starts from the request unmoved, then runs along its rows, each cell's steps on top of the common shock", () => {
    expect(cellCount(grid)).toBe(7);
    expect(cellShock(grid, 0)).toEqual(noShock);
    expect(cellShock(grid, cellAt(grid, 1, 0))).toEqual({ ...noShock, scale: 2 });
    expect(cellShock(grid, cellAt(grid, 2, 1))).toEqual({ ...noShock, scale: 4, correlation: 0.1 });
    const absolute = { ...grid, spreads: { kind: "absolute" as const, steps: [0.01] } };
    expect(cellShock(absolute, 1)).toEqual({ ...noShock, scale: 2, shift: 0.01 });
  });

  it("is refused with a step twice, or more than 21 of one shock", () => {
    expect(gridSchema.safeParse({ ...grid, correlations: [0, 0] }).success).toBe(false);
    const steps = Array.from({ length: 22 }, (_, i) => i / 100);
    expect(gridSchema.safeParse({ ...grid, correlations: steps }).success).toBe(false);
  });
});
