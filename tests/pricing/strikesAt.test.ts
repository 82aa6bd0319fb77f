import { describe, expect, test } from "vitest";
import { readBaseCurve } from "@/lib/pricing/baseReading";
import { strikesAt } from "@/lib/pricing/strikesAt";

const nodes = [
  { strike: 0.03, rho: 0.4 },
  { strike: 0.07, rho: 0.5 },
  { strike: 0.15, rho: 0.6 },
];
const linear = { interpolation: "linear", beyond: "flat" } as const;

describe("the strikes at which a base curve reads a correlation", () => {
  test("a rising curve reads each correlation between its nodes at one strike: 45 % half-way from 3 % to 7 %", () => {
    expect(strikesAt(nodes, linear, 0.45)).toEqual([expect.closeTo(0.05, 12)]);
    expect(strikesAt(nodes, linear, 0.5)).toEqual([expect.closeTo(0.07, 12)]);
  });

  test("a monotone cubic read at a strike is found at that strike again", () => {
    const reading = { interpolation: "monotone", beyond: "linear" } as const;
    for (const strike of [0.01, 0.041, 0.1, 0.2])
      expect(strikesAt(nodes, reading, readBaseCurve(nodes, reading)(strike))).toEqual([
        expect.closeTo(strike, 9),
      ]);
  });

  test("where the curve is held flat no single strike can be told", () => {
    expect(strikesAt(nodes, linear, 0.6)).toBeNull();
    expect(strikesAt(nodes, linear, 0.4)).toBeNull();
  });

  test("a curve that turns reads a correlation at two strikes, and one it never reaches at none", () => {
    const hump = [...nodes, { strike: 0.23, rho: 0.5 }];
    expect(strikesAt(hump, linear, 0.55)).toEqual([expect.closeTo(0.11, 12), expect.closeTo(0.19, 12)]);
    expect(strikesAt(nodes, linear, 0.7)).toEqual([]);
  });
});
