import { describe, expect, it } from "vitest";
import { placedClasses, placingWords, readSizing, sizingFormOf } from "@/lib/alternatives/sizingForm";

const own = [
  { key: "E", id: "E", name: "Keel", attachment: "0", detachment: "3", running: "500", upfront: "40" },
  { key: "A", id: "A", name: "Deck", attachment: "3", detachment: "100", running: "25", upfront: "" },
];
const form = sizingFormOf(own);

describe("what is to be sized, as typed", () => {
  it("starts from the deal's classes: from the top, and the lowest takes what is left", () => {
    expect(form.rows.map(({ name }) => name)).toEqual(["Deck"]);
    expect([form.rest.name, form.top, form.step]).toEqual(["Keel", "100", "0.01"]);
  });

  it("is read in percent and basis points, and tells every fault at once with its field", () => {
    const typed = { ...form, rows: [{ ...form.rows[0]!, expectedLoss: "0,5", parSpread: "40" }] };
    expect(readSizing(typed)).toEqual({
      ok: true,
      top: 1,
      step: 0.0001,
      targets: [{ id: "A", limits: { expectedLoss: 0.005, parSpread: 0.004 } }],
    });
    const faulty = readSizing({ ...typed, top: "120", rows: [{ ...typed.rows[0]!, hitProbability: "-1" }] });
    expect(!faulty.ok && faulty.problems.map(({ path }) => path)).toEqual(["top", "rows.0.hitProbability"]);
  });

  it("becomes classes from the bottom up that keep the coupons of the deal's own", () => {
    const figures = { expectedLoss: 0, hitProbability: 0, parSpread: 0 };
    const sized = [
      { id: "A", ok: true, attachment: 0.0421, detachment: 1, binding: "expectedLoss", figures } as const,
    ];
    expect(placedClasses(form, sized, 0.0421, own)).toEqual([
      { ...own[0], detachment: "4.21" },
      { ...own[1], attachment: "4.21" },
    ]);
    expect(placedClasses(form, sized, 0, own)).toHaveLength(1);
    const stuck = [{ id: "A", ok: false, reason: "noLimit", detachment: 1 } as const];
    expect(placedClasses(form, stuck, 1, own)).toBeNull();
  });

  it("says in words which limit binds, and the least that an impossible one would have to be", () => {
    const tight = {
      id: "A",
      ok: false,
      reason: "tooTight",
      detachment: 0.05,
      limit: "hitProbability",
      least: 0.0321,
    } as const;
    expect(placingWords(tight)).toContain("below 5 % has a hit probability of 3.21 %");
    expect(placingWords(undefined)).toContain("Not reached");
  });
});
