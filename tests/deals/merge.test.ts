import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { blankCorrelation } from "@/lib/deals/correlationForm";
import type { ClassText, DealForm } from "@/lib/deals/form";
import { mergeForms, withTheirs } from "@/lib/deals/merge";

const aClass = (key: string, part: Partial<ClassText> = {}): ClassText => ({
  key,
  id: key,
  name: key,
  attachment: "0",
  detachment: "3",
  running: "500",
  upfront: "",
  ...part,
});
const base: DealForm = {
  name: "D",
  poolId: "p",
  marketId: "m",
  maturity: "2031-12-20",
  years: "",
  rho: "30",
  correlation: blankCorrelation,
  law: "finite",
  classes: [aClass("K"), aClass("H", { attachment: "3", detachment: "7" })],
  nthToDefault: "",
  notes: "",
};

describe("two people change one deal", () => {
  test("different fields, different classes and new classes do not conflict", () => {
    const mine = {
      ...base,
      rho: "35",
      classes: [...base.classes, aClass("mine", { attachment: "7", detachment: "10" })],
    };
    const theirs = {
      ...base,
      notes: "theirs",
      classes: [
        { ...base.classes[0]!, running: "600" },
        base.classes[1]!,
        aClass("theirs", { attachment: "10", detachment: "12" }),
      ],
    };
    const { form, conflicts } = mergeForms(base, mine, theirs);
    expect(conflicts).toEqual([]);
    expect(form).toMatchObject({ rho: "35", notes: "theirs" });
    expect(form.classes.map(({ key, running }) => [key, running])).toEqual([
      ["K", "600"],
      ["H", "500"],
      ["theirs", "500"],
      ["mine", "500"],
    ]);
  });

  test("the same field changed differently is theirs to choose, with both texts; until then one's own stays", () => {
    const mine = { ...base, classes: [{ ...base.classes[0]!, detachment: "4" }, base.classes[1]!] };
    const theirs = { ...base, classes: [{ ...base.classes[0]!, detachment: "5" }, base.classes[1]!] };
    const merged = mergeForms(base, mine, theirs);
    expect(merged.conflicts).toEqual([
      { path: "classes/K/detachment", label: "Class K, detachment (%)", mine: "4", theirs: "5" },
    ]);
    expect(merged.form.classes[0]?.detachment).toBe("4");
    const chosen = withTheirs(merged, theirs, new Set(["classes/K/detachment"]));
    expect(chosen.classes[0]?.detachment).toBe("5");
  });

  test("a class removed by one and changed by the other is a conflict; left alone by the other it goes", () => {
    const without = { ...base, classes: [base.classes[0]!] };
    const changed = { ...base, classes: [base.classes[0]!, { ...base.classes[1]!, upfront: "2" }] };
    expect(mergeForms(base, without, base).form.classes.map(({ key }) => key)).toEqual(["K"]);
    const merged = mergeForms(base, without, changed);
    expect(merged.conflicts.map(({ path, mine }) => [path, mine])).toEqual([["classes/H", "removed"]]);
    expect(withTheirs(merged, changed, new Set(["classes/H"])).classes.map(({ key }) => key)).toEqual([
      "K",
      "H",
    ]);
  });

  test("whatever each side typed, nothing of one side is lost without being told", () => {
    const field = fc.constantFrom("a", "b", "c");
    const form = fc
      .record({ notes: field, rho: field, maturity: field })
      .map((part) => ({ ...base, ...part }));
    fc.assert(
      fc.property(form, form, form, (was, mine, theirs) => {
        const { form: merged, conflicts } = mergeForms(was, mine, theirs);
        for (const key of ["notes", "rho", "maturity"] as const) {
          const isTold = conflicts.some(({ path }) => path === key);
          if (mine[key] !== was[key]) expect(merged[key]).toBe(mine[key]);
          if (theirs[key] !== was[key] && merged[key] !== theirs[key]) expect(isTold).toBe(true);
        }
      }),
    );
  });
});
