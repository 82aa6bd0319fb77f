import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { allDigits, fourDigits } from "@/app/_ui/figures";

describe("figures on screen", () => {
  it.each([
    [0.00605, "basisPoints", "60.5"],
    [0.123456, "percent", "12.35"],
    [1_250_000.5, "money", "1\u202f250\u202f001"],
    [123_456, "plain", "123\u202f500"],
    [0.95238095, "plain", "0.9524"],
    [1.5e-7, "plain", "1.500e-7"],
    [-0.5, "percent", "-50"],
    [0, "money", "0"],
  ] as const)("shows %d as %s with four significant digits: %s", (value, unit, text) => {
    expect(fourDigits(value, unit)).toBe(text);
  });

  it("gives all digits without the noise of a multiplication: 0.07 is 7 %, not 7.000000000000001 %", () => {
    expect(0.07 * 100).not.toBe(7);
    expect(allDigits(0.07, "percent")).toBe("7");
  });

  it("gives digits that are the same number again", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(Number(allDigits(value))).toBe(value === 0 ? 0 : value);
      }),
    );
  });
});
