import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readHeader } from "@/lib/pools/import/columns";
import { inUnit, readNumber } from "@/lib/pools/import/numbers";
import { recogniseColumns } from "@/lib/pools/import/recognise";
import { readTable } from "@/lib/pools/import/table";

describe("numbers in cells", () => {
  it.each([
    ["1,234,567.5", ".", 1_234_567.5],
    ["1.234.567,5", ",", 1_234_567.5],
    ["1 234 567,5", ",", 1_234_567.5],
    ["1\u00a0234\u202f567", ",", 1_234_567],
    ["1'234'567.5", ".", 1_234_567.5],
    ["(12.5)", ".", -12.5],
    ["\u22121.5", ".", -1.5],
    ["€ 1,000", ".", 1_000],
    ["1e6", ".", 1e6],
    [",5", ",", 0.5],
  ] as const)("reads %s with the decimal mark %s as %d", (cell, mark, value) => {
    expect(readNumber(cell, mark)?.value).toBe(value);
  });

  it.each([
    ["1,23", "."],
    ["1.23", ","],
    ["12,34,567", "."],
    ["1.2.3", "."],
    ["Infinity", "."],
    ["0x10", "."],
    ["ten", "."],
    ["1e999", "."],
    ["", "."],
  ] as const)("takes %s with the decimal mark %s for no number instead of guessing", (cell, mark) => {
    expect(readNumber(cell, mark)).toBeNull();
  });

  it.each([
    ["40%", 0.4],
    ["85.5 bp", 0.00855],
    ["85.5bps", 0.00855],
    ["10m", 1e7],
    ["2.5 mio", 2.5e6],
    ["750k", 7.5e5],
    ["EUR 10 mn", 1e7],
  ])("reads the unit in %s", (cell, value) => {
    const found = readNumber(cell, ".")!;
    expect(inUnit(found.value, found.unit ?? "plain")).toBe(value);
  });

  it("gives back every finite decimal it is shown, with either mark", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(readNumber(String(value), ".")?.value).toBe(Number(String(value)));
        expect(readNumber(String(value).replace(".", ","), ",")?.value).toBe(Number(String(value)));
      }),
    );
  });
});

describe("the decimal mark of a column", () => {
  const marks = (text: string) =>
    recogniseColumns(readTable(text)!).map(({ mark, remark }) => [mark, remark !== null]);

  it("comes from what its cells prove", () => {
    expect(marks("id;notional;recovery\na;1.000.000;0,4")).toEqual([
      [",", false],
      [",", false],
      [",", false],
    ]);
  });

  it("comes from the other columns where its own cells prove nothing", () => {
    expect(marks("id;notional;recovery\na;8.000;0,4")[1]).toEqual([",", false]);
  });

  it("is a point with a remark where nothing in the table proves one", () => {
    expect(marks("id\tnotional\na\t8,000")[1]).toEqual([".", true]);
  });

  it("carries a remark where the cells disagree", () => {
    expect(marks("id\tnotional\na\t8.5\nb\t8,55\nc\t9.5")[1]).toEqual([".", true]);
  });
});

describe("header cells", () => {
  it.each([
    ["Reference Entity", "name", null, null],
    ["OBLIGOR_NAME", "name", null, null],
    ["EntityId", "id", null, null],
    ["Notional (EUR m)", "notional", "millions", null],
    ["Nominal '000", "notional", "thousands", null],
    ["Exposure", "notional", null, null],
    ["Rec. Rate %", "recovery", "percent", null],
    ["LGD", "lossGivenDefault", null, null],
    ["Industry", "sector", null, null],
    ["5y", "spread", null, 5],
    ["Spread 3Y (bp)", "spread", "basisPoints", 3],
    ["18M bps", "spread", "basisPoints", 1.5],
    ["Par spread", "spread", null, 5],
    ["1Y PD", "yearly", null, null],
    ["3Y PD %", "cumulative", "percent", 3],
    ["Probabilité de défaut", "yearly", null, null],
    ["Upfront 5Y (decimal)", "upfront", "plain", 5],
    ["Asset beta", "loading", null, null],
    ["Comment", "ignore", null, null],
  ])("reads %s as %s", (header, field, unit, years) => {
    expect(readHeader(header)).toEqual({ field, unit, years });
  });
});
