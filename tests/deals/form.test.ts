import { describe, expect, test } from "vitest";
import { checkDeal, dealPath } from "@/lib/deals/check";
import { type DealForm, dealFormOf, readDealForm } from "@/lib/deals/form";
import { type DealParts, toRequest } from "@/lib/deals/request";
import type { DealContent, DealCorrelation } from "@/lib/deals/schema";
import { Refusal } from "@/lib/platform/errors";
import { aMarket, aPool } from "../support/builders";

const content: DealContent = {
  maturity: "2031-12-20",
  years: null,
  law: "finite",
  correlation: { kind: "flat", rho: 0.275 },
  classes: [
    { id: "k", name: "Keel", attachment: 0, detachment: 0.03, running: 0.05, upfront: 0.415 },
    { id: "h", name: "Hull", attachment: 0.03, detachment: 0.07 },
  ],
  nthToDefault: [1, 2],
  notes: "a remark",
};
const formOf = (part: Partial<DealContent> = {}): DealForm =>
  dealFormOf({ name: "D", poolId: "p", marketId: "m", content: { ...content, ...part } });

const quotedPool = {
  key: "q",
  name: "Quotes",
  poolId: "index",
  maturities: [
    {
      maturity: "2029-12-20",
      years: null,
      quotes: [{ attachment: 0, detachment: 0.03, running: 0.05, upfront: 0.3 }],
      solved: [{ strike: 0.03, rho: 0.3 }],
    },
    {
      maturity: "2031-12-20",
      years: null,
      quotes: [{ attachment: 0, detachment: 0.03, running: 0.05, upfront: 0.4 }],
      solved: [{ strike: 0.03, rho: 0.5 }],
    },
  ],
};

function parts(correlation: DealCorrelation, maturity = "2031-12-20"): DealParts {
  const { names, currency } = aPool(4);
  const market = { ...aMarket().content, quotedPools: [quotedPool] };
  return {
    content: { ...content, correlation, maturity, nthToDefault: [] },
    currency,
    names,
    pricingDate: "2026-11-30",
    market,
    quotedNames: { index: aPool(2).names },
  };
}
const ofMarket = {
  kind: "market",
  quotedPool: "q",
  interpolation: "linear",
  beyond: "flat",
  mapping: "none",
} as const;

describe("a deal as typed", () => {
  test.each<DealCorrelation>([
    { kind: "flat", rho: 0.275 },
    { kind: "loadings" },
    { kind: "sector", within: 0.3, between: 0.1 },
    {
      kind: "base",
      nodes: [
        { strike: 0.03, rho: 0.42 },
        { strike: 0.07, rho: 0.551 },
      ],
      interpolation: "monotone",
      beyond: "linear",
      mapping: "moneyness",
    },
    ofMarket,
    {
      kind: "base",
      quotes: [{ attachment: 0, detachment: 0.03, running: 0.05, upfront: 0.4 }],
      interpolation: "linear",
      beyond: "flat",
      mapping: "none",
    },
  ])("comes back as it was stored: $kind correlation", (correlation) => {
    const stored = { ...content, correlation };
    const reading = readDealForm(formOf({ correlation }), "standard", stored);
    expect(reading).toEqual({ ok: true, content: stored });
  });

  test("tells every field that does not read at once, beside the field, with what was typed", () => {
    const form = { ...formOf(), rho: "thirty", nthToDefault: "1, two" };
    const classes = [
      { ...form.classes[0]!, detachment: "" },
      { ...form.classes[1]!, running: "5 00 x" },
    ];
    const reading = readDealForm({ ...form, classes }, "standard", null);
    expect(reading.ok ? [] : reading.problems.map(({ path, message }) => [path, message])).toEqual([
      ["content.classes.0.detachment", "Keel: the detachment is missing."],
      ["content.classes.1.running", 'Hull: the coupon must be a number (it is "5 00 x").'],
      ["content.correlation.rho", 'The correlation must be a number (it is "thirty").'],
      ["content.nthToDefault", 'An n-th-to-default contract must be a number (it is "two").'],
    ]);
  });

  test("a base curve's lines and a quoted pool that was not chosen are told by name", () => {
    const base = formOf();
    const curve = { ...base.correlation, kind: "base" as const, nodes: "3 40\nseven 50" };
    const problemsOf = (correlation: DealForm["correlation"]) => {
      const reading = readDealForm({ ...base, correlation }, "standard", null);
      return reading.ok ? [] : reading.problems.map(({ message }) => message);
    };
    expect(problemsOf(curve)).toEqual([
      'Line 2 of the base curve ("seven 50") is not a strike and a correlation in percent.',
    ]);
    expect(problemsOf({ ...curve, nodes: "" })).toEqual(["Give the base curve at least one strike."]);
    expect(problemsOf({ ...curve, kind: "market" })).toEqual([
      "Choose a quoted pool of the market; a market gets them on its own page.",
    ]);
  });
});

describe("the request of a deal", () => {
  test("takes the quotes themselves at a quoted maturity", () => {
    expect(toRequest(parts(ofMarket)).correlation).toMatchObject({
      kind: "base",
      quotes: quotedPool.maturities[1]!.quotes,
      index: { pool: aPool(2).names },
    });
  });

  test("takes the curve between quoted maturities, linear in ρ by ACT/365", () => {
    const { correlation } = toRequest(parts(ofMarket, "2030-12-20"));
    const day = 86_400_000;
    const [from, at, to] = ["2029-12-20", "2030-12-20", "2031-12-20"].map((date) => Date.parse(date) / day);
    const rho = 0.3 + (0.2 * (at! - from!)) / (to! - from!);
    expect(correlation).toMatchObject({ nodes: [{ strike: 0.03, rho: expect.closeTo(rho, 12) }] });
  });

  test("a quoted pool that the market does not have is refused beside the correlation", () => {
    expect(() => checkDeal(parts({ ...ofMarket, quotedPool: "gone" }))).toThrow(Refusal);
    try {
      checkDeal(parts({ ...ofMarket, quotedPool: "gone" }));
    } catch (error) {
      expect((error as Refusal).problems.map(({ path }) => path)).toEqual(["content.correlation.nodes"]);
    }
  });

  test("problems of the request stand at the deal's own fields", () => {
    expect(dealPath("tranches.2.attachment")).toBe("content.classes.2.attachment");
    expect(dealPath("pool.7.recovery")).toBe("poolId");
    expect(dealPath("discount.nodes.1.years")).toBe("marketId");
    expect(dealPath("schedule.maturity")).toBe("content.maturity");
  });
});
