import { describe, expect, test } from "vitest";
import { curveAt } from "@/lib/quant/tranche/termCurve";

const curves = [
  {
    years: 3,
    nodes: [
      { strike: 0.03, rho: 0.3 },
      { strike: 0.07, rho: 0.4 },
    ],
  },
  {
    years: 5,
    nodes: [
      { strike: 0.03, rho: 0.4 },
      { strike: 0.1, rho: 0.54 },
    ],
  },
];
const reading = { interpolation: "linear", beyond: "flat" } as const;

describe("TERM: a base curve between quoted maturities", () => {
  test("is linear in ρ at equal K, at every strike that either curve quotes", () => {
    expect(curveAt(curves, 4, reading)).toEqual([
      { strike: 0.03, rho: expect.closeTo(0.35, 14) },
      { strike: 0.07, rho: expect.closeTo((0.4 + 0.48) / 2, 14) },
      { strike: 0.1, rho: expect.closeTo((0.4 + 0.54) / 2, 14) },
    ]);
  });

  test("is the quoted curve itself at its maturity, and the nearest one outside", () => {
    expect(curveAt(curves, 5, reading)).toEqual(curves[1]!.nodes);
    expect(curveAt(curves, 1, reading)).toEqual(curves[0]!.nodes);
    expect(curveAt(curves, 9, reading)).toEqual(curves[1]!.nodes);
  });
});
