import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  boundariesOf,
  classAbove,
  mergeUp,
  moveBoundary,
  raiseClass,
  splitClass,
  withClass,
} from "@/lib/deals/classEdits";
import type { ClassText } from "@/lib/deals/form";

function aClass(key: string, attachment: string, detachment: string): ClassText {
  return { key, id: key, name: key, attachment, detachment, running: "100", upfront: "2" };
}

const stack = [aClass("keel", "0", "3"), aClass("mid", "3", "7"), aClass("top", "7", "100")];
const strikes = (rows: readonly ClassText[]) =>
  rows.map(({ attachment, detachment }) => [attachment, detachment]);

describe("edits of the capital structure", () => {
  test("boundaries are named once, from the bottom up, with the classes below and above", () => {
    expect(boundariesOf(stack)).toEqual([
      { at: 0, below: null, above: "keel" },
      { at: 3, below: "keel", above: "mid" },
      { at: 7, below: "mid", above: "top" },
      { at: 100, below: "top", above: null },
    ]);
  });

  test("moving a boundary moves both classes that touch there", () => {
    expect(strikes(moveBoundary(stack, 3, 4.5))).toEqual([
      ["0", "4.5"],
      ["4.5", "7"],
      ["7", "100"],
    ]);
  });

  test("a boundary stops a hundredth of a percent short of the next one", () => {
    expect(strikes(moveBoundary(stack, 3, 9))[0]).toEqual(["0", "6.99"]);
    expect(strikes(moveBoundary(stack, 3, -2))[0]).toEqual(["0", "0.01"]);
  });

  test("a split keeps what the class spans, and the new half carries the coupon and no upfront", () => {
    const rows = splitClass(stack, "mid", "new");
    expect(strikes(rows)).toEqual([
      ["0", "3"],
      ["3", "5"],
      ["5", "7"],
      ["7", "100"],
    ]);
    expect(rows[2]).toMatchObject({ id: "new", running: "100", upfront: "" });
  });

  test("merging undoes a split's boundary, and a class with nothing above it stays", () => {
    expect(strikes(mergeUp(splitClass(stack, "mid", "new"), "mid"))).toEqual(strikes(stack));
    expect(mergeUp(stack, "top")).toEqual(stack);
    expect(classAbove(stack, "top")).toBeNull();
  });

  test("two classes that change places keep their thickness", () => {
    expect(strikes(raiseClass(stack, "keel"))).toEqual([
      ["4", "7"],
      ["0", "4"],
      ["7", "100"],
    ]);
  });

  test("a new class begins where the highest one ends", () => {
    expect(withClass([aClass("keel", "0", "3")], "x")[1]).toMatchObject({
      attachment: "3",
      detachment: "100",
    });
    expect(withClass([], "x")[0]).toMatchObject({ attachment: "0", detachment: "3" });
    expect(withClass(stack, "x")[3]).toMatchObject({ attachment: "", detachment: "" });
  });

  test("what does not read as a number is left as typed", () => {
    const rows = [aClass("keel", "0", "three"), aClass("mid", "3", "7")];
    expect(moveBoundary(rows, 3, 4)[0]).toEqual(rows[0]);
    expect(splitClass(rows, "keel", "new")).toEqual(rows);
  });

  test("however boundaries are dragged, the classes stay in order, touch, and span the same", () => {
    const drags = fc.array(
      fc.tuple(fc.integer({ min: 1, max: 2 }), fc.double({ min: -50, max: 150, noNaN: true })),
    );
    fc.assert(
      fc.property(drags, (moves) => {
        const end = moves.reduce<readonly ClassText[]>(
          (rows, [i, to]) => moveBoundary(rows, boundariesOf(rows)[i]!.at, to),
          stack,
        );
        const edges = boundariesOf(end).map(({ at }) => at);
        expect(edges).toHaveLength(4);
        expect(edges[0]).toBe(0);
        expect(edges[3]).toBe(100);
        expect(edges[1]! < edges[2]!).toBe(true);
      }),
    );
  });
});
