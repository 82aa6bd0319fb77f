import fc from "fast-check";
import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { readPool } from "@/lib/pools/import/read";
import { poolNameProblems } from "@/lib/pricing/refusals";

const headers = [
  "Id",
  "Name",
  "Sector",
  "Notional",
  "Recovery",
  "Spread 1Y",
  "Spread 5Y",
  "Cum PD 3Y",
  "Upfront",
  "Coupon",
];
const cell = fc.oneof(
  fc.constantFrom(
    "",
    "-",
    "n/a",
    "0",
    "1",
    "40%",
    "0,4",
    "1.000,5",
    "1,000.5",
    "(3)",
    "85 bp",
    "1e400",
    "NaN",
    "=1+1",
  ),
  fc.double().map(String),
  fc.integer({ min: -10, max: 500 }).map(String),
  fc.string({ maxLength: 8 }),
);
const mostly = (...fitting: string[]) =>
  fc.oneof({ weight: 12, arbitrary: fc.constantFrom(...fitting) }, { weight: 1, arbitrary: cell });
const likelyRow = fc
  .tuple(
    fc.uuid(),
    mostly("Aldermoor", ""),
    mostly("Foods", ""),
    mostly("10", "25000000"),
    mostly("40%", "0%", "35 %"),
    mostly("50 bp", ""),
    mostly("85 bp", "0"),
    mostly("", "3%"),
    mostly("", "2%"),
    mostly("", "100 bp"),
  )
  .map((cells): string[] => cells);
const wildRow = fc.array(cell, { minLength: headers.length, maxLength: headers.length + 1 });
const row = fc.oneof(likelyRow, wildRow);
const table = fc.record({
  rows: fc.array(row, { minLength: 1, maxLength: 12 }),
  delimiter: fc.constantFrom(",", ";", "\t", "|"),
});

describe("any table at all", () => {
  it("is read without throwing; every row is a name, or has a problem, or is set aside: none disappears", () => {
    fc.assert(
      fc.property(table, ({ rows, delimiter }) => {
        const filled = rows.filter((cells) => cells.some((text) => text.trim() !== "")).length;
        const reading = readPool(Papa.unparse([headers, ...rows], { delimiter }));
        if (reading.columns.length === headers.length)
          expect(reading.rows.length + reading.setAside.length).toBe(filled);
        for (const { name, problems } of reading.rows) expect(name === null).toBe(problems.length > 0);
      }),
      { numRuns: 500 },
    );
  });

  it("yields only names that the pricing request takes", () => {
    let taken = 0;
    fc.assert(
      fc.property(table, ({ rows, delimiter }) => {
        const { names } = readPool(Papa.unparse([headers, ...rows], { delimiter }));
        taken += names.length;
        if (names.length > 0) expect(poolNameProblems(names)).toEqual([]);
      }),
      { numRuns: 500 },
    );
    expect(taken).toBeGreaterThan(100);
  });
});
