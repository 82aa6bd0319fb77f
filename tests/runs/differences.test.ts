import { describe, expect, test } from "vitest";
import type { PricingRequest } from "@/lib/pricing/request";
import { inputDifferences } from "@/lib/runs/differences";
import { aName } from "../support/builders";

const request: PricingRequest = {
  format: 1,
  pricingDate: "2026-12-01",
  schedule: { kind: "standard", maturity: "2031-12-20", holidays: [] },
  discount: { kind: "flat", rate: 0.02 },
  pool: [aName({ id: "A" }), aName({ id: "B" })],
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [{ id: "low", attachment: 0, detachment: 0.1, running: 0.05 }],
};

describe("what two requests do not have in common", () => {
  test("the same request has nothing, however its fields are ordered", () => {
    const { pool, ...rest } = request;
    expect(inputDifferences(request, { pool, ...rest })).toEqual([]);
  });

  test("names are told one by one: taken out, put in, and field by field", () => {
    const after = {
      ...request,
      pool: [{ ...request.pool[0]!, recovery: 0.2 }, aName({ id: "C", name: "" })],
    };
    expect(
      inputDifferences(request, after).map(({ what, before, after: now }) => [what, before, now]),
    ).toEqual([
      ["Name B, taken out", request.pool[1], null],
      ["Name A, recovery", 0.4, 0.2],
      ["C, put in", null, after.pool[1]],
    ]);
  });

  test("classes are told by field, and a field that came or went has an empty side", () => {
    const after: PricingRequest = {
      ...request,
      tranches: [{ id: "low", attachment: 0, detachment: 0.12, upfront: 0.3 }],
      law: { kind: "largePool" },
    };
    expect(inputDifferences(request, after)).toEqual([
      { part: "Correlation", what: "Loss law", before: null, after: { kind: "largePool" } },
      { part: "Structure", what: "low, detachment", before: 0.1, after: 0.12 },
      { part: "Structure", what: "low, running", before: 0.05, after: null },
      { part: "Structure", what: "low, upfront", before: null, after: 0.3 },
    ]);
  });
});
