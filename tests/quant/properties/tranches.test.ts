import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { discountCurve, discountFactor } from "@/lib/quant/market/discountCurve";
import {
  classes,
  markets,
  onePeriod,
  poolsWithDependence,
  reportOf,
  requestOf,
  runs,
  strikeLadders,
} from "./draws";

/** Classes whose recoveries are paid down from the top all the way: together they are the pool. */
function paidDown(strikes: readonly number[]) {
  return classes(strikes).map((tranche) => ({ ...tranche, recoveryPaydown: true }));
}

describe("TRANCHE: classes that share the pool out between them", () => {
  it("lose, cost and pay together what the pool does: expected loss, protection, annuity", () => {
    fc.assert(
      fc.property(markets, poolsWithDependence(10), strikeLadders, (market, [pool, correlation], strikes) => {
        const { tranches, pool: whole } = reportOf(
          requestOf(market, pool, correlation, { tranches: paidDown(strikes) }),
        );
        const together = (figure: "expectedLoss" | "protectionLeg" | "annuity") =>
          tranches.reduce(
            (sum, tranche) => sum + tranche[figure]! * (tranche.detachment - tranche.attachment),
            0,
          );
        expect(Math.abs(together("expectedLoss") - whole.expectedLoss)).toBeLessThanOrEqual(1e-11);
        expect(Math.abs(together("protectionLeg") - whole.protectionLeg)).toBeLessThanOrEqual(1e-11);
        expect(Math.abs(together("annuity") - whole.annuity)).toBeLessThanOrEqual(1e-10);
      }),
      runs(36),
    );
  });

  it("split in two, lose, cost, pay and are worth the same together", () => {
    const cuts = fc.tuple(
      fc.double({ min: 0, max: 0.3, noNaN: true }),
      fc.double({ min: 0.02, max: 0.3, noNaN: true }),
      fc.double({ min: 0.02, max: 0.3, noNaN: true }),
    );
    fc.assert(
      fc.property(
        markets,
        poolsWithDependence(10),
        cuts,
        (market, [pool, correlation], [from, first, second]) => {
          const [middle, to] = [from + first, from + first + second];
          const both = [
            { id: "whole", attachment: from, detachment: to, running: 0.02, upfront: 0.01 },
            { id: "lower", attachment: from, detachment: middle, running: 0.02, upfront: 0.01 },
            { id: "upper", attachment: middle, detachment: to, running: 0.02, upfront: 0.01 },
          ];
          const { tranches, pool: figures } = reportOf(
            requestOf(market, pool, correlation, { tranches: both }),
          );
          const [whole, lower, upper] = tranches;
          for (const figure of ["expectedLoss", "protectionLeg", "annuity", "upfrontAtRunning"] as const) {
            const parts = (lower![figure]! * first + upper![figure]! * second) / (to - from);
            expect(Math.abs(parts - whole![figure]!)).toBeLessThanOrEqual(1e-10);
          }
          const value = lower!.sellerValue! + upper!.sellerValue!;
          expect(Math.abs(value - whole!.sellerValue!)).toBeLessThanOrEqual(1e-10 * figures.notional);
        },
      ),
      runs(60),
    );
  });

  it("seller and buyer: at the upfront of the report the value is nothing, and what one gains the other loses", () => {
    fc.assert(
      fc.property(markets, poolsWithDependence(8), strikeLadders, (market, [pool, correlation], strikes) => {
        const priced = reportOf(requestOf(market, pool, correlation, { tranches: classes(strikes, 0.05) }));
        const fair = priced.tranches.map(({ id, attachment, detachment, upfrontAtRunning }) => ({
          id,
          attachment,
          detachment,
          running: 0.05,
          upfront: Math.min(Math.max(upfrontAtRunning!, -10), 10),
        }));
        const turned = fair.map((tranche) => ({
          ...tranche,
          running: -tranche.running,
          upfront: -tranche.upfront,
        }));
        const seller = reportOf(requestOf(market, pool, correlation, { tranches: fair }));
        const buyer = reportOf(requestOf(market, pool, correlation, { tranches: turned }));
        const none = reportOf(
          requestOf(market, pool, correlation, {
            tranches: fair.map((tranche) => ({ ...tranche, running: 0, upfront: 0 })),
          }),
        );
        for (const [i, tranche] of seller.tranches.entries()) {
          const scale = tranche.notional;
          expect(Math.abs(tranche.sellerValue!)).toBeLessThanOrEqual(1e-13 * scale + 1e-15);
          const paid = tranche.sellerValue! - none.tranches[i]!.sellerValue!;
          const received = buyer.tranches[i]!.sellerValue! - none.tranches[i]!.sellerValue!;
          expect(Math.abs(paid + received)).toBeLessThanOrEqual(1e-12 * scale);
        }
      }),
      runs(18),
    );
  });

  it("par spread times annuity is the protection leg; the upfront at par is nothing", () => {
    fc.assert(
      fc.property(markets, poolsWithDependence(8), strikeLadders, (market, [pool, correlation], strikes) => {
        const { tranches } = reportOf(requestOf(market, pool, correlation, { tranches: classes(strikes) }));
        for (const { parSpread, annuity, protectionLeg, upfrontAtRunning } of tranches) {
          expect(Math.abs(protectionLeg! - 0.01 * annuity! - upfrontAtRunning!)).toBeLessThanOrEqual(1e-14);
          if (parSpread === null) expect(Math.abs(annuity!)).toBeLessThanOrEqual(1e-13);
          else expect(Math.abs(parSpread * annuity! - protectionLeg!)).toBeLessThanOrEqual(1e-14);
        }
      }),
      runs(36),
    );
  });

  it("one period by hand: protection at its middle, premium on what is left and half on what was lost", () => {
    const curve = discountCurve(onePeriod.discount);
    if (!curve.ok) throw new Error("the flat curve is refused");
    const [middle, end] = [0.5, 1].map((t) => discountFactor(curve.value, t));
    fc.assert(
      fc.property(poolsWithDependence(8), strikeLadders, ([pool, correlation], strikes) => {
        const live = pool.filter((name) => name.credit.kind !== "defaulted");
        fc.pre(live.length > 0);
        const tranches = classes(strikes).map((tranche) => ({ ...tranche, recoveryPaydown: false }));
        for (const tranche of reportOf(requestOf(onePeriod, live, correlation, { tranches })).tranches) {
          const loss = tranche.expectedLoss!;
          expect(Math.abs(tranche.protectionLeg! - middle! * loss)).toBeLessThanOrEqual(1e-14);
          const annuity = end! * (1 - loss) + 0.5 * middle! * loss;
          expect(Math.abs(tranche.annuity! - annuity)).toBeLessThanOrEqual(1e-13);
        }
      }),
      runs(60),
    );
  });
});
