import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  applyDraft,
  emptyDraft,
  isEmpty,
  typedColumns,
  withAdded,
  withRemoved,
  withTyped,
  withTypedCells,
} from "@/lib/pools/draft";
import { cellText, gridColumns, valueIn } from "@/lib/pools/grid";
import { digitsIn, inUnit } from "@/lib/pools/import/numbers";
import type { NameInput } from "@/lib/pricing/request";

const spread = (value: number) => ({ kind: "spread" as const, nodes: [{ years: 5, spread: value }] });
const names: NameInput[] = [
  { id: "a", name: "Aldermoor", notional: 10, recovery: 0.4, credit: spread(0.00605) },
  { id: "b", notional: 20, recovery: 0.35, credit: spread(0.012) },
];
const columns = gridColumns(names, "EUR");
const column = (key: string) => columns.find((found) => found.key === key)!;

describe("the names grid", () => {
  it("shows units in its headers and one spread column a tenor", () => {
    expect(columns.map(({ header }) => header)).toEqual([
      "Id",
      "Name",
      "Sector",
      "Notional (EUR)",
      "Recovery (%)",
      "Spread 5Y (bp)",
    ]);
  });

  it("shows a decimal in the column's unit with all its digits: 0.00605 is 60.5 bp", () => {
    const cell = column("spread 5");
    expect(cellText(valueIn(names[0]!, cell), cell.unit)).toBe("60.5");
  });

  it("shows digits that read back as the same number, to the last bit", () => {
    const unit = fc.constantFrom("plain" as const, "percent" as const, "basisPoints" as const);
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e15, max: 1e15 }),
        unit,
        (value, u) => {
          fc.pre(Math.abs(value) > 1e-300);
          const digits = digitsIn(value, u);
          const places = { plain: 0, percent: -2, basisPoints: -4 }[u];
          expect(Number(`${digits}e${places}`)).toBe(value);
        },
      ),
    );
    expect(inUnit(35, "percent")).toBe(0.35);
    expect(inUnit(60.5, "basisPoints")).toBe(0.00605);
  });
});

describe("a draft laid over saved names", () => {
  it("changes only the row that was typed in, with a comma or a point", () => {
    const draft = withTyped(emptyDraft(1), "b", column("recovery"), "37,5", names[1]!);
    const rows = applyDraft(names, columns, draft);
    expect(rows[0]?.name).toBe(names[0]);
    expect(rows[1]?.name).toEqual({ ...names[1], recovery: 0.375 });
  });

  it("keeps what was typed where it does not fit, with the reason", () => {
    const draft = withTyped(emptyDraft(1), "b", column("recovery"), "140", names[1]!);
    const row = applyDraft(names, columns, draft)[1]!;
    expect(row.typed).toEqual({ recovery: "140" });
    expect(row.name).toBeNull();
    expect(row.problems).toMatchObject([
      { column: "Recovery (%)", value: "140", reason: "must be at least 0 % and below 100 %" },
    ]);
  });

  it("is empty again when the saved text is typed back", () => {
    const draft = withTyped(emptyDraft(1), "a", column("notional"), "11", names[0]!);
    expect(isEmpty(draft)).toBe(false);
    expect(isEmpty(withTyped(draft, "a", column("notional"), "10", names[0]!))).toBe(true);
  });

  it("refuses an id that another row has", () => {
    const draft = withTyped(emptyDraft(1), "b", column("id"), "a", names[1]!);
    expect(applyDraft(names, columns, draft)[1]?.problems[0]?.reason).toBe("is already the id of line 1");
  });

  it("shows the columns something was typed into, though no saved name uses them", () => {
    const further = gridColumns(names, "EUR", [{ field: "cumulative", years: 3 }]);
    const typed = further.find(({ key }) => key === "cumulative 3")!;
    const draft = withTyped(emptyDraft(1), "a", typed, "1", names[0]!);
    expect(typedColumns(draft)).toEqual([{ field: "cumulative", years: 3 }]);
    expect(typedColumns(withTyped(emptyDraft(1), "a", column("recovery"), "1", names[0]!))).toEqual([]);
  });

  it("takes a pasted block cell by cell", () => {
    const block = ["11", "30"].map((text, i) => ({
      row: { key: names[i]!.id, saved: names[i]! },
      column: column("notional"),
      text,
    }));
    const rows = applyDraft(names, columns, withTypedCells(emptyDraft(1), block));
    expect(rows.map(({ name }) => name?.notional)).toEqual([11, 30]);
  });

  it("adds and removes rows", () => {
    const added = withAdded(emptyDraft(1), "new");
    expect(applyDraft(names, columns, added)).toHaveLength(3);
    expect(applyDraft(names, columns, withRemoved(added, "new"))).toHaveLength(2);
    expect(applyDraft(names, columns, withRemoved(emptyDraft(1), "a")).map(({ key }) => key)).toEqual(["b"]);
  });

  it("keeps typed cells over a newer version, and brings back a row that someone else removed", () => {
    const draft = withTyped(emptyDraft(1), "b", column("recovery"), "30", names[1]!);
    const theirs = [{ ...names[1]!, notional: 99 }];
    expect(applyDraft(theirs, columns, draft)[0]?.name).toMatchObject({ notional: 99, recovery: 0.3 });
    expect(applyDraft([names[0]!], columns, draft).find(({ key }) => key === "b")?.typed).toEqual({
      recovery: "30",
    });
  });
});
