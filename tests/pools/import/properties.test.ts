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
const row = fc.array(cell, { minLength: headers.length, maxLength: headers.length + 1 });
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
    fc.assert(
      fc.property(table, ({ rows, delimiter }) => {
        const { names } = readPool(Papa.unparse([headers, ...rows], { delimiter }));
        if (names.length > 0) expect(poolNameProblems(names)).toEqual([]);
      }),
      { numRuns: 500 },
    );
  });
});
