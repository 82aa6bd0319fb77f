import { describe, expect, it } from "vitest";
import { readMarket } from "@/lib/markets/check";
import { blankForm, formOf, mergedForm, readForm } from "@/lib/markets/form";

const flat = { ...blankForm("2026-11-30"), name: "Quay", rate: "2,5" };

describe("a market as typed", () => {
  it("is read with a decimal comma or point, rates in percent", () => {
    const content = { discount: { kind: "flat", rate: 0.025 }, schedule: { kind: "standard", holidays: [] } };
    expect(readForm(flat)).toEqual({ ok: true, name: "Quay", pricingDate: "2026-11-30", content });
    expect(readForm({ ...flat, rate: "2.5 %" })).toMatchObject({ ok: true, content });
  });

  it("comes back from what was saved, digit for digit", () => {
    const form = {
      ...flat,
      rate: "",
      discountKind: "zero" as const,
      nodes: [
        { years: "1", rate: "2.15" },
        { years: "5", rate: "-0.3" },
      ],
      holidays: "2026-12-25\n2027-01-01",
    };
    const reading = readForm(form);
    expect(reading.ok && formOf(reading)).toEqual(form);
  });

  it("shows every problem at once, beside its field", () => {
    const reading = readForm({
      ...flat,
      name: " ",
      pricingDate: "30.11.2026",
      discountKind: "zero",
      nodes: [
        { years: "one", rate: "2" },
        { years: "2", rate: "" },
      ],
      holidays: "2026-12-25 Christmas",
    });
    expect(!reading.ok && Object.keys(reading.problems).sort()).toEqual([
      "content.discount.nodes.0.years",
      "content.discount.nodes.1.rate",
      "content.schedule.holidays",
      "name",
      "pricingDate",
    ]);
  });

  it.each([
    [
      "nodes out of order",
      {
        discountKind: "zero",
        nodes: [
          { years: "5", rate: "2" },
          { years: "3", rate: "2" },
        ],
      },
      "content.discount.nodes.1.years",
    ],
    [
      "a par node between whole years",
      { discountKind: "par", nodes: [{ years: "1.5", rate: "2" }] },
      "content.discount.nodes.0.years",
    ],
    ["a date that does not exist", { pricingDate: "2026-02-30" }, "pricingDate"],
    ["a holiday that does not exist", { holidays: "2026-13-01" }, "content.schedule.holidays.0"],
    [
      "payments a year that are no whole number",
      { scheduleKind: "even", perYear: "2.5" },
      "content.schedule.perYear",
    ],
    ["no nodes", { discountKind: "zero", nodes: [] }, "content.discount.nodes"],
  ] as const)("refuses %s", (_, part, path) => {
    const reading = readForm({ ...flat, ...part, nodes: [...("nodes" in part ? part.nodes : flat.nodes)] });
    expect(!reading.ok && Object.keys(reading.problems)).toEqual([path]);
  });
});

describe("my changes over a newer version", () => {
  const theirs = { ...flat, name: "Quay B", rate: "3", holidays: "2026-12-25" };

  it("leave theirs wherever I typed nothing", () => {
    const mine = { ...flat, pricingDate: "2026-12-01" };
    expect(mergedForm(flat, mine, theirs)).toEqual({ ...theirs, pricingDate: "2026-12-01" });
  });

  it("take the whole curve when I changed a part of it", () => {
    const mine = { ...flat, discountKind: "zero" as const };
    expect(mergedForm(flat, mine, theirs)).toEqual({ ...theirs, discountKind: "zero", rate: "2,5" });
  });
});

describe("what the pricing core reads from a market", () => {
  it("discounts a flat 2 % over 10 years by exp(-0.2) = 0.818730753…", () => {
    const table = readMarket("2026-11-30", {
      discount: { kind: "flat", rate: 0.02 },
      schedule: { kind: "even", perYear: 4 },
    });
    const last = table.ok ? table.points.at(-1) : undefined;
    expect(last?.discountFactor).toBeCloseTo(0.8187307530779818, 15);
    expect(last?.zeroRate).toBeCloseTo(0.02, 15);
  });

  it("bootstraps a par rate of 5 % at one year to 1/1.05", () => {
    const table = readMarket("2026-11-30", {
      discount: { kind: "par", nodes: [{ years: 1, rate: 0.05 }] },
      schedule: { kind: "even", perYear: 4 },
    });
    expect(table.ok && table.points.find(({ years }) => years === 1)?.discountFactor).toBeCloseTo(
      1 / 1.05,
      14,
    );
  });

  it("pays on the next business day when the 20th is a Sunday, and a day later when that is a holiday", () => {
    // 20 December 2026 is a Sunday (ISO 8601 calendar).
    const first = (holidays: string[]) => {
      const table = readMarket("2026-11-30", {
        discount: { kind: "flat", rate: 0.02 },
        schedule: { kind: "standard", holidays },
      });
      return table.ok ? table.payments[0]?.date : null;
    };
    expect(first([])).toBe("2026-12-21");
    expect(first(["2026-12-21"])).toBe("2026-12-22");
  });
});
