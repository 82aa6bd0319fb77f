import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { NameInput, PricingRequest } from "@/lib/pricing/request";
import { reportOf, requestOf, runs } from "./draws";

const market = {
  schedule: { kind: "even" as const, years: 3, perYear: 2 },
  discount: { kind: "flat" as const, rate: 0.02 },
};

/** Names on spread curves of two tenors, some notionals odd. */
const quoted = fc
  .array(
    fc.record({
      notional: fc.integer({ min: 1, max: 6 }),
      spread: fc.double({ min: 0.004, max: 0.03, noNaN: true }),
      slope: fc.double({ min: 0.9, max: 1.5, noNaN: true }),
    }),
    { minLength: 3, maxLength: 8 },
  )
  .map((rows) =>
    rows.map(
      ({ notional, spread, slope }, i): NameInput => ({
        id: `N${i}`,
        notional,
        recovery: 0.4,
        credit: {
          kind: "spread",
          nodes: [
            { years: 1, spread },
            { years: 3, spread: spread * slope },
          ],
        },
      }),
    ),
  );

const rho = fc.double({ min: 0.05, max: 0.8, noNaN: true });

const tranches: PricingRequest["tranches"] = [
  { id: "T0", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.1 },
  { id: "T1", attachment: 0.1, detachment: 0.3, running: 0.02, upfront: 0 },
  { id: "T2", attachment: 0.3, detachment: 0.8, running: 0.01, upfront: 0 },
];

function bumped(pool: readonly NameInput[], shift: number, only?: number): NameInput[] {
  return pool.map((name, i) =>
    name.credit.kind !== "spread" || (only !== undefined && only !== i)
      ? name
      : {
          ...name,
          credit: {
            kind: "spread",
            nodes: name.credit.nodes.map((node) => ({ ...node, spread: node.spread + shift })),
          },
        },
  );
}

describe("BUMP: sensitivities are differences of reports that anyone can ask for", () => {
  it("spread, recovery, correlation and rate: the request with the input moved, less the request", () => {
    fc.assert(
      fc.property(quoted, rho, (pool, correlation) => {
        const flat = { kind: "flat" as const, rho: correlation };
        const request = requestOf(market, pool, flat, { tranches, include: ["sensitivities"] });
        const { tranches: base, sensitivities, pool: figures } = reportOf(request);
        const { include: _, ...plain } = request;
        const moved: Record<"spread01" | "recovery01" | "correlation01" | "rate01", PricingRequest> = {
          spread01: { ...plain, pool: bumped(pool, 1e-4) },
          recovery01: { ...plain, pool: pool.map((name) => ({ ...name, recovery: name.recovery + 0.01 })) },
          correlation01: { ...plain, correlation: { kind: "flat", rho: correlation + 0.01 } },
          rate01: { ...plain, discount: { kind: "flat", rate: 0.0201 } },
        };
        for (const figure of ["spread01", "recovery01", "correlation01", "rate01"] as const) {
          const then = reportOf(moved[figure]).tranches;
          for (const [i, sensitivity] of sensitivities!.entries()) {
            const difference = then[i]!.sellerValue! - base[i]!.sellerValue!;
            const allowed = Math.max(1e-4 * Math.abs(difference), 1e-8 * figures.notional);
            expect(Math.abs(sensitivity[figure]! - difference), figure).toBeLessThanOrEqual(allowed);
          }
        }
      }),
      runs(10),
    );
  });

  it("name by name: its spreads moved alone; the sum is the parallel move up to the cross term, second order in it", () => {
    fc.assert(
      fc.property(quoted, rho, (pool, correlation) => {
        const flat = { kind: "flat" as const, rho: correlation };
        const request = requestOf(market, pool, flat, { tranches, include: ["sensitivities"] });
        const { tranches: base, sensitivities, pool: figures } = reportOf(request);
        const { include: _, ...plain } = request;
        const first = reportOf({ ...plain, pool: bumped(pool, 1e-4, 0) }).tranches;
        for (const [i, { byName, spread01 }] of sensitivities!.entries()) {
          const difference = first[i]!.sellerValue! - base[i]!.sellerValue!;
          const allowed = Math.max(1e-4 * Math.abs(difference), 1e-8 * figures.notional);
          expect(Math.abs(byName[0]!.spread01! - difference)).toBeLessThanOrEqual(allowed);
          const sum = byName.reduce((total, name) => total + name.spread01!, 0);
          expect(Math.abs(sum - spread01!)).toBeLessThanOrEqual(
            0.02 * Math.abs(spread01!) + 1e-7 * figures.notional,
          );
        }
      }),
      runs(10),
    );
  });

  it("jump to default: the pool with that name in default, less today, less the protection then paid", () => {
    fc.assert(
      fc.property(quoted, rho, (pool, correlation) => {
        const flat = { kind: "flat" as const, rho: correlation };
        const request = requestOf(market, pool, flat, { tranches, include: ["sensitivities"] });
        const { tranches: base, sensitivities, pool: figures } = reportOf(request);
        const { include: _, ...plain } = request;
        const after = reportOf({
          ...plain,
          pool: pool.map((name, i) => (i === 0 ? { ...name, credit: { kind: "defaulted" } } : name)),
        });
        const lost = after.pool.realisedLoss;
        for (const [i, tranche] of after.tranches.entries()) {
          const eaten = Math.min(
            Math.max(lost - tranche.attachment, 0),
            tranche.detachment - tranche.attachment,
          );
          const jump = tranche.sellerValue! - base[i]!.sellerValue! - eaten * figures.notional;
          expect(Math.abs(sensitivities![i]!.byName[0]!.jumpToDefault! - jump)).toBeLessThanOrEqual(
            1e-8 * figures.notional,
          );
        }
      }),
      runs(8),
    );
  });

  it("over a pool cut into classes, all paid down, spread 01 and jumps are those of the pool contract together", () => {
    fc.assert(
      fc.property(quoted, rho, (pool, correlation) => {
        const cut = [0, 0.1, 0.3, 1].flatMap((detachment, i, all) =>
          i === 0
            ? []
            : [
                {
                  id: `T${i}`,
                  attachment: all[i - 1]!,
                  detachment,
                  running: 0.01,
                  upfront: 0,
                  recoveryPaydown: true,
                },
              ],
        );
        const flat = { kind: "flat" as const, rho: correlation };
        const value = (names: NameInput[]) => {
          const { pool: whole } = reportOf(requestOf(market, names, flat));
          return (0.01 * whole.annuity - whole.protectionLeg) * whole.notional;
        };
        const { sensitivities, pool: figures } = reportOf(
          requestOf(market, pool, flat, { tranches: cut, include: ["sensitivities"] }),
        );
        const sum = sensitivities!.reduce((total, { spread01 }) => total + spread01!, 0);
        const whole = value(bumped(pool, 1e-4)) - value(pool);
        expect(Math.abs(sum - whole)).toBeLessThanOrEqual(
          Math.max(1e-4 * Math.abs(whole), 1e-8 * figures.notional),
        );
      }),
      runs(8),
    );
  });
});
